#pragma once
#include <algorithm>
#include <cstdint>

#include "lanes/double_parameter.hpp"

namespace merestone {

/// The escape index of c for radius 2, if it is at most 16 and not close to call; otherwise 0, which says nothing.
/// Needs no error bound at each step: over so short an orbit within radius 2 the error stays below 2^-18, and the
/// comparisons leave that much room (Lemma E5).
/// Requires |x|, |y| <= 4.
inline std::uint64_t short_escape(const DoubleParameter& c, std::uint64_t iterations) {
  constexpr std::uint64_t kLongest = 16;
  constexpr double kBeyond = 4 + 0x1p-15, kWithin = 4 - 0x1p-15;  // of |z|², for |z| > 2 and |z| <= 2
  if (!(c.error <= 0x1p-50)) return 0;
  const std::uint64_t longest = std::min(kLongest, iterations);
  double x = 0, y = 0, x_squared = 0, y_squared = 0, norm = 0;
  for (std::uint64_t n = 1; n <= longest; ++n) {
    const double norm_before = norm;
    y = 2 * x * y + c.y;
    x = x_squared - y_squared + c.x;
    x_squared = x * x;
    y_squared = y * y;
    norm = x_squared + y_squared;
    if (!(norm <= 4)) return norm > kBeyond && norm_before < kWithin ? n : 0;
  }
  return 0;
}

}  // namespace merestone
