#include "cli/check_rule_words.hpp"

#include <fmt/format.h>

#include "cli/check_number_words.hpp"
#include "cli/shared_pieces.hpp"
#include "cli/check_words.hpp"
#include "format/names.hpp"
#include "format/shown.hpp"
#include "kernel/work.hpp"

namespace merestone {

namespace {

std::string enclosures(std::uint32_t bits) { return fmt::format("enclosures of {} bits", bits); }

struct HintWords {
  const Claim& claim;

  std::string operator()(const Escape& by) const {
    return (by.index == 0 ? "" : fmt::format("at index {}, ", by.index)) + enclosures(by.bits);
  }
  std::string operator()(const AttractingDisc& by) const {
    return fmt::format("period {}, the disc {}, {}", by.period, disc_in_words('z', by.disc), enclosures(by.bits));
  }
  std::string operator()(const ClosedForm& by) const {
    return by.period == 1 ? "the main cardioid (period 1)" : "the disc of period 2";
  }
  std::string operator()(const RealSegment&) const { return ""; }
  std::string operator()(const Preperiodic& by) const {
    return fmt::format("preperiod {}, period {}", by.preperiod, by.period);
  }
  std::string operator()(const ExteriorDisc& by) const {
    return fmt::format("at c = {}, index {}, {}", complex_in_words(by.centre), by.index, enclosures(by.bits));
  }
  std::string operator()(const InteriorDisc& by) const {
    return fmt::format("at c = {}, {}", complex_in_words(by.centre), (*this)(by.cycle));
  }
  std::string operator()(const IsolatedRoot& by) const { return enclosures(by.bits); }
  std::string operator()(const Witnesses& by) const {
    std::string text;
    for (std::size_t i = 0; i < by.claims.size(); ++i)
      text += fmt::format("{}({}) {} ({})", i == 0 ? "" : "; ", i, claim_in_words(by.claims[i]),
                          rule_in_words(by.claims[i]));
    return text;
  }
  std::string operator()(const Quarters& by) const {
    const Pieces pieces = pieces_of(by);
    return fmt::format(
        "the box cut into {} boxes, the smallest with 2^-{} of its sides; enclosures of {} bits or "
        "less",
        grouped(pieces.all), pieces.depth, bits_of(claim));
  }
};

}  // namespace

std::string rule_in_words(const Claim& claim) {
  const std::string hints = std::visit(HintWords{claim}, claim.by);
  return std::string(name_of(claim.by)) + (hints.empty() ? "" : ": " + hints);
}

}  // namespace merestone
