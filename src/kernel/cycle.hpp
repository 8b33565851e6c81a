#pragma once
#include <cstddef>
#include <cstdint>
#include <optional>
#include <vector>

#include "kernel/claim.hpp"
#include "kernel/disc_enclosure.hpp"

namespace merestone {

/// The attracting cycle of a parameter and its multiplier, enclosed.
struct CycleEnclosure {
  std::vector<DiscEnclosure> points;  // the first points of the cycle, in the order of the dynamics
  std::uint64_t period = 0;           // how many there are
  DiscEnclosure multiplier;
};

/// Encloses the attracting cycle of c and its multiplier, and keeps at most so many of the cycle's points (Lemma C1).
/// Requires: the rule is AttractingDisc or ClosedForm and establishes that c is inside.
/// On failure (nothing): another rule, or an orbit of the disc that is lost.
std::optional<CycleEnclosure> enclose_cycle(const ComplexRational& c, const Rule& inside_by,
                                            std::size_t most_points = SIZE_MAX);

}  // namespace merestone
