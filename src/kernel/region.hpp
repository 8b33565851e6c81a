#pragma once
#include <array>
#include <variant>

#include "kernel/exact.hpp"

namespace merestone {

/// A single parameter, exact.
struct Point {
  ComplexRational at;
  friend bool operator==(const Point&, const Point&) = default;
};

/// The closed segment from lo to hi of the real axis; lo < hi.
struct Segment {
  Dyadic lo, hi;
  friend bool operator==(const Segment&, const Segment&) = default;
};

/// The closed disc about centre; radius > 0.
struct Disc {
  ComplexDyadic centre;
  Dyadic radius;
  friend bool operator==(const Disc&, const Disc&) = default;
};

/// The closed axis-parallel box of the c with lo.re <= Re c <= hi.re and lo.im <= Im c <= hi.im; lo < hi in both parts.
struct Box {
  ComplexDyadic lo, hi;
  friend bool operator==(const Box&, const Box&) = default;
};

/// A set of parameters c, given exactly.
using Region = std::variant<Point, Segment, Disc, Box>;

/// The exact centre.
ComplexDyadic centre_of(const Box& box);

/// The four closed quarters of a box, exactly: lower left, lower right, upper left, upper right.
std::array<Box, 4> quarters_of(const Box& box);

/// The smallest box, possibly degenerate, that contains the region, exactly. Requires that it is not a point.
Box bounding_box(const Region& region);

}  // namespace merestone
