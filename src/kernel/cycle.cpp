#include "kernel/cycle.hpp"

#include "kernel/orbit_enclosure.hpp"

namespace merestone {

namespace {

constexpr slong kClosedFormBits = 128;

ComplexRational affine(long constant, long slope, const ComplexRational& c) {
  return {Rational(constant) + Rational(slope) * c.re, Rational(slope) * c.im};
}

// Period 1: the multiplier is 1 - sqrt(1 - 4c), the fixed point half of it.
CycleEnclosure fixed_point(const ComplexRational& c) {
  Acb multiplier = ball_around(affine(1, -4, c), kClosedFormBits);
  acb_sqrt(multiplier, multiplier, kClosedFormBits);
  acb_sub_ui(multiplier, multiplier, 1, kClosedFormBits);
  acb_neg(multiplier, multiplier);
  Acb point = multiplier;
  acb_mul_2exp_si(point, point, -1);
  return {{DiscEnclosure::of(point)}, 1, DiscEnclosure::of(multiplier)};
}

// Period 2: the points are (-1 ± sqrt(-3 - 4c)) / 2, the multiplier 4 (1 + c).
CycleEnclosure two_cycle(const ComplexRational& c) {
  Acb root = ball_around(affine(-3, -4, c), kClosedFormBits);
  acb_sqrt(root, root, kClosedFormBits);
  CycleEnclosure cycle;
  cycle.period = 2;
  for (int sign : {1, -1}) {
    Acb point = root;
    if (sign < 0) acb_neg(point, point);
    acb_sub_ui(point, point, 1, kClosedFormBits);
    acb_mul_2exp_si(point, point, -1);
    cycle.points.push_back(DiscEnclosure::of(point));
  }
  cycle.multiplier = DiscEnclosure::of(affine(4, 4, c), kClosedFormBits);
  return cycle;
}

std::optional<CycleEnclosure> around_disc(const ComplexRational& c, const AttractingDisc& by,
                                          std::size_t most_points) {
  const slong bits = by.bits;
  OrbitEnclosure orbit(Point{c}, by.disc, bits);
  CycleEnclosure cycle;
  cycle.period = by.period;
  arf_one(cycle.multiplier.re);
  while (orbit.index() < by.period) {
    const DiscEnclosure point = orbit.range();
    if (cycle.points.size() < most_points) cycle.points.push_back(point);
    DiscEnclosure factor;
    twice(factor, point);
    multiply(cycle.multiplier, cycle.multiplier, factor, bits);
    if (!orbit.step()) return std::nullopt;
  }
  return cycle;
}

}  // namespace

std::optional<CycleEnclosure> enclose_cycle(const ComplexRational& c, const Rule& inside_by,
                                            std::size_t most_points) {
  if (const auto* by = std::get_if<AttractingDisc>(&inside_by)) return around_disc(c, *by, most_points);
  if (const auto* by = std::get_if<ClosedForm>(&inside_by)) return by->period == 1 ? fixed_point(c) : two_cycle(c);
  return std::nullopt;
}

}  // namespace merestone
