// The double-precision filter of Lemma I3 against the exact polynomials in GMP (computed).

#include "lanes/closed_form_filter.hpp"

#include "catch.hpp"
#include "lanes/doubles.hpp"

using namespace merestone;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;

namespace {

int side(const Complex& c, int period) {
  const mpq_class u = c.re - ratio(1, 4), y = c.im * c.im, q = u * u + y;
  if (period == 1) return cmp(mpq_class(q * (q + u)), mpq_class(y / 4));
  return cmp(mpq_class((c.re + 1) * (c.re + 1) + y), ratio(1, 16));
}

// The filter's answer holds at the centre and on the rim of the disc of the parameter's error.
ClosedFormSide check(const DoubleParameter& c) {
  const ClosedFormSide answer = closed_form_side(c);
  std::vector<Complex> directions = reference::unit_directions();
  directions.push_back({0, 0});
  for (const Complex& unit : directions) {
    const Complex sample = doubles::exact(c) + doubles::exact(c.error) * unit;
    INFO(std::hexfloat << "c = " << c.x << ", " << c.y << " +- " << c.error << ", answer " << static_cast<int>(answer));
    if (answer == ClosedFormSide::inside_period_1) REQUIRE(side(sample, 1) < 0);
    if (answer == ClosedFormSide::inside_period_2) REQUIRE(side(sample, 2) < 0);
    if (answer == ClosedFormSide::outside_both) REQUIRE((side(sample, 1) > 0 && side(sample, 2) > 0));
    if (c.error == 0) return answer;
  }
  return answer;
}

// c with the multiplier m of its cycle: on the curve when |m| = 1
Complex with_multiplier(const Complex& m, int period) {
  const Complex half{m.re / 2, m.im / 2};
  if (period == 1) return half - half * half;
  return Complex{-1, 0} + ratio(1, 4) * m;
}

}  // namespace

TEST_CASE("answers next to the curves are true") {
  reference::PointSource source(1401);
  for (std::uint64_t k = 0; k < reference::repeats(60000); ++k) {
    const mpq_class off =
        source.one_in(4) ? mpq_class(0) : mpq_class(power_of_two(source.between(-60, -30)) * source.between(-3, 3));
    const Complex c = with_multiplier((1 + off) * source.direction(), source.one_in(2) ? 1 : 2);
    check({c.re.get_d(), c.im.get_d(), 0});
  }
}

TEST_CASE("answers are true for every parameter within the error") {
  reference::PointSource source(1402);
  std::uint64_t decided = 0;
  const std::uint64_t tried = reference::repeats(6000);
  for (std::uint64_t k = 0; k < tried; ++k) {
    const double error = std::abs(doubles::any_double(source, source.between(-60, -21)));
    const mpq_class off = doubles::exact(error) * source.between(-600, 600) * 4;
    const Complex c = with_multiplier((1 + off) * source.direction(), source.one_in(2) ? 1 : 2);
    decided += check({c.re.get_d(), c.im.get_d(), error}) == ClosedFormSide::unclear ? 0 : 1;
  }
  CHECK(decided * 20 > tried);
}

TEST_CASE("answers away from the curves are given") {
  reference::PointSource source(1403);
  for (std::uint64_t k = 0; k < reference::repeats(10000); ++k) {
    const Complex typed = source.in_window(50);
    const DoubleParameter c{typed.re.get_d(), typed.im.get_d(), 0x1p-53};
    const ClosedFormSide answer = check(c);
    if (answer != ClosedFormSide::unclear) continue;
    // an undecided one must be near a curve: a neighbour within 2^-20 lies on the other side
    bool crosses = false;
    for (const int period : {1, 2})
      for (const Complex& unit : reference::unit_directions())
        crosses = crosses || side(typed + power_of_two(-20) * unit, period) != side(typed, period);
    REQUIRE(crosses);
  }
}

TEST_CASE("the special places are unclear, as they must be") {
  for (const Complex& c :
       {Complex{ratio(1, 4), 0}, Complex{ratio(-3, 4), 0}, Complex{ratio(-5, 4), 0}, Complex{-1, ratio(1, 4)},
        Complex{ratio(-17, 20), ratio(1, 5)}, Complex{ratio(37, 100), ratio(4, 25)}})
    CHECK(closed_form_side({c.re.get_d(), c.im.get_d(), 0}) == ClosedFormSide::unclear);
  CHECK(closed_form_side({0.25 - 0x1p-20, 0, 0}) == ClosedFormSide::inside_period_1);
  CHECK(closed_form_side({0, 0, 0}) == ClosedFormSide::inside_period_1);
  CHECK(closed_form_side({-1, 0, 0}) == ClosedFormSide::inside_period_2);
  CHECK(closed_form_side({0.5, 0.5, 0}) == ClosedFormSide::outside_both);
}

TEST_CASE("a parameter far out, badly known or not a number is unclear") {
  const double nan = std::nan(""), infinity = std::numeric_limits<double>::infinity();
  for (const DoubleParameter& c :
       {DoubleParameter{3.5, 0, 0}, DoubleParameter{0, -3.5, 0}, DoubleParameter{0, 0, 0x1p-19},
        DoubleParameter{nan, 0, 0}, DoubleParameter{0, nan, 0}, DoubleParameter{0, 0, nan},
        DoubleParameter{-infinity, 0, 0}, DoubleParameter{0, 0, infinity}})
    CHECK(closed_form_side(c) == ClosedFormSide::unclear);
}
