#include <algorithm>
#include <array>
#include <vector>

#include "kernel/rules/rules.hpp"
#include "kernel/shape.hpp"
#include "kernel/work.hpp"

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
enum class Holds { throughout, nowhere, unclear };

Holds holds_over(const Rectangle& r, const ClosedForm& by, Need need) {
  const auto [left, right] = by.period == 1 ? cardioid_sides(r) : period_two_sides(r);
  if (need == Need::strict) return left.hi < right.lo ? Holds::throughout : left.lo >= right.hi ? Holds::nowhere : Holds::unclear;
  return left.hi <= right.lo ? Holds::throughout : left.lo > right.hi ? Holds::nowhere : Holds::unclear;
}

// The two halves of a box, cut across its longer side.
std::array<Box, 2> halves_of(const Box& box) {
  const ComplexDyadic middle = centre_of(box);
  if (box.hi.re - box.lo.re >= box.hi.im - box.lo.im)
    return {Box{box.lo, {middle.re, box.hi.im}}, Box{{middle.re, box.lo.im}, box.hi}};
  return {Box{box.lo, {box.hi.re, middle.im}}, Box{{box.lo.re, middle.im}, box.hi}};
}

// Cuts the region's box until the inequality holds on every cell that meets the region.
bool holds_by_cells(const Region& region, const ClosedForm& by, Need need) {
  const Shape shape = shape_of(region);
  std::vector<Box> open = {bounding_box(region)};
  for (std::size_t taken = 0; !open.empty(); ++taken) {
    if (taken == kMostClosedFormCells) return false;
    const Box cell = open.back();
    open.pop_back();
    const Rectangle r = bounding_rectangle(Region(cell));
    if (are_disjoint(r, shape)) continue;
    const Holds holds = holds_over(r, by, need);
    if (holds == Holds::nowhere) return false;
    if (holds == Holds::unclear)
      for (Box& half : halves_of(cell)) open.push_back(std::move(half));
  }
  return true;
}

Outcome decide(const Region& region, const ClosedForm& by, Need need) {
  const bool is_point = std::holds_alternative<Point>(region);
  const bool holds = is_point ? holds_over(bounding_rectangle(region), by, need) == Holds::throughout
                              : holds_by_cells(region, by, need);
  const std::string name = by.period == 1 ? "main cardioid" : "disc of period 2";
  if (!holds)
    return NotEstablished{"the inequality of the " + name + (need == Need::strict ? " does not hold strictly" : " does not hold") +
                          " over the region" + (is_point ? "" : ", as far as it was cut into cells")};
  return Established{{}, {"I3"}};
}

}  // namespace

Outcome closed_form_inside(const Region& region, const ClosedForm& by) { return decide(region, by, Need::strict); }

Outcome closed_form_member(const Region& region, const ClosedForm& by) { return decide(region, by, Need::or_equal); }

}  // namespace merestone::rules
