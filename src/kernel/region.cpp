#include "kernel/region.hpp"

namespace merestone {

namespace {

struct Contains {
  const ComplexRational& c;

  bool operator()(const Point& point) const { return point.at == c; }

  bool operator()(const Segment& segment) const {
    return c.im.sign() == 0 && segment.lo.to_rational() <= c.re && c.re <= segment.hi.to_rational();
  }

  bool operator()(const Disc& disc) const {
    const Rational radius = disc.radius.to_rational();
    return norm(c - to_rational(disc.centre)) <= radius * radius;
  }
};

struct Bounding {
  Rectangle operator()(const Point& point) const { return {point.at.re, point.at.re, point.at.im, point.at.im}; }

  Rectangle operator()(const Segment& segment) const {
    return {segment.lo.to_rational(), segment.hi.to_rational(), Rational(0), Rational(0)};
  }

  Rectangle operator()(const Disc& disc) const {
    const ComplexRational centre = to_rational(disc.centre);
    const Rational radius = disc.radius.to_rational();
    return {centre.re - radius, centre.re + radius, centre.im - radius, centre.im + radius};
  }
};

}  // namespace

bool contains(const Region& region, const ComplexRational& c) { return std::visit(Contains{c}, region); }

Rectangle bounding_rectangle(const Region& region) { return std::visit(Bounding{}, region); }

}  // namespace merestone
