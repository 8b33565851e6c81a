#pragma once
#include <optional>
#include <string>
#include <vector>

#include "kernel/claim.hpp"
#include "kernel/outcome.hpp"

namespace merestone {

/// Something that the rule had to show, with the room by which it holds.
struct Fact {
  std::string words;
  /// A lower bound of the difference of the two sides of the inequality, from the established figures. Nothing when
  /// the rule decides in exact arithmetic or the room is too small for the figures to show.
  std::optional<Dyadic> margin;
};

/// The facts that make up the proof of an established claim.
std::vector<Fact> facts_of(const Claim& claim, const Established& established);

}  // namespace merestone
