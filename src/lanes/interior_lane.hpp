#pragma once
#include <cstdint>
#include <optional>

#include "lanes/double_region.hpp"

namespace merestone {

/// Lemma I2 in tracked double precision: a closed disc in the hyperbolic component of c_x + i c_y, exactly.
/// Requires: the attracting cycle of that parameter has exact period `period` and a point in the closed disc `cycle`,
/// which proves_attraction has shown. Nothing when the errors are too large.
std::optional<DoubleCircle> interior_disc(double c_x, double c_y, const DoubleCircle& cycle, std::uint64_t period);

}  // namespace merestone
