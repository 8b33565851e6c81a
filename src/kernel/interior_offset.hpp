#pragma once
#include "kernel/cover.hpp"
#include "kernel/offset_disc.hpp"

namespace merestone {

/// Lemmas I1, I2, E8: a closed disc in the hyperbolic component of cx + i cy, exactly, whose attracting cycle is shown
/// by the attracting disc of `by` to have exact period by.period. Of radius 0 when that does not succeed in double
/// precision. Requires by.period >= 1; remembers a cycle of that length.
OffsetDisc interior_offset(double cx, double cy, const CoverInside& by);

}  // namespace merestone
