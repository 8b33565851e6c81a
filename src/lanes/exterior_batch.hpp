#pragma once
#include <cstdint>
#include <span>
#include <string>
#include <vector>

#include "lanes/double_region.hpp"

namespace merestone {

/// A parameter that is exactly a double.
struct DoublePoint {
  double x = 0, y = 0;
};

/// How the orbit of one of many parameters ended.
struct ExteriorMark {
  enum class End : std::uint8_t {
    proved,  // `circle` is a closed disc outside M
    left,    // it escaped, and nothing was proved
    close,   // given up: a disc would probably be smaller than was asked for
    stayed,  // not escaped within the steps; the circle's centre is the last z, approximately
  };
  DoubleCircle circle;
  End end = End::stayed;
};

/// How far orbits are followed.
struct OrbitLimits {
  std::uint32_t steps = 1000;
  double smallest = 0;  // radius of a disc that is worth having: an orbit is given up when its own will probably be
                        // smaller (the largest lost was 5.7 times as large, measured)
};

/// Lemmas E3, E9 for many parameters at once, in the vector lanes of this machine: `marks[i]` is what is shown at
/// `points[i]`. A result depends on its point and on the limits alone: not on the other points, the width of the lanes
/// or the machine. Requires |x|, |y| <= 4 and as many marks as points.
void exterior_discs(std::span<const DoublePoint> points, const OrbitLimits& limits, std::span<ExteriorMark> marks);

/// The lane widths that this machine has for exterior_discs, by their names in Highway, widest first.
std::vector<std::string> lane_targets();
/// Lets later calls of exterior_discs use this width; an empty name means the widest. False for a name that this
/// machine has not.
bool use_lane_target(const std::string& name);

}  // namespace merestone
