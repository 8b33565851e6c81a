#include <algorithm>

#include "kernel/rules/rules.hpp"

namespace merestone::rules {

namespace {

/// Exact interval of rationals.
struct Interval {
  Rational lo, hi;
};

Interval shifted(const Rational& lo, const Rational& hi, const Rational& by) { return {lo + by, hi + by}; }

Interval operator+(const Interval& a, const Interval& b) { return {a.lo + b.lo, a.hi + b.hi}; }

Interval operator*(const Interval& a, const Interval& b) {
  const auto [lo, hi] = std::minmax({a.lo * b.lo, a.lo * b.hi, a.hi * b.lo, a.hi * b.hi});
  return {lo, hi};
}

Interval squared(const Interval& a) {
  const Rational p = a.lo * a.lo, q = a.hi * a.hi;
  const Rational least = a.lo.sign() <= 0 && a.hi.sign() >= 0 ? Rational(0) : std::min(p, q);
  return {least, std::max(p, q)};
}

// Encloses, over the rectangle, the two sides of  q (q + x - 1/4) <= y²/4,  q = (x - 1/4)² + y².
std::pair<Interval, Interval> cardioid_sides(const Rectangle& r) {
  const Interval u = shifted(r.x_lo, r.x_hi, Rational(-1, 4));
  const Interval y_squared = squared({r.y_lo, r.y_hi});
  const Interval q = squared(u) + y_squared;
  const Interval quarter{Rational(1, 4), Rational(1, 4)};
  return {q * (q + u), quarter * y_squared};
}

// Encloses the two sides of  (x + 1)² + y² <= 1/16.
std::pair<Interval, Interval> period_two_sides(const Rectangle& r) {
  const Interval from_centre = shifted(r.x_lo, r.x_hi, Rational(1));
  return {squared(from_centre) + squared({r.y_lo, r.y_hi}), {Rational(1, 16), Rational(1, 16)}};
}

enum class Need { strict, or_equal };

Outcome decide(const Region& region, const ClosedForm& by, Need need) {
  const Rectangle r = bounding_rectangle(region);
  const auto [left, right] = by.period == 1 ? cardioid_sides(r) : period_two_sides(r);
  const bool holds = need == Need::strict ? left.hi < right.lo : left.hi <= right.lo;
  const std::string name = by.period == 1 ? "main cardioid" : "disc of period 2";
  if (!holds)
    return NotEstablished{"the inequality of the " + name + (need == Need::strict ? " does not hold strictly" : " does not hold") +
                          " over the region"};
  return Established{{}, {"I3"}};
}

}  // namespace

Outcome closed_form_inside(const Region& region, const ClosedForm& by) { return decide(region, by, Need::strict); }

Outcome closed_form_member(const Region& region, const ClosedForm& by) { return decide(region, by, Need::or_equal); }

}  // namespace merestone::rules
