#pragma once
#include <variant>

#include "kernel/region.hpp"

namespace merestone {

/// A closed axis-parallel rectangle with exact corners, possibly degenerate.
struct Rectangle {
  Rational x_lo, x_hi, y_lo, y_hi;
};

/// A closed disc with an exact centre and radius; radius >= 0.
struct Round {
  ComplexRational centre;
  Rational radius;
};

/// What a region or a typed region looks like, in exact rationals: a point and a segment are degenerate rectangles.
using Shape = std::variant<Rectangle, Round>;

Rectangle shape_of(const ComplexRational& c);
Shape shape_of(const Region& region);

/// Exact (Lemma N1): is every point of `inner` a point of `outer`?
bool is_within(const Shape& inner, const Shape& outer);

/// The smallest axis-parallel rectangle that contains the shape, exactly.
Rectangle bounding_rectangle(const Shape& shape);
inline Rectangle bounding_rectangle(const Region& region) { return bounding_rectangle(shape_of(region)); }

/// Exact (Lemma N1): does the rectangle miss the shape?
bool are_disjoint(const Rectangle& rectangle, const Shape& shape);

}  // namespace merestone
