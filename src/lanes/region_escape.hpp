#pragma once
#include <cstdint>

#include "lanes/tracked_orbit.hpp"

namespace merestone {

/// How all parameters within c.error of a double escape.
struct RegionEscape {
  std::uint64_t index = 0;  // |z_index| > 2 for all of them; 0 when nothing is proved
  bool is_count = false;    // and |z_{index-1}| <= 2 for all of them
};

/// Lemmas E1, E4: follows the orbits of all parameters within c.error at once, until they all have escaped or their
/// enclosure has become too wide.
inline RegionEscape region_escape(const DoubleParameter& c, std::uint64_t iterations) {
  TrackedValue z;
  for (std::uint64_t n = 1; n <= iterations; ++n) {
    const TrackedValue before = z;
    z = next_tracked(z, c);
    if (z.certainly_beyond(2)) return {n, before.certainly_within(2)};
    if (!(z.error <= 1)) break;
  }
  return {};
}

}  // namespace merestone
