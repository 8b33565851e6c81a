#pragma once
#include <cmath>

#include "lanes/double_region.hpp"

namespace merestone {

/// Lemma I3 over a disc, in double precision: true is a proof that it lies inside, in the main cardioid or in the disc
/// of period 2. Requires a radius >= 0.
inline bool lies_in_closed_form(const DoubleCircle& disc) {
  constexpr double kBend = 16;           // half a bound of the second derivative over the box below
  constexpr double kRelative = 0x1p-40;  // far above the rounding of each expression
  const double u = disc.x - 0.25, y = disc.y, r = disc.radius;
  const double reach = std::sqrt((disc.x + 1) * (disc.x + 1) + y * y) + r;
  if (reach < 0.25 * (1 - kRelative)) return true;
  if (!(std::abs(u) + r <= 1.1 && std::abs(y) + r <= 0.75)) return false;
  const double q = u * u + y * y;
  const double value = q * (q + u) - 0.25 * y * y;
  const double slope_x = 4 * q * u + 2 * u * u + q, slope_y = 4 * q * y + 2 * u * y - 0.5 * y;
  const double slope = std::sqrt(slope_x * slope_x + slope_y * slope_y);
  return value + slope * r + kBend * r * r < -kRelative * (1 + slope) * (q + r);
}

}  // namespace merestone
