#pragma once
#include <variant>

#include "kernel/exact.hpp"

namespace merestone {

/// A single parameter, exact.
struct Point {
  ComplexRational at;
  friend bool operator==(const Point&, const Point&) = default;
};

/// The closed segment from lo to hi of the real axis; lo <= hi.
struct Segment {
  Dyadic lo, hi;
  friend bool operator==(const Segment&, const Segment&) = default;
};

/// The closed disc about centre; radius >= 0.
struct Disc {
  ComplexDyadic centre;
  Dyadic radius;
  friend bool operator==(const Disc&, const Disc&) = default;
};

/// A set of parameters c, given exactly.
using Region = std::variant<Point, Segment, Disc>;

/// Exact: is c an element of the region?
bool contains(const Region& region, const ComplexRational& c);

/// An axis-parallel rectangle with exact corners, possibly degenerate.
struct Rectangle {
  Rational x_lo, x_hi, y_lo, y_hi;
};

/// The smallest axis-parallel rectangle that contains the region, exactly.
Rectangle bounding_rectangle(const Region& region);

}  // namespace merestone
