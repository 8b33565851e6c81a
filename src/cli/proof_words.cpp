#include "cli/proof_words.hpp"

#include <fmt/format.h>

#include "cli/shared_pieces.hpp"
#include "kernel/overloaded.hpp"
#include "search/verdict.hpp"

namespace merestone {

namespace {

std::string arithmetic_in_words(std::uint32_t bits, const char* lemma, const char* enclosures = ", E2") {
  if (bits == kDoubleBits) return fmt::format("in tracked double precision ({}, E4)", lemma);
  return fmt::format("over disc enclosures of {} bits ({}{})", bits, lemma, enclosures);
}

}  // namespace

std::string proof_in_words(const Rule& rule) {
  return std::visit(
      Overloaded{[](const Escape& by) { return "escape " + arithmetic_in_words(by.bits, "E1"); },
                 [](const AttractingDisc& by) { return "attracting disc " + arithmetic_in_words(by.bits, "I1"); },
                 [](const ClosedForm&) { return std::string("polynomial inequality, exact (I3)"); },
                 [](const RealSegment&) { return std::string("M meets the real axis in [-2, 1/4] (I4)"); },
                 [](const Preperiodic&) { return std::string("exact arithmetic (P1)"); },
                 [](const ExteriorDisc& by) { return "a disc outside M " + arithmetic_in_words(by.bits, "E3, U1", ""); },
                 [](const InteriorDisc& by) {
                   return "a disc in a hyperbolic component " + arithmetic_in_words(by.cycle.bits, "I2, U1", "");
                 },
                 [](const IsolatedRoot& by) { return "isolated root " + arithmetic_in_words(by.bits, "P2"); },
                 [](const Witnesses&) { return std::string("its witnesses (P3)"); },
                 [](const Quarters& by) { return fmt::format("{} pieces, each by a rule of its own (N1)", pieces_of(by).all); }},
      rule);
}

}  // namespace merestone
