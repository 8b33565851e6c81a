#pragma once
#include <vector>

#include "kernel/shape.hpp"
#include "search/root_search.hpp"

namespace merestone {

/// How finely and how long roots are isolated.
struct IsolationLimits {
  slong places = 64;                // radius 2^-places of each root's disc
  std::uint64_t cells = 1'000'000;  // into which the region is cut
};

/// The nuclei or Misiurewicz points of one exact type in a region.
struct IsolatedRoots {
  /// Each has a disc of its own in the region, with exactly one root (Lemma P2); pairwise different.
  std::vector<Claim> claims;
  /// Is it proved that there is no other in the region?
  bool is_complete = true;
};

/// Isolates the roots of the equation that are of its exact type, RootEquation::type(): cells over which Lemma E2 excludes
/// a root are dropped, cells in whose surroundings Lemma P2 finds exactly one are settled, others are cut.
/// Requires a shape with an interior.
IsolatedRoots isolate_roots(const RootEquation& equation, const Shape& region, const IsolationLimits& limits,
                            Deadline& deadline);

}  // namespace merestone
