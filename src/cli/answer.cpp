#include "cli/answer.hpp"

#include <fmt/format.h>

#include "cli/enclosure_text.hpp"
#include "cli/proof_words.hpp"
#include "cli/region_words.hpp"
#include "format/names.hpp"
#include "format/shown.hpp"
#include "format/spelling.hpp"
#include "kernel/cycle.hpp"
#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

constexpr std::size_t kMostCyclePointsInText = 6;
constexpr std::size_t kLongestShownPoint = 120;

std::string statement_word(const Statement& statement) {
  return std::string(std::holds_alternative<Count>(statement) ? "outside" : name_of(statement));
}

std::string closed_form_reason(const Proof& proof, const ClosedForm& by) {
  if (std::holds_alternative<Inside>(proof.statement)) return fmt::format("attracting cycle of period {}", by.period);
  return by.period == 1 ? "on the boundary of the main cardioid" : "on the boundary of the disc of period 2";
}

std::string cycle_paragraph(const Answer& answer, const Proof& proof) {
  const auto cycle = enclose_cycle(answer.c, proof.by, kMostCyclePointsInText);
  if (!cycle) return {};
  std::string text = fmt::format("  multiplier  {}\n", complex_literal(cycle->multiplier));
  for (std::size_t k = 0; k < cycle->points.size(); ++k)
    text += fmt::format("  {}  {}\n", k == 0 ? "cycle     " : "          ", complex_literal(cycle->points[k]));
  if (cycle->points.size() < cycle->period)
    text += fmt::format("              and {} more points\n", cycle->period - cycle->points.size());
  return text;
}

}  // namespace

const Proof* Answer::proof() const {
  const Verdict* verdict = std::get_if<Verdict>(&said);
  return verdict != nullptr ? std::get_if<Proof>(verdict) : nullptr;
}

const Undecided* Answer::undecided() const {
  const Verdict* verdict = std::get_if<Verdict>(&said);
  return verdict != nullptr ? std::get_if<Undecided>(verdict) : nullptr;
}

std::string verdict_word(const Answer& answer) {
  if (const Proof* proof = answer.proof()) return statement_word(proof->statement);
  return answer.undecided() != nullptr ? "undecided" : "error";
}

std::string reason_in_words(const Proof& proof) {
  if (const auto* count = std::get_if<Count>(&proof.statement))
    return fmt::format("escape index {} for radius {}", count->index, spell(count->bailout.to_rational()));
  return std::visit(
      Overloaded{[](const Escape& by) { return fmt::format("|z_{}| > 2; the escape index is not settled", by.index); },
                 [](const AttractingDisc& by) { return fmt::format("attracting cycle of period {}", by.period); },
                 [&](const ClosedForm& by) { return closed_form_reason(proof, by); },
                 [&](const RealSegment&) {
                   return std::string(std::holds_alternative<Member>(proof.statement) ? "real and in [-2, 1/4]"
                                                                                      : "real and beyond [-2, 1/4]");
                 },
                 [](const Preperiodic& by) {
                   return fmt::format("a boundary point: z_{} = z_{} and 0 is not in the cycle",
                                      by.preperiod + by.period, by.preperiod);
                 },
                 [](const auto&) { return std::string(); }},
      proof.by);
}

std::string limit_in_words(const Undecided& undecided) {
  const bool is_region = undecided.cells > 0;
  switch (undecided.limit) {
    case Limit::iterations:
      return fmt::format("the orbit stays within the bailout for {} iterations; raise --iterations",
                         undecided.iterations);
    case Limit::precision:
      if (is_region) return fmt::format("{} bits are needed; raise --bits", undecided.bits);
      return fmt::format("{} bits do not suffice after {} iterations; raise --bits", undecided.bits,
                         undecided.iterations);
    case Limit::cells:
      return fmt::format("cut into {} cells without a verdict; decide smaller regions, or raise --cells",
                         undecided.cells);
    case Limit::depth:
      return fmt::format("cut into {} cells, as finely as it may be, without a verdict; decide smaller regions",
                         undecided.cells);
    case Limit::time:
      break;
  }
  if (is_region) return fmt::format("the time is up after {} cells; raise --time-limit", undecided.cells);
  return fmt::format("the time is up at {} bits after {} iterations; raise --time-limit", undecided.bits,
                     undecided.iterations);
}

std::string answer_line(const Answer& answer) {
  const Proof* proof = answer.proof();
  const std::string reason = answer.failure() != nullptr     ? answer.failure()->message
                             : answer.undecided() != nullptr ? limit_in_words(*answer.undecided())
                             : answer.region                 ? region_reason_in_words(*proof)
                                                             : reason_in_words(*proof);
  return fmt::format("{}  {}: {}", shortened(answer.asked.text, kLongestShownPoint), verdict_word(answer), reason);
}

std::string answer_paragraph(const Answer& answer) {
  std::string text = answer_line(answer) + "\n";
  const Proof* proof = answer.proof();
  if (proof == nullptr) return text;
  const Rule& by = answer.claim ? answer.claim->by : proof->by;
  if (answer.region) return text + region_rows(by);
  if (std::holds_alternative<Inside>(proof->statement)) text += cycle_paragraph(answer, *proof);
  return text + fmt::format("  proved by   {}\n", proof_in_words(by));
}

}  // namespace merestone
