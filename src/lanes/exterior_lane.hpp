#pragma once
#include <cstdint>
#include <optional>

#include "lanes/double_region.hpp"

namespace merestone {

/// |z_index| at which a jet's orbit is read off: far out, so that Lemma E3's tail is short.
inline constexpr double kReadOff = 0x1p20;

/// What a jet showed.
struct ExteriorLane {
  std::uint64_t index = 0;             // the first index with |z_index| >= kReadOff, as rounded; 0 when there was none
  std::optional<DoubleCircle> circle;  // a closed disc outside M; nothing when the errors are too large
};

/// Lemma E3 in tracked double precision, at the parameter x + iy, exactly: follows z_n and its derivatives until z_n is far
/// out, for at most so many steps.
/// Requires |x|, |y| <= 4.
ExteriorLane exterior_disc(double x, double y, std::uint64_t steps);

}  // namespace merestone
