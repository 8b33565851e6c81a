#pragma once
#include <optional>

#include "kernel/shape.hpp"
#include "lanes/double_region.hpp"

namespace merestone {

/// Dyadic regions near a typed one: outer contains it and inner lies in it, both exactly; equal to it where its numbers are
/// dyadic. They differ by about 2^-64 of its size at most.
struct RegionBounds {
  Region outer, inner;
};

/// Requires a shape with an interior: a disc of radius above 0, or a rectangle with width and height.
RegionBounds bound_region(const Shape& typed);

/// The binary exponent e with size < 2^e of the larger side of the region's bounding box, roughly.
slong size_exponent(const Region& region);

/// A box in double precision that contains the exact one. Nothing when a corner exceeds 4 in size.
std::optional<DoubleBox> enclose_in_double(const Box& box);

}  // namespace merestone
