#pragma once
#include <cstdint>
#include <optional>

#include "lanes/double_region.hpp"

namespace merestone {

/// A parameter that leaves the disc of radius 2 at this index, as rounded. Proves nothing.
struct ApproxEscape {
  double x = 0, y = 0;
  std::uint64_t index = 0;
};

/// Of a grid of parameters in the box the one that escapes first, if any does within so many steps.
std::optional<ApproxEscape> approx_escape(const DoubleBox& box, std::uint64_t iterations);

}  // namespace merestone
