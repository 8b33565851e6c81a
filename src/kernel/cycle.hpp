#pragma once
#include <optional>
#include <vector>

#include "kernel/claim.hpp"
#include "kernel/disc_enclosure.hpp"

namespace merestone {

/// The attracting cycle of a parameter and its multiplier, enclosed.
struct CycleEnclosure {
  std::vector<DiscEnclosure> points;  // one for each point of the cycle, in the order of the dynamics
  DiscEnclosure multiplier;
};

/// Encloses the attracting cycle of c (Lemma C1).
/// Requires: the rule is AttractingDisc or ClosedForm and establishes that c is inside.
/// On failure (nothing): another rule, or an orbit of the disc that is lost.
std::optional<CycleEnclosure> enclose_cycle(const ComplexRational& c, const Rule& inside_by);

}  // namespace merestone
