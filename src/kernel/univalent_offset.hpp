#pragma once
#include <algorithm>
#include <cmath>

#include "kernel/near_complex.hpp"
#include "kernel/offset_disc.hpp"

namespace merestone {

/// Lemmas U1, E8: a closed disc in the image of a univalent map of the unit disc with f(0) = c, f'(0) = f1 and
/// f''(0)/(2 f'(0)) = a2. Of radius 0 when the errors are too large, infinite or not numbers.
inline OffsetDisc univalent_offset(const NearComplex& f1, const NearComplex& a2) {
  constexpr double kUp = 1 + 0x1p-48;
  const double squared = a2.x * a2.x + a2.y * a2.y;
  const double f = std::sqrt(f1.x * f1.x + f1.y * f1.y), a = std::sqrt(squared) * kUp;
  if (!(a <= 3 && a2.error <= 0.5 && f1.error <= f && f > 0x1p-100 && f < 0x1p+10)) return {};
  const double b = std::max(2 + a2.error, a + 0x1p-20) * kUp;
  const double delta = b * b - squared;
  const double rounding = 0x1p-43 + 0x1p-43 / delta;  // in proportion, of the centre and of the radius together
  const double spent = (b + a) * f1.error * kUp, full = b * f;
  const double radius = (full * (1 - rounding) - spent) / delta;
  if (!(radius > 0)) return {};
  const double loss = spent / full + 8 * a2.error / delta + rounding;
  return {(f1.x * a2.x + f1.y * a2.y) / delta, (f1.y * a2.x - f1.x * a2.y) / delta, radius, loss};
}

}  // namespace merestone
