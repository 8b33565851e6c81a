#pragma once
#include <algorithm>
#include <optional>

#include "lanes/double_region.hpp"
#include "lanes/tracked_complex.hpp"

namespace merestone {

/// Lemma U1 in tracked double precision: a closed disc in the image of a univalent map of the unit disc with f(0) = x + iy
/// (exactly), f'(0) = f1 and f''(0)/(2 f'(0)) = a2. Nothing when the errors are too large.
inline std::optional<DoubleCircle> univalent_disc(double x, double y, const TrackedComplex& f1, const TrackedComplex& a2) {
  constexpr double kLargestA2 = 8;
  constexpr double kMargin = 0x1p-20;  // in proportion; far above every rounding below
  const double f = f1.modulus_lower(), a = a2.modulus_upper();
  if (!(a <= kLargestA2 && a2.error <= 1 && f1.error <= f && f > 0x1p-400 && f < 0x1p+400)) return std::nullopt;
  const double b = std::max(2 + a2.error, a + 0x1p-20) * kBoundInflation;
  const double delta = (b - a) * (b + a);
  const double full = b * f / delta;
  const double radius = full * (1 - kMargin) - (b + a) * f1.error / delta * (1 + kMargin);
  const double shift_x = (f1.x * a2.x + f1.y * a2.y) / delta, shift_y = (f1.y * a2.x - f1.x * a2.y) / delta;
  const double rounding = 2 * kRoundingUnit * (std::abs(x) + std::abs(y) + 1);  // of the centre
  const DoubleCircle disc{x + shift_x, y + shift_y, (radius - rounding) * (1 - kMargin)};
  if (!(disc.radius > 0)) return std::nullopt;
  return disc;
}

}  // namespace merestone
