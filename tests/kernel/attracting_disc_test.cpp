// Lemma I1: an attracting cycle of exactly the claimed period. The truth comes from Newton's method in MPFR at 1024
// bits (computed) at samples of the region, its rim among them, and from the exact bifurcation points of M.

#include <algorithm>

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "kernel/orbit_enclosure.hpp"
#include "kernel/stable_parameters.hpp"

using claims::disc;
using claims::established;
using claims::inside;
using claims::point;
using claims::segment;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;
using stable::StableParameter;

namespace {

// c has an attracting cycle of exactly this period, and it visits the disc.
void confirm(const Complex& c, std::uint64_t period, const Complex& centre, const mpq_class& radius) {
  INFO("c = " << c.re.get_d() << ", " << c.im.get_d() << "; period " << period << "; disc about " << centre.re.get_d()
              << ", " << centre.im.get_d() << " of radius " << radius.get_d());
  const auto cycle = reference::find_cycle(c, centre, period);
  REQUIRE(cycle);
  REQUIRE(cycle->attracting);
  REQUIRE(cycle->period() == period);
  REQUIRE(norm(cycle->points.front() - centre) < radius * radius);
}

// The widest of a few radii with which the rule accepts the point, 0 when there is none.
mpq_class accepted_radius(const StableParameter& s, std::uint32_t bits) {
  for (long exponent = -1; exponent > -40; --exponent)
    if (established(inside(point(s.c), s.period, s.centre, power_of_two(exponent), bits)))
      return power_of_two(exponent);
  return 0;
}

}  // namespace

TEST_CASE("attracting disc accepts what hand computation shows") {
  CHECK(established(inside(point({0, 0}), 1, {0, 0}, ratio(1, 2), 64)));
  CHECK(established(inside(point({-1, 0}), 2, {0, 0}, ratio(1, 8), 64)));  // 0 -> -1 -> 0, f^2 has derivative 0 there
  CHECK(established(inside(point({-1, 0}), 2, {-1, 0}, ratio(1, 8), 64)));
  CHECK(established(inside(disc({-1, 0}, ratio(1, 64)), 2, {0, 0}, ratio(1, 8), 64)));
  CHECK(established(inside(segment(ratio(-1, 8), ratio(1, 8)), 1, {0, 0}, ratio(1, 4), 64)));
  CHECK(established(inside(point({ratio(-1, 2), 0}), 1, {ratio(-47, 128), 0}, ratio(1, 16), 64)));
}

TEST_CASE("attracting disc rejects a period too long or too short") {
  for (long exponent = -1; exponent >= -60; --exponent) {
    const mpq_class r = power_of_two(exponent);
    for (const std::uint64_t p : {2, 3, 4, 5, 6, 7, 12, 35})
      REQUIRE_FALSE(established(inside(point({0, 0}), p, {0, 0}, r, 128)));
    for (const std::uint64_t p : {1, 3, 4, 6, 8, 10, 14}) {
      REQUIRE_FALSE(established(inside(point({-1, 0}), p, {0, 0}, r, 128)));
      REQUIRE_FALSE(established(inside(point({-1, 0}), p, {-1, 0}, r, 128)));
    }
  }
}

TEST_CASE("attracting disc rejects a longer period although the disc's centre is left by its image") {
  // f(D) misses the centre of D and f^2(D) lies inside D, but the cycle is the fixed point 0, which f(D) and D share
  CHECK_FALSE(established(inside(point({0, 0}), 2, {ratio(1, 8), 0}, ratio(9, 64), 64)));
}

TEST_CASE("attracting disc rejects the cusp, where the image touches the disc's rim") {
  // |z^2 + 1/4| <= 1/2 for |z| <= 1/2, with equality at the parabolic fixed point 1/2
  for (const std::uint32_t bits : {2U, 64U, 400U}) {
    CHECK_FALSE(established(inside(point({ratio(1, 4), 0}), 1, {0, 0}, ratio(1, 2), bits)));
    CHECK_FALSE(established(inside(disc({ratio(3, 16), 0}, ratio(1, 16)), 1, {0, 0}, ratio(1, 2), bits)));
  }
  CHECK(established(inside(disc({ratio(3, 16), 0}, ratio(63, 1024)), 1, {0, 0}, ratio(1, 2), 64)));
  CHECK(established(inside(point({ratio(1, 4) - power_of_two(-20), 0}), 1, {0, 0}, ratio(1, 2), 64)));
}

TEST_CASE("attracting disc requires the interior: an image that reaches exactly the rim is refused") {
  // the radius that equals the computed reach of the image is a fixed point of radius -> reach
  const auto reach = [](const mpq_class& radius) -> mpq_class {
    const merestone::Disc start{{merestone::Dyadic(0.0625), merestone::Dyadic()}, reference::to_dyadic(radius)};
    merestone::OrbitEnclosure orbit(claims::point({0, 0}), start, 64);
    REQUIRE(orbit.step());
    const merestone::DiscEnclosure range = orbit.range();
    return ratio(1, 16) - reference::exact(range.re) + reference::exact(range.radius);
  };
  mpq_class radius = ratio(1, 8);
  for (int k = 0; k < 1000 && reach(radius) != radius; ++k) radius = reach(radius);
  REQUIRE(reach(radius) == radius);
  CHECK_FALSE(established(inside(point({0, 0}), 1, {ratio(1, 16), 0}, radius, 64)));
  CHECK(established(inside(point({0, 0}), 1, {ratio(1, 16), 0}, radius * (1 + power_of_two(-20)), 64)));
}

TEST_CASE("attracting disc rejects every parameter without an attracting cycle") {
  reference::PointSource source(701);
  for (const Complex& c : {Complex{ratio(1, 4), 0}, Complex{ratio(-3, 4), 0}, Complex{ratio(-5, 4), 0}, Complex{-2, 0},
                           Complex{0, 1}, Complex{ratio(-17, 20), ratio(1, 5)}, Complex{ratio(37, 100), ratio(4, 25)}})
    for (std::uint64_t k = 0; k < reference::repeats(400); ++k) {
      const Complex centre = reference::truncated(reference::iterate({0, 0}, c, source.below(9)), 60);
      const mpq_class radius = source.dyadic(3, source.between(-30, 0));
      REQUIRE_FALSE(established(inside(point(c), source.below(6) + 1, centre, radius, 128)));
    }
}

TEST_CASE("attracting disc accepts stable parameters of many periods and refuses altered hints") {
  reference::PointSource source(702);
  std::uint64_t accepted = 0;
  std::vector<std::uint64_t> periods;
  const auto parameters = stable::stable_parameters(source, reference::repeats(150));
  for (const StableParameter& s : parameters) {
    const mpq_class radius = accepted_radius(s, 128);
    if (radius == 0) continue;
    ++accepted;
    periods.push_back(s.period);
    confirm(s.c, s.period, s.centre, radius);
    for (const std::uint64_t p : {s.period * 2, s.period * 3, s.period + 1, s.period > 1 ? s.period - 1 : 5})
      REQUIRE_FALSE(established(inside(point(s.c), p, s.centre, radius, 128)));
    const Complex moved{s.centre.re + 2 * radius, s.centre.im};
    REQUIRE_FALSE(established(inside(point(s.c), s.period, moved, radius, 128)));
    REQUIRE_FALSE(established(inside(point(s.c), s.period, s.centre, 8, 128)));
    REQUIRE_FALSE(established(inside(disc(reference::truncated(s.c, 60), 1), s.period, s.centre, radius, 128)));
  }
  CHECK(accepted * 10 > parameters.size() * 8);
  std::sort(periods.begin(), periods.end());
  CHECK(std::unique(periods.begin(), periods.end()) - periods.begin() >= 5);
}

TEST_CASE("the largest region that attracting disc accepts is true on its rim and not far from the largest true one") {
  reference::PointSource source(703);
  std::uint64_t tried = 0, sharp = 0;
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(60))) {
    const mpq_class radius = accepted_radius(s, 128);
    const Complex c0 = reference::truncated(s.c, 60);
    if (radius == 0) continue;
    const auto accepts = [&](const mpq_class& r) {
      return established(inside(disc(c0, r), s.period, s.centre, radius, 128));
    };
    const mpq_class region = claims::largest(-80, 1, accepts);
    if (region == 0) continue;
    ++tried;
    for (const Complex& unit : reference::unit_directions()) confirm(c0 + region * unit, s.period, s.centre, radius);
    for (int k = 0; k < 4; ++k) confirm(c0 + region * source.in_unit_disc(), s.period, s.centre, radius);
    for (const Complex& unit : reference::unit_directions()) {
      const auto cycle = reference::find_cycle(c0 + 4 * region * unit, s.centre, s.period, 256);
      if (cycle && cycle->attracting && norm(cycle->points.front() - s.centre) < radius * radius) continue;
      ++sharp;
      break;
    }
  }
  CHECK(tried > 30);
  CHECK(sharp * 2 > tried);
}

TEST_CASE("attracting disc accepts no region that reaches a bifurcation point") {
  // c0 at distance s from the point: every disc of radius s or more contains it
  struct Approach {
    Complex point;
    Complex from;  // unit direction in which c0 lies
    std::uint64_t period;
    long farthest, closest;  // exponents of s
  };
  static const std::vector<Approach> approaches = {
      {{ratio(1, 4), 0}, {-1, 0}, 1, -5, -20},  {{ratio(-3, 4), 0}, {1, 0}, 1, -5, -14},
      {{ratio(-3, 4), 0}, {-1, 0}, 2, -5, -14}, {{ratio(-5, 4), 0}, {1, 0}, 2, -5, -14},
      {{ratio(-5, 4), 0}, {-1, 0}, 4, -5, -12}, {{ratio(-7, 4), 0}, {-1, 0}, 3, -8, -16}};
  for (const Approach& a : approaches)
    for (long exponent = a.farthest; exponent >= a.closest; --exponent) {
      const mpq_class s = power_of_two(exponent);
      const Complex c0 = a.point + s * a.from;
      const auto cycle = reference::find_cycle(c0, {0, 0}, a.period, 512, 20000);
      REQUIRE(cycle);
      REQUIRE(cycle->attracting);
      mpq_class best = 0;
      for (long size = -1; size >= -20; --size) {
        const Complex centre = reference::truncated(cycle->points.front(), 100);
        const auto accepts = [&](const mpq_class& r) {
          return established(inside(disc(c0, r), a.period, centre, power_of_two(size), 256));
        };
        REQUIRE_FALSE(accepts(s));
        best = std::max(best, claims::largest(-60, 0, accepts));
      }
      INFO("s = 2^" << exponent << ", period " << a.period);
      CHECK(best < s);
      CHECK(best > 0);
    }
}

TEST_CASE("attracting disc never establishes what a sample of the region refutes") {
  static const std::vector<std::uint32_t> precisions = {2, 8, 30, 53, 64, 128, 400};
  reference::PointSource source(704);
  std::uint64_t accepted = 0, tried = 0;
  const auto parameters = stable::stable_parameters(source, 60);
  for (std::uint64_t k = 0; k < reference::repeats(3000); ++k) {
    const StableParameter& s = source.pick(parameters);
    const Complex c0 = reference::truncated(s.c, 60);
    const std::uint64_t period = source.one_in(3) ? source.below(3 * s.period) + 1 : s.period;
    const mpq_class radius = source.dyadic(3, source.between(-25, -2));
    const Complex centre =
        source.one_in(3) ? reference::truncated(s.centre + radius * source.in_unit_disc(), 80) : s.centre;
    const mpq_class spread = source.one_in(3) ? mpq_class(0) : source.dyadic(3, source.between(-40, -4));
    ++tried;
    const merestone::Region region = spread == 0 ? point(c0) : disc(c0, spread);
    if (!established(inside(region, period, centre, radius, source.pick(precisions)))) continue;
    ++accepted;
    confirm(c0 + spread * source.in_unit_disc(), period, centre, radius);
  }
  CHECK(accepted * 20 > tried);
}

TEST_CASE("the figures of attracting disc hold for samples") {
  reference::PointSource source(705);
  for (const StableParameter& s : stable::stable_parameters(source, reference::repeats(40))) {
    const mpq_class radius = accepted_radius(s, 128);
    if (radius == 0) continue;
    const merestone::Outcome result = claims::outcome(inside(point(s.c), s.period, s.centre, radius, 128));
    const auto* shown = std::get_if<merestone::Established>(&result);
    REQUIRE(shown != nullptr);
    REQUIRE(shown->figures.size() == 4);
    REQUIRE(shown->lemmas == std::vector<std::string>{"I1", "E2"});
    REQUIRE(reference::exact(*shown->figures[0].lower) == mpq_class(static_cast<unsigned long>(s.period)));
    REQUIRE(reference::exact(*shown->figures[1].upper) == radius);
    const mpq_class reach = reference::exact(*shown->figures[2].upper),
                    most = reference::exact(*shown->figures[3].upper);
    REQUIRE(reach < radius);
    for (const Complex& unit : reference::unit_directions()) {
      reference::MpfrOrbit orbit(s.c, s.centre + radius * unit, 800);
      for (std::uint64_t n = 0; n < s.period; ++n) orbit.step();
      REQUIRE(norm(orbit.z().exact() - s.centre) <= reach * reach);
    }
    REQUIRE(norm(reference::find_cycle(s.c, s.centre, s.period)->multiplier) <= most * most);
  }
}

TEST_CASE("the figure of the multiplier is the product of twice the moduli") {
  // over D(1/2, r) at c = 1/4 - 2^-10 the derivative 2z reaches 1 + 2r: a bound without the disc's radius would be
  // below
  const mpq_class s = power_of_two(-10), r = power_of_two(-6);
  const Complex centre{ratio(1, 2) - power_of_two(-5), 0};
  const merestone::Outcome result = claims::outcome(inside(point({ratio(1, 4) - s, 0}), 1, centre, r, 64));
  const auto* shown = std::get_if<merestone::Established>(&result);
  REQUIRE(shown != nullptr);
  CHECK(reference::exact(*shown->figures[3].upper) >= 2 * (centre.re + r));
  CHECK(reference::exact(*shown->figures[3].upper) < 2 * (centre.re + r) * (1 + power_of_two(-20)));
}

TEST_CASE("a refusal of attracting disc names what failed") {
  CHECK(claims::refusal(inside(point({0, 0}), 2, {0, 0}, ratio(1, 4), 64)).find("the period may be shorter than 2") !=
        std::string::npos);
  CHECK(claims::refusal(inside(point({-2, 0}), 1, {2, 0}, ratio(1, 4), 64)).find("interior of the disc") !=
        std::string::npos);
  CHECK(claims::refusal(inside(point({-2, 0}), 9, {2, 0}, ratio(1, 2), 64)).find("wider than 1") != std::string::npos);
}
