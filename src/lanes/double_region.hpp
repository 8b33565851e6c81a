#pragma once
#include "lanes/tracked_orbit.hpp"

namespace merestone {

/// The box of all c with |Re c - x| <= half_width and |Im c - y| <= half_height.
struct DoubleBox {
  double x = 0, y = 0, half_width = 0, half_height = 0;

  /// Every c of the box lies within this of x + iy.
  double reach_upper() const {
    return std::sqrt(half_width * half_width + half_height * half_height) * (1 + 4 * kRoundingUnit) + kUnderflowGuard;
  }
};

/// The closed disc about x + iy.
struct DoubleCircle {
  double x = 0, y = 0, radius = 0;

  /// True is a proof that the box lies in the disc: its farthest corner does (Lemma N1), all roundings upward by 2^-48.
  bool certainly_contains(const DoubleBox& box) const {
    const double dx = std::abs(box.x - x) + box.half_width, dy = std::abs(box.y - y) + box.half_height;
    return std::sqrt(dx * dx + dy * dy) * kBoundInflation + kUnderflowGuard <= radius;
  }
};

}  // namespace merestone
