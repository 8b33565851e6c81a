// Lemma I2 in double precision: discs in hyperbolic components. The truth comes from the exact polynomials of periods 1
// and 2, from MPFR's cycles at points of the rim and its derivatives of the multiplier (computed), and from the kernel.

#include "lanes/interior_lane.hpp"

#include "catch.hpp"
#include "kernel/safe_disc.hpp"
#include "kernel/stable_parameters.hpp"
#include "lanes/attraction.hpp"
#include "lanes/doubles.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_jet.hpp"

using namespace merestone;
using doubles::exact;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;
using stable::StableParameter;

namespace {

struct Found {
  Complex at;
  std::uint64_t period;
  DoubleCircle cycle, disc;
};

Complex centre(const DoubleCircle& disc) { return exact(disc.x, disc.y); }

// The disc by the smallest cycle disc that double precision proves.
std::optional<Found> found_at(const StableParameter& s) {
  const double x = s.c.re.get_d(), y = s.c.im.get_d();
  for (int exponent = -46; exponent <= -4; ++exponent) {
    const DoubleCircle cycle{s.centre.re.get_d(), s.centre.im.get_d(), std::ldexp(1.0, exponent)};
    if (!proves_attraction({x, y, 0}, cycle.x, cycle.y, cycle.radius, s.period)) continue;
    const auto disc = interior_disc(x, y, cycle, s.period);
    if (!disc) return std::nullopt;
    return Found{exact(x, y), s.period, cycle, *disc};
  }
  return std::nullopt;
}

// Is c in the open component, by its polynomial?
bool is_in_component(const Complex& c, std::uint64_t period) {
  const mpq_class u = c.re - ratio(1, 4), y = c.im * c.im, q = u * u + y, x = c.re + 1;
  return period == 1 ? q * (q + u) < y / 4 : x * x + y < ratio(1, 16);
}

// c = m/2 - m²/4 has a fixed point m/2, c = m/4 - 1 a cycle of (-1 ± sqrt(-3 - 4 c))/2, both of multiplier m
// (textbook).
StableParameter with_multiplier(const Complex& m, std::uint64_t period) {
  const Complex half = ratio(1, 2) * m;
  const Complex typed = period == 1 ? half - half * half : Complex{-1, 0} + ratio(1, 4) * m;
  const Complex c{mpq_class(typed.re.get_d()), mpq_class(typed.im.get_d())};
  const auto cycle = reference::find_cycle(c, period == 1 ? half : Complex{0, 0}, period, 300, 100);
  REQUIRE(cycle);
  REQUIRE(cycle->period() == period);
  return {c, period, cycle->points.front()};
}

mpq_class share(PointSource& source) {
  return source.one_in(2) ? mpq_class(1 - power_of_two(source.between(-24, -2))) : ratio(source.between(0, 15), 16);
}

// The kernel's disc, from a cycle that is known to 200 places.
std::optional<Disc> kernel_disc(const Found& found) {
  const auto cycle = reference::find_cycle(found.at, centre(found.cycle), found.period, 600, 200);
  REQUIRE(cycle);
  const Disc start{reference::to_dyadic(reference::truncated(cycle->points.front(), 200)),
                   reference::to_dyadic(power_of_two(-90))};
  const auto disc = enclose_interior_disc({reference::to_dyadic(found.at), {found.period, start, 400}});
  if (!disc) return std::nullopt;
  return *disc;
}

}  // namespace

TEST_CASE("for periods 1 and 2 the rim is in the component, exactly") {
  PointSource source(3801);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(400); ++k) {
    const std::uint64_t period = 1 + source.below(2);
    const auto found = found_at(with_multiplier(share(source) * source.direction(), period));
    if (!found) continue;
    ++discs;
    INFO("centre " << found->at.re << ", " << found->at.im << ", period " << period);
    REQUIRE(is_in_component(centre(found->disc), period));
    for (int i = 0; i < 30; ++i)
      REQUIRE(is_in_component(centre(found->disc) + exact(found->disc.radius) * source.direction(), period));
  }
  CHECK(discs > reference::repeats(400) * 3 / 4);
}

TEST_CASE("for period 2 the disc is at least half as wide as can be") {
  // the component is the disc about -1 of radius 1/4: a concentric disc of c has the radius 1/4 - |c + 1|
  for (int step = 0; step < 32; ++step) {
    const mpq_class m = ratio(step, 32);
    const auto found = found_at(with_multiplier({m, 0}, 2));
    REQUIRE(found);
    CHECK(found->disc.radius > 0.25 * (1 - m.get_d()) * 0.499);
  }
}

TEST_CASE("rim points of a disc of a component have attracting cycles of the same period") {
  PointSource source(3802);
  std::uint64_t discs = 0, longer = 0;
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(60))) {
    const auto found = found_at(s);
    if (!found) continue;
    ++discs;
    longer += found->period > 2 ? 1 : 0;
    INFO("centre " << found->at.re << ", " << found->at.im << ", period " << found->period);
    const mpq_class almost = ratio(9999, 10'000) * exact(found->disc.radius);
    for (int i = 0; i < 4; ++i) {
      const auto cycle =
          reference::find_cycle(centre(found->disc) + almost * source.direction(), {0, 0}, found->period, 256, 400);
      REQUIRE(cycle);
      REQUIRE(cycle->attracting);
      REQUIRE(cycle->period() == found->period);
    }
  }
  CHECK(discs > reference::repeats(60) / 2);
  CHECK(longer > 20);
}

TEST_CASE("a disc of a component is covered by the inverse of the multiplier map, as MPFR's derivatives show") {
  PointSource source(3803);
  std::uint64_t discs = 0;
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(60))) {
    const auto found = found_at(s);
    if (!found) continue;
    const auto germ = reference::interior_germ(found->at, found->period);
    if (!germ || norm(germ->a2) >= ratio(399, 100)) continue;
    ++discs;
    INFO("centre " << found->at.re << ", " << found->at.im << ", period " << found->period);
    REQUIRE(reference::covers(*germ, centre(found->disc) - found->at, exact(found->disc.radius)));
  }
  CHECK(discs > reference::repeats(60) / 3);
}

TEST_CASE("a disc of a component is hardly smaller than the kernel's, and nowhere larger") {
  PointSource source(3804);
  std::uint64_t discs = 0, precise = 0;
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(150))) {
    const auto found = found_at(s);
    if (!found) continue;
    const auto kernel = kernel_disc(*found);
    if (!kernel) continue;
    ++discs;
    INFO("centre " << found->at.re << ", " << found->at.im << ", period " << found->period);
    const mpq_class radius = exact(found->disc.radius), theirs = reference::exact(kernel->radius);
    REQUIRE(radius < theirs * (1 + power_of_two(-20)));
    precise += radius > theirs * ratio(9, 10) ? 1 : 0;
  }
  CHECK(discs > reference::repeats(150) / 2);
  CHECK(precise * 10 > discs * 7);
}

TEST_CASE("a wide cycle disc gives a smaller disc, or none, and never a wrong one") {
  PointSource source(3805);
  std::uint64_t discs = 0;
  for (const int exponent : {-20, -12, -8, -6, -5, -4, -3})
    for (std::uint64_t k = 0; k < reference::repeats(20); ++k) {
      const std::uint64_t period = 1 + source.below(2);
      const StableParameter s = with_multiplier(ratio(source.between(0, 60), 64) * source.direction(), period);
      // the cycle's point is near the rim of its disc
      const double radius = std::ldexp(1.0, exponent);
      const Complex off = s.centre + mpq_class(radius * 15 / 16) * source.direction();
      const DoubleCircle cycle{off.re.get_d(), off.im.get_d(), radius};
      const auto disc = interior_disc(s.c.re.get_d(), s.c.im.get_d(), cycle, period);
      if (!disc) continue;
      ++discs;
      for (int i = 0; i < 12; ++i)
        REQUIRE(is_in_component(centre(*disc) + exact(disc->radius) * source.direction(), period));
    }
  CHECK(discs > 20);
}

TEST_CASE("no disc about a parameter whose cycle does not attract") {
  CHECK(interior_disc(-1, 0, {0, 0, 0x1p-40}, 2));
  CHECK_FALSE(interior_disc(-2, 0, {2, 0, 0x1p-40}, 1));
  CHECK_FALSE(interior_disc(0, 1, {-1, 1, 0x1p-40}, 2));
  CHECK_FALSE(interior_disc(0.25, 0, {0.5, 0, 0x1p-40}, 1));
  CHECK_FALSE(interior_disc(-0.75, 0, {-0.5, 0, 0x1p-40}, 1));
}
