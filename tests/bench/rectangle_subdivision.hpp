#pragma once
#include <cstddef>

#include "kernel/shape.hpp"

namespace merestone::bench {

enum class PlainVerdict { outside, inside, straddles, undecided };

/// What anyone would write first with a ball arithmetic library: the orbit of a rectangle of parameters in Arb's rectangular
/// balls of 64 bits; outside when all of it is beyond radius 2, inside when its enclosure returns into itself, else cut into
/// quarters, until one part is outside and one inside, or so many cells have been tried.
PlainVerdict rectangle_subdivision(const Rectangle& box, std::size_t most_cells);

}  // namespace merestone::bench
