#pragma once
#include <cmath>

#include "lanes/double_parameter.hpp"

namespace merestone {

/// Where a parameter lies with respect to the two closed-form components, as far as double precision can prove it.
enum class ClosedFormSide { inside_period_1, inside_period_2, outside_both, unclear };

/// Lemma I3, double-precision filter: every answer but `unclear` is a proof for all c within c.error of the double.
inline ClosedFormSide closed_form_side(const DoubleParameter& c) {
  constexpr double kRelative = 0x1p-46;
  constexpr double kCardioidSlope = 512, kDiscSlope = 16;
  if (!(std::abs(c.x) <= 3 && std::abs(c.y) <= 3 && c.error <= 0x1p-20)) return ClosedFormSide::unclear;

  const double y_squared = c.y * c.y;
  const double u = c.x - 0.25;
  const double q = u * u + y_squared;
  const double cardioid = q * (q + u) - 0.25 * y_squared;
  const double cardioid_margin = kRelative * (q * (q + std::abs(u)) + 0.25 * y_squared) + kCardioidSlope * c.error + 0x1p-1000;
  if (cardioid < -cardioid_margin) return ClosedFormSide::inside_period_1;

  const double v = c.x + 1;
  const double distance_squared = v * v + y_squared;
  const double disc = distance_squared - 0.0625;
  const double disc_margin = kRelative * (distance_squared + 0.0625) + kDiscSlope * c.error;
  if (disc < -disc_margin) return ClosedFormSide::inside_period_2;

  const bool outside = cardioid > cardioid_margin && disc > disc_margin;
  return outside ? ClosedFormSide::outside_both : ClosedFormSide::unclear;
}

}  // namespace merestone
