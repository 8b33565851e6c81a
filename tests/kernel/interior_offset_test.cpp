// Lemmas I1, I2 in the kernel's double precision. The truth comes from the closed forms of periods 1 and 2 (exact),
// from the cycles that MPFR finds (computed), from difference quotients of MPFR's multipliers, and from the disc in
// balls.

#include "kernel/interior_offset.hpp"

#include <cmath>

#include "catch.hpp"
#include "kernel/cover_balls.hpp"
#include "kernel/stable_parameters.hpp"
#include "reference/mpfr_jet.hpp"

using merestone::CoverInside;
using merestone::interior_offset;
using merestone::OffsetDisc;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

struct Trial {
  double x, y;
  CoverInside by;
};

// A parameter in double precision with a disc about a point of its cycle, which may or may not be attracting.
std::optional<Trial> trial(const stable::StableParameter& s, int exponent) {
  const double x = s.c.re.get_d(), y = s.c.im.get_d();
  const auto cycle = reference::find_cycle({mpq_class(x), mpq_class(y)}, s.centre, s.period, 512, 200);
  if (!cycle || !cycle->attracting || cycle->period() != s.period) return std::nullopt;
  const Complex& z = cycle->points.front();
  return Trial{x, y, {static_cast<std::uint32_t>(s.period), z.re.get_d(), z.im.get_d(), std::ldexp(1.0, exponent)}};
}

Complex exact(double x, double y) { return {mpq_class(x), mpq_class(y)}; }

}  // namespace

TEST_CASE(
    "an interior disc is covered by the inverse of the multiplier, as MPFR finds it, and agrees with the one in "
    "balls") {
  PointSource source(7401);
  std::uint64_t discs = 0, tight = 0;
  for (const stable::StableParameter& s : stable::stable_parameters(source, reference::repeats(60))) {
    for (int exponent = -45; exponent < -5; exponent += 8) {
      const auto t = trial(s, exponent);
      if (!t) continue;
      const OffsetDisc disc = interior_offset(t->x, t->y, t->by);
      if (disc.radius == 0) continue;
      const auto germ = reference::interior_germ(exact(t->x, t->y), s.period);
      if (!germ || norm(germ->a2) >= ratio(399, 100)) continue;
      ++discs;
      INFO("c = " << t->x << ", " << t->y << ", period " << s.period << ", radius 2^" << exponent << ", loss "
                  << disc.loss);
      REQUIRE(reference::covers(*germ, exact(disc.x, disc.y), mpq_class(disc.radius)));
      tight +=
          !reference::covers(*germ, exact(disc.x, disc.y), mpq_class(disc.radius) * (1 + mpq_class(4 * disc.loss)));
      const auto balls = merestone::interior_in_balls({t->x, t->y, 0x1p-30}, t->by);
      if (balls && disc.loss < 0.05) REQUIRE(merestone::agree(disc, *balls));
    }
  }
  CHECK(discs > reference::repeats(60));
  CHECK(tight * 4 > discs * 3);
}

TEST_CASE("in the components of periods 1 and 2 every point of the disc satisfies the closed form") {
  PointSource source(7402);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(400); ++k) {
    const std::uint32_t period = source.one_in(2) ? 1 : 2;
    const Complex l = ratio(source.between(0, 99), 100) * source.direction(), h = ratio(1, 2) * l;
    const Complex c = period == 1 ? h - h * h : Complex{-1, 0} + ratio(1, 4) * l;
    const double x = c.re.get_d(), y = c.im.get_d();
    const auto cycle = reference::find_cycle(exact(x, y), {0, 0}, period, 256, 3'000);
    if (!cycle || cycle->period() != period) continue;
    const CoverInside by{period, cycle->points.front().re.get_d(), cycle->points.front().im.get_d(), 0x1p-40};
    const OffsetDisc disc = interior_offset(x, y, by);
    if (disc.radius == 0) continue;
    ++discs;
    INFO("c = " << x << ", " << y << ", period " << period);
    for (const Complex& unit : reference::unit_directions()) {
      const Complex rim = exact(x, y) + exact(disc.x, disc.y) + mpq_class(disc.radius) * unit;
      const mpq_class v = rim.re - ratio(1, 4), yy = rim.im * rim.im, q = v * v + yy, w = rim.re + 1;
      if (period == 1)
        REQUIRE(q * (q + v) < yy / 4);
      else
        REQUIRE(w * w + yy < ratio(1, 16));
    }
  }
  CHECK(discs > reference::repeats(300));
}

TEST_CASE("what is no attracting cycle of that exact period gives no disc") {
  const double x = -0.125, y = 0.75;  // in the component of period 3
  const auto cycle = reference::find_cycle(exact(x, y), {0, 0}, 3, 256, 400);
  REQUIRE(cycle);
  const Complex& z = cycle->points.front();
  const CoverInside right{3, z.re.get_d(), z.im.get_d(), 0x1p-30};
  CHECK(interior_offset(x, y, right).radius > 0.01);
  CoverInside by = right;
  by.period = 6;  // a multiple
  CHECK(interior_offset(x, y, by).radius == 0);
  by.period = 1;
  CHECK(interior_offset(x, y, by).radius == 0);
  by.period = 2;
  CHECK(interior_offset(x, y, by).radius == 0);
  by = right, by.x += 0x1p-10;
  CHECK(interior_offset(x, y, by).radius == 0);
  for (const double wrong : {0.0, -0x1p-30, 1.5, 5.0, std::nan(""), HUGE_VAL}) {
    by = right, by.radius = wrong;
    CHECK(interior_offset(x, y, by).radius == 0);
  }
  by = right, by.x = std::nan("");
  CHECK(interior_offset(x, y, by).radius == 0);
  CHECK(interior_offset(0.24, 0, {1, 0.4, 0, 0x1p-30}).radius > 0.001);  // multiplier 0.8
  CHECK(interior_offset(0.24, 0, {2, 0.4, 0, 0x1p-30}).radius == 0);
  CHECK(interior_offset(0.24, 0, {3, 0.4, 0, 0x1p-30}).radius == 0);
  CHECK(interior_offset(0.3, 0, {1, 0.5, 0, 0x1p-4}).radius == 0);     // outside: 0.3 > 1/4
  CHECK(interior_offset(0.25, 0, {1, 0.5, 0, 0x1p-4}).radius == 0);    // multiplier 1
  CHECK(interior_offset(-0.75, 0, {1, -0.5, 0, 0x1p-6}).radius == 0);  // multiplier -1
}
