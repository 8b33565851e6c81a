#pragma once
#include <vector>

#include "kernel/shape.hpp"

namespace merestone::bench {

/// `count` boxes of side 2^-places near the boundary of M, the same at every call: each lies about a point of the boundary as
/// bisection between a parameter that escapes within 2,000 steps and one that does not has it, at most two sides away.
const std::vector<Rectangle>& boundary_boxes(int places);

inline constexpr std::size_t kBoxes = 250;  // of each side

}  // namespace merestone::bench
