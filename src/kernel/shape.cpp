#include "kernel/shape.hpp"

#include <algorithm>

#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

Rational squared(const Rational& x) { return x * x; }

// The square of the largest distance from a point of the rectangle: that from one of its corners.
Rational farthest_squared(const Rectangle& r, const ComplexRational& from) {
  return std::max(squared(r.x_lo - from.re), squared(r.x_hi - from.re)) +
         std::max(squared(r.y_lo - from.im), squared(r.y_hi - from.im));
}

Rational distance_to(const Rational& x, const Rational& lo, const Rational& hi) {
  return x < lo ? lo - x : hi < x ? x - hi : Rational(0);
}

struct IsWithin {
  bool operator()(const Rectangle& in, const Rectangle& out) const {
    return out.x_lo <= in.x_lo && in.x_hi <= out.x_hi && out.y_lo <= in.y_lo && in.y_hi <= out.y_hi;
  }
  bool operator()(const Rectangle& in, const Round& out) const {
    return farthest_squared(in, out.centre) <= squared(out.radius);
  }
  bool operator()(const Round& in, const Rectangle& out) const { return (*this)(bounding_rectangle(in), out); }
  bool operator()(const Round& in, const Round& out) const {
    return in.radius <= out.radius && norm(in.centre - out.centre) <= squared(out.radius - in.radius);
  }
};

}  // namespace

Rectangle shape_of(const ComplexRational& c) { return {c.re, c.re, c.im, c.im}; }

Shape shape_of(const Region& region) {
  return std::visit(
      Overloaded{[](const Point& point) -> Shape { return shape_of(point.at); },
                 [](const Segment& segment) -> Shape {
                   return Rectangle{segment.lo.to_rational(), segment.hi.to_rational(), Rational(0), Rational(0)};
                 },
                 [](const Disc& disc) -> Shape { return Round{to_rational(disc.centre), disc.radius.to_rational()}; },
                 [](const Box& box) -> Shape {
                   return Rectangle{box.lo.re.to_rational(), box.hi.re.to_rational(), box.lo.im.to_rational(),
                                    box.hi.im.to_rational()};
                 }},
      region);
}

bool is_within(const Shape& inner, const Shape& outer) { return std::visit(IsWithin{}, inner, outer); }

Rectangle bounding_rectangle(const Shape& shape) {
  return std::visit(Overloaded{[](const Rectangle& rectangle) { return rectangle; },
                               [](const Round& round) -> Rectangle {
                                 return {round.centre.re - round.radius, round.centre.re + round.radius,
                                         round.centre.im - round.radius, round.centre.im + round.radius};
                               }},
                    shape);
}

bool are_disjoint(const Rectangle& r, const Shape& shape) {
  const Rectangle other = bounding_rectangle(shape);
  if (r.x_hi < other.x_lo || other.x_hi < r.x_lo || r.y_hi < other.y_lo || other.y_hi < r.y_lo) return true;
  const Round* round = std::get_if<Round>(&shape);
  if (round == nullptr) return false;
  return squared(distance_to(round->centre.re, r.x_lo, r.x_hi)) +
             squared(distance_to(round->centre.im, r.y_lo, r.y_hi)) >
         squared(round->radius);
}

}  // namespace merestone
