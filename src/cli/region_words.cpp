#include "cli/region_words.hpp"

#include <fmt/format.h>

#include "cli/enclosure_text.hpp"
#include "cli/proof_words.hpp"
#include "format/shown.hpp"
#include "format/spelling.hpp"
#include "kernel/overloaded.hpp"
#include "kernel/shape.hpp"

namespace merestone {

namespace {

std::uint64_t period_of(const Rule& rule) {
  return std::visit(Overloaded{[](const InteriorDisc& by) { return by.cycle.period; },
                               [](const AttractingDisc& by) { return by.period; },
                               [](const ClosedForm& by) { return std::uint64_t{by.period}; },
                               [](const Quarters& by) { return period_of(by.rules.front()); },
                               [](const auto&) { return std::uint64_t{0}; }},
                    rule);
}

std::string witnesses_in_words(const Witnesses& by) {
  std::string text;
  for (const Claim& witness : by.claims) text += (text.empty() ? "" : " and ") + witness_in_words(witness);
  return text;
}

}  // namespace

Failure fault_of_region(const std::string& typed, const Failure& fault) {
  return {shown(typed) + ": " + fault.message};
}

std::string type_in_words(const Statement& type) {
  if (const auto* nucleus = std::get_if<Nucleus>(&type)) return fmt::format("nucleus of period {}", nucleus->period);
  const auto& other = std::get<Misiurewicz>(type);
  return fmt::format("Misiurewicz point of preperiod {} and period {}", other.preperiod, other.period);
}

std::string witness_in_words(const Claim& witness) {
  return std::visit(
      Overloaded{[](const Nucleus& type) { return "a " + type_in_words(type); },
                 [](const Misiurewicz& type) { return "a " + type_in_words(type); },
                 [](const Count& count) { return fmt::format("a parameter of escape index {}", count.index); },
                 [&](const Outside&) {
                   const auto* escape = std::get_if<Escape>(&witness.by);
                   return escape != nullptr ? fmt::format("a parameter outside (|z_{}| > 2)", escape->index)
                                            : std::string("a parameter outside");
                 },
                 [&](const Inside&) { return fmt::format("a parameter inside (period {})", period_of(witness.by)); },
                 [](const auto&) { return std::string("a member"); }},
      witness.statement);
}

std::string place_in_words(const Region& region) {
  if (const auto* point = std::get_if<Point>(&region)) return complex_literal(DiscEnclosure::of(point->at, 4096));
  if (const auto* disc = std::get_if<Disc>(&region)) return complex_literal(DiscEnclosure::of(*disc, 4096));
  return complex_literal(DiscEnclosure::of(Disc{centre_of(bounding_box(region)), Dyadic()}, 4096));
}

std::string region_reason_in_words(const Proof& proof) {
  if (const auto* count = std::get_if<Count>(&proof.statement))
    return fmt::format("every parameter has escape index {} for radius {}", count->index,
                       spell(count->bailout.to_rational()));
  if (std::holds_alternative<Inside>(proof.statement))
    return fmt::format("in the component of an attracting cycle of period {}", period_of(proof.by));
  if (const auto* by = std::get_if<Witnesses>(&proof.by)) return "it contains " + witnesses_in_words(*by);
  return "every parameter escapes";
}

std::string region_rows(const Rule& by) {
  std::string text;
  if (const auto* witnesses = std::get_if<Witnesses>(&by))
    for (const Claim& witness : witnesses->claims)
      text += fmt::format("  witness     {}\n              at {}\n              by {}\n", witness_in_words(witness),
                          place_in_words(witness.region), proof_in_words(witness.by));
  return text + fmt::format("  proved by   {}\n", proof_in_words(by));
}

}  // namespace merestone
