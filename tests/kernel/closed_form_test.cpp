// Lemmas I3, I4 and P1: closed forms, the real segment, exact preperiodic points. The truth comes from the multiplier:
// c = m/2 - m²/4 is on the cardioid, c = -1 + m/4 on the circle of period 2, exactly when |m| = 1 (textbook, derived by
// hand).

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "reference/point_source.hpp"

using claims::disc;
using claims::established;
using claims::point;
using claims::segment;
using merestone::ClosedForm;
using merestone::Inside;
using merestone::Member;
using merestone::Outside;
using merestone::Preperiodic;
using merestone::RealSegment;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;

namespace {

bool inside(const merestone::Region& region, std::uint32_t period) {
  return established(claims::claim(Inside{}, region, ClosedForm{period}));
}
bool member(const merestone::Region& region, std::uint32_t period) {
  return established(claims::claim(Member{}, region, ClosedForm{period}));
}
bool real_member(const merestone::Region& region) {
  return established(claims::claim(Member{}, region, RealSegment{}));
}
bool real_outside(const merestone::Region& region) {
  return established(claims::claim(Outside{}, region, RealSegment{}));
}
bool preperiodic(const merestone::Region& region, std::uint32_t preperiod, std::uint32_t period) {
  return established(claims::claim(Member{}, region, Preperiodic{preperiod, period}));
}

Complex with_multiplier(const Complex& m, std::uint32_t period) {
  const Complex half{m.re / 2, m.im / 2};
  if (period == 1) return half - half * half;
  return Complex{-1, 0} + ratio(1, 4) * m;
}

// -1 inside, 0 on the curve, 1 outside of the closed component; by the polynomials of the lemma
int side(const Complex& c, std::uint32_t period) {
  const mpq_class u = c.re - ratio(1, 4), y = c.im * c.im, q = u * u + y;
  if (period == 1) return cmp(mpq_class(q * (q + u)), mpq_class(y / 4));
  return cmp(mpq_class((c.re + 1) * (c.re + 1) + y), ratio(1, 16));
}

}  // namespace

TEST_CASE("closed forms agree with the multiplier on the curve and to both sides of it") {
  reference::PointSource source(801);
  for (std::uint64_t k = 0; k < reference::repeats(1500); ++k)
    for (const std::uint32_t period : {1U, 2U}) {
      const Complex unit = source.direction();
      const Complex on = with_multiplier(unit, period);
      INFO("period " << period << ", c = " << on.re << ", " << on.im);
      REQUIRE_FALSE(inside(point(on), period));
      REQUIRE(member(point(on), period));
      const mpq_class e = power_of_two(source.between(-300, -1));
      const Complex smaller = with_multiplier((1 - e) * unit, period);
      REQUIRE(inside(point(smaller), period));
      REQUIRE(member(point(smaller), period));
      const Complex greater = (1 + e) * unit;
      // two multipliers, m and 2 - m, belong to the same c of the cardioid's map
      if (period == 1 && norm(Complex{2, 0} - greater) <= 1) continue;
      REQUIRE_FALSE(inside(point(with_multiplier(greater, period)), period));
      REQUIRE_FALSE(member(point(with_multiplier(greater, period)), period));
    }
}

TEST_CASE("closed forms at the points that people ask about") {
  CHECK_FALSE(inside(point({ratio(1, 4), 0}), 1));
  CHECK(member(point({ratio(1, 4), 0}), 1));
  for (const std::uint32_t period : {1U, 2U}) {
    CHECK_FALSE(inside(point({ratio(-3, 4), 0}), period));
    CHECK(member(point({ratio(-3, 4), 0}), period));
  }
  CHECK(member(point({ratio(-17, 20), ratio(1, 5)}), 2));
  CHECK_FALSE(inside(point({ratio(-17, 20), ratio(1, 5)}), 2));
  CHECK(member(point({ratio(37, 100), ratio(4, 25)}), 1));
  CHECK_FALSE(inside(point({ratio(37, 100), ratio(4, 25)}), 1));
  CHECK(inside(point({0, 0}), 1));
  CHECK(inside(point({-1, 0}), 2));
  CHECK_FALSE(inside(point({-1, 0}), 1));
  CHECK_FALSE(inside(point({0, 0}), 2));
  CHECK_FALSE(member(point({ratio(-5, 4) - power_of_two(-400), 0}), 2));
  CHECK_FALSE(member(point({ratio(1, 4) + power_of_two(-400), 0}), 1));
  CHECK(inside(point({ratio(1, 4) - power_of_two(-400), 0}), 1));
  CHECK(inside(point({ratio(1, 4), power_of_two(-400)}), 1));  // beside the cusp, which points to the right
}

TEST_CASE("closed forms over a region hold at every sample of it") {
  reference::PointSource source(802);
  std::uint64_t accepted = 0;
  for (std::uint64_t k = 0; k < reference::repeats(800); ++k) {
    const Complex centre = reference::truncated(source.biased(), 200);
    const mpq_class radius = source.dyadic(3, source.one_in(3) ? source.between(-300, -60) : source.between(-20, -1));
    const std::uint32_t period = source.one_in(2) ? 1 : 2;
    const bool real = source.one_in(4);
    const auto region = real ? segment(centre.re - radius, centre.re + radius) : disc(centre, radius);
    const bool is_inside = inside(region, period), is_member = member(region, period);
    REQUIRE((!is_inside || is_member));
    if (!is_member) continue;
    ++accepted;
    for (const Complex& unit : reference::unit_directions()) {
      const Complex c = real ? Complex{centre.re + radius * unit.re, 0} : centre + radius * unit;
      INFO("period " << period << ", c = " << c.re << ", " << c.im);
      REQUIRE(side(c, period) <= (is_inside ? -1 : 0));
    }
  }
  CHECK(accepted > reference::repeats(800) / 10);
}

TEST_CASE("closed forms reject a region about a point of the curve") {
  for (long exponent = -2; exponent >= -300; exponent -= exponent > -12 ? 2 : 70) {
    const mpq_class r = power_of_two(exponent);
    for (const Complex& c : {Complex{ratio(1, 4), 0}, Complex{ratio(-3, 4), 0}, Complex{ratio(-5, 4), 0},
                             Complex{-1, ratio(1, 4)}, Complex{ratio(1, 4), ratio(1, 2)}})
      for (const std::uint32_t period : {1U, 2U}) {
        REQUIRE_FALSE(member(disc(c, r), period));
        if (c.im == 0 && !(c.re == ratio(-3, 4))) REQUIRE_FALSE(member(segment(c.re - r, c.re + r), period));
      }
    REQUIRE_FALSE(member(segment(ratio(-3, 4) - r, ratio(-3, 4) + r), 1));
    REQUIRE_FALSE(inside(segment(ratio(-3, 4) - r, ratio(-3, 4) + r), 2));
    REQUIRE_FALSE(inside(segment(ratio(-5, 4), -1), 2));
    REQUIRE_FALSE(inside(segment(0, ratio(1, 4)), 1));
  }
  CHECK(member(segment(ratio(-5, 4), ratio(-3, 4)), 2));
  CHECK(inside(segment(ratio(-5, 4) + power_of_two(-300), ratio(-3, 4) - power_of_two(-300)), 2));
  CHECK(inside(disc({-1, 0}, ratio(15, 64)), 2));
  CHECK_FALSE(inside(disc({-1, 0}, ratio(1, 4)), 2));
  CHECK(inside(disc({ratio(-1, 16), 0}, ratio(1, 16)), 1));
}

TEST_CASE("the real segment is [-2, 1/4], its ends included") {
  const mpq_class least = power_of_two(-400);
  for (const mpq_class& x :
       {mpq_class(-2), ratio(1, 4), mpq_class(-2 + least), mpq_class(ratio(1, 4) - least), ratio(-7, 5)}) {
    CHECK(real_member(point({x, 0})));
    CHECK_FALSE(real_outside(point({x, 0})));
  }
  for (const mpq_class& x : {mpq_class(-2 - least), mpq_class(ratio(1, 4) + least), mpq_class(7), mpq_class(-1000)}) {
    CHECK_FALSE(real_member(point({x, 0})));
    CHECK(real_outside(point({x, 0})));
  }
  CHECK(real_member(segment(-2, ratio(1, 4))));
  CHECK_FALSE(real_member(segment(-2 - least, ratio(1, 4))));
  CHECK_FALSE(real_member(segment(-2, ratio(1, 4) + least)));
  CHECK_FALSE(real_outside(segment(-3, -2)));
  CHECK_FALSE(real_outside(segment(ratio(1, 4), 3)));
  CHECK_FALSE(real_outside(segment(-3, 3)));
  CHECK(real_outside(segment(-3, -2 - least)));
  CHECK(real_outside(segment(ratio(1, 4) + least, 3)));
}

TEST_CASE("the real segment says nothing off the axis") {
  const mpq_class least = power_of_two(-400);
  for (const mpq_class& y : {least, mpq_class(-least), mpq_class(1)})
    for (const mpq_class& x : {mpq_class(-1), mpq_class(0), mpq_class(5), mpq_class(-5)}) {
      CHECK_FALSE(real_member(point({x, y})));
      CHECK_FALSE(real_outside(point({x, y})));
    }
  CHECK_FALSE(real_member(disc({-1, 0}, least)));
  CHECK_FALSE(real_outside(disc({5, 0}, least)));
  CHECK_FALSE(real_member(disc({-1, least}, least)));
  CHECK_FALSE(real_member(disc({-1, -least}, least)));
  CHECK_FALSE(real_outside(disc({5, least}, least)));
  CHECK_FALSE(real_outside(disc({5, -least}, least)));
}

TEST_CASE("preperiodic accepts exactly the equalities that hold") {
  // orbits by hand: 0; -1, 0; -2, 2, 2; i, -1+i, -i, -1+i
  struct Orbit {
    Complex c;
    std::uint32_t preperiod, period;
  };
  static const std::vector<Orbit> orbits = {
      {{0, 0}, 0, 1}, {{-1, 0}, 0, 2}, {{-2, 0}, 2, 1}, {{0, 1}, 2, 2}, {{0, -1}, 2, 2}};
  for (const Orbit& o : orbits)
    for (std::uint32_t k = 0; k <= 6; ++k)
      for (std::uint32_t p = 1; p <= 8; ++p) {
        INFO("c = " << o.c.re << ", " << o.c.im << ", preperiod " << k << ", period " << p);
        CHECK(preperiodic(point(o.c), k, p) == (k >= o.preperiod && p % o.period == 0));
      }
}

TEST_CASE("preperiodic rejects every other parameter and every region that is not a point") {
  for (const Complex& c : {Complex{1, 0}, Complex{2, 0}, Complex{ratio(1, 4), 0}, Complex{ratio(-3, 4), 0},
                           Complex{0, 2}, Complex{-1, 1}, Complex{0, ratio(1, 2)}, Complex{-2 + power_of_two(-300), 0},
                           Complex{power_of_two(-300), 1}, Complex{-1000000, 1000000}})
    for (std::uint32_t k = 0; k <= 4; ++k)
      for (std::uint32_t p = 1; p <= 4; ++p) CHECK_FALSE(preperiodic(point(c), k, p));
  CHECK_FALSE(preperiodic(disc({0, 1}, power_of_two(-300)), 2, 2));
  CHECK_FALSE(preperiodic(segment(-2, -2 + power_of_two(-300)), 2, 1));
}

TEST_CASE("the lemmas are named") {
  const auto lemmas = [](const merestone::Claim& c) {
    return std::get<merestone::Established>(claims::outcome(c)).lemmas;
  };
  CHECK(lemmas(claims::claim(Inside{}, point({0, 0}), ClosedForm{1})) == std::vector<std::string>{"I3"});
  CHECK(lemmas(claims::claim(Member{}, point({ratio(-3, 2), 0}), RealSegment{})) == std::vector<std::string>{"I4"});
  CHECK(lemmas(claims::claim(Member{}, point({0, 1}), Preperiodic{2, 2})) == std::vector<std::string>{"P1"});
}
