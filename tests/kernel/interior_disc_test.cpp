// Lemma I2: discs in a hyperbolic component. The truth comes from the closed forms of periods 1 and 2 (exact), from the
// cycles that MPFR finds at points of the disc (computed), and from difference quotients of MPFR's multipliers.

#include <algorithm>
#include <set>

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "kernel/safe_disc.hpp"
#include "kernel/stable_parameters.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/published.hpp"

using claims::established;
using merestone::AttractingDisc;
using merestone::InteriorDisc;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

struct ExactDisc {
  Complex centre;
  mpq_class radius;
};

InteriorDisc hint(const Complex& c, std::uint64_t period, const Complex& cycle, const mpq_class& radius,
                  std::uint32_t bits) {
  return {reference::to_dyadic(c),
          AttractingDisc{period, {reference::to_dyadic(cycle), reference::to_dyadic(radius)}, bits}};
}

std::optional<ExactDisc> disc_of(const InteriorDisc& by) {
  const auto disc = merestone::enclose_interior_disc(by);
  if (!disc) return std::nullopt;
  return ExactDisc{reference::exact(disc->centre), reference::exact(disc->radius)};
}

// The widest disc proved with the attracting disc's radius between 2^-5 and 2^-110.
std::optional<ExactDisc> widest(const Complex& c, std::uint64_t period, const Complex& cycle, std::uint32_t bits) {
  std::optional<ExactDisc> best;
  for (long exponent = -5; exponent > -110; exponent -= 5) {
    auto disc = disc_of(hint(c, period, cycle, power_of_two(exponent), bits));
    if (disc && (!best || best->radius < disc->radius)) best = disc;
  }
  return best;
}

// c in the open component of period 1 or 2, by the polynomials of Lemma I3.
bool is_in_component(const Complex& c, std::uint64_t period) {
  const mpq_class u = c.re - ratio(1, 4), y = c.im * c.im, q = u * u + y, x = c.re + 1;
  return period == 1 ? q * (q + u) < y / 4 : x * x + y < ratio(1, 16);
}

Complex multiplied(const Complex& m, std::uint64_t period) {
  const Complex half = ratio(1, 2) * m;
  return period == 1 ? half - half * half : Complex{-1, 0} + ratio(1, 4) * m;
}

void require_attracting(const Complex& c, std::uint64_t period, mpfr_prec_t bits = 512) {
  INFO("c = " << c.re.get_d() << ", " << c.im.get_d() << ", period " << period);
  const auto cycle = reference::find_cycle(c, {0, 0}, period, bits, 400);
  REQUIRE(cycle);
  REQUIRE(cycle->attracting);
  REQUIRE(cycle->period() == period);
}

// A parameter of few digits in the component of s, and a dyadic near its cycle.
std::optional<stable::StableParameter> shortened(const stable::StableParameter& s) {
  const Complex c = reference::truncated(s.c, 60);
  const auto cycle = reference::find_cycle(c, s.centre, s.period, 1024, 100);
  if (!cycle || !cycle->attracting || cycle->period() != s.period) return std::nullopt;
  return stable::StableParameter{c, s.period, reference::truncated(cycle->points.front(), 150)};
}

}  // namespace

TEST_CASE("about the nuclei 0 and -1 the disc is the one found by hand") {
  // period 2: the multiplier is 4(1 + c), so f1 = 1/4 and a2 = 0: the disc about -1 of radius 1/8
  const mpq_class rounding = power_of_two(-38);
  const auto sharp = disc_of(hint({-1, 0}, 2, {0, 0}, power_of_two(-50), 128));
  REQUIRE(sharp);
  CHECK(sharp->radius < ratio(1, 8));
  CHECK(sharp->radius > ratio(1, 8) * (1 - rounding));
  CHECK(norm(sharp->centre - Complex{-1, 0}) < rounding * rounding);
  // period 1: c = l/2 - l²/4, so f1 = 1/2 and a2 = -1/2: centre -1/15, radius 4/15
  const auto first = disc_of(hint({0, 0}, 1, {0, 0}, power_of_two(-50), 128));
  REQUIRE(first);
  CHECK(first->radius < ratio(4, 15));
  CHECK(first->radius > ratio(4, 15) * (1 - rounding));
  CHECK(norm(first->centre - Complex{ratio(-1, 15), 0}) < rounding * rounding);
}

TEST_CASE("in the components of period 1 and 2 the rim fulfils the exact inequality") {
  PointSource source(1401);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(300); ++k) {
    const std::uint64_t period = source.one_in(2) ? 1 : 2;
    const mpq_class size =
        source.one_in(2) ? mpq_class(1 - power_of_two(source.between(-20, -2))) : ratio(source.between(0, 63), 64);
    const Complex c = reference::truncated(multiplied(size * source.direction(), period), 60);
    const auto cycle = reference::find_cycle(c, {0, 0}, period, 512, 1000);
    if (!cycle || !cycle->attracting) continue;
    const Complex near = reference::truncated(cycle->points.front(), 200);
    for (const long exponent : {-12L, -30L, -60L}) {
      const auto disc = disc_of(hint(c, period, near, power_of_two(exponent), source.one_in(3) ? 64 : 256));
      if (!disc) continue;
      ++discs;
      INFO("c = " << c.re << ", " << c.im << ", period " << period);
      for (const Complex& unit : reference::unit_directions())
        REQUIRE(is_in_component(disc->centre + disc->radius * unit, period));
      for (int i = 0; i < 12; ++i)
        REQUIRE(is_in_component(disc->centre + disc->radius * source.in_unit_disc(), period));
      if (period == 1) continue;
      const mpq_class room = ratio(1, 4) - disc->radius;
      REQUIRE(room > 0);
      REQUIRE(norm(disc->centre + Complex{1, 0}) < room * room);
    }
  }
  CHECK(discs > reference::repeats(300));
}

TEST_CASE("about published nuclei the disc's rim has an attracting cycle of the nucleus's period") {
  for (const reference::PublishedPoint& n : reference::nuclei()) {
    const Complex c = reference::truncated({reference::decimal(n.re), reference::decimal(n.im)}, 70);
    INFO(n.source << ": " << n.re << ", " << n.im);
    const auto cycle = reference::find_cycle(c, {0, 0}, n.period, 1024, 10);
    REQUIRE(cycle);
    const auto disc = widest(c, n.period, reference::truncated(cycle->points.front(), 150), 256);
    REQUIRE(disc);
    for (const Complex& unit : reference::unit_directions())
      require_attracting(disc->centre + disc->radius * unit, n.period);
  }
}

TEST_CASE("points of an interior disc have an attracting cycle of exactly its period") {
  PointSource source(1402);
  std::uint64_t discs = 0;
  std::set<std::uint64_t> periods;
  const auto parameters = stable::stable_parameters(source, reference::repeats(60));
  for (const stable::StableParameter& found : parameters) {
    const auto s = shortened(found);
    if (!s) continue;
    const auto disc = widest(s->c, s->period, s->centre, 256);
    if (!disc) continue;
    ++discs;
    periods.insert(s->period);
    for (const Complex& unit : reference::unit_directions())
      require_attracting(disc->centre + disc->radius * unit, s->period);
    for (int i = 0; i < 4; ++i) require_attracting(disc->centre + disc->radius * source.in_unit_disc(), s->period);
  }
  CHECK(discs * 10 > parameters.size() * 8);
  CHECK(periods.size() >= 5);
}

TEST_CASE("an interior disc is as wide as MPFR's derivatives of the multiplier allow") {
  PointSource source(1403);
  std::uint64_t discs = 0;
  for (const stable::StableParameter& found : stable::stable_parameters(source, reference::repeats(60))) {
    const auto s = shortened(found);
    if (!s) continue;
    const auto germ = reference::interior_germ(s->c, s->period);
    const auto disc = widest(s->c, s->period, s->centre, 400);
    if (!germ || !disc) continue;
    ++discs;
    INFO("c = " << s->c.re << ", " << s->c.im << ", period " << s->period);
    const mpq_class size = norm(germ->f1), almost = 1 - power_of_two(-16), r = disc->radius;
    REQUIRE(r * r > size * almost / 4);
    REQUIRE(reference::covers(*germ, disc->centre - s->c, r));
    REQUIRE_FALSE(reference::covers(*germ, disc->centre - s->c, r * (1 + power_of_two(-16))));
  }
  CHECK(discs > reference::repeats(60) / 2);
}

TEST_CASE("with wide attracting discs and few bits the disc is narrower or refused, never wrong") {
  PointSource source(1404);
  std::uint64_t discs = 0, refused = 0;
  for (const stable::StableParameter& found : stable::stable_parameters(source, reference::repeats(40))) {
    const auto s = shortened(found);
    if (!s) continue;
    const auto germ = reference::interior_germ(s->c, s->period);
    if (!germ) continue;
    for (int k = 0; k < 40; ++k) {
      const std::uint32_t bits = static_cast<std::uint32_t>(source.between(2, 80));
      const mpq_class radius = power_of_two(source.between(-40, -2));
      const auto disc = disc_of(hint(s->c, s->period, s->centre, radius, bits));
      if (!disc) ++refused;
      if (!disc) continue;
      ++discs;
      REQUIRE(reference::covers(*germ, disc->centre - s->c, disc->radius));
    }
  }
  CHECK(discs > 100);
  CHECK(refused > 100);
}

TEST_CASE("a multiple of the true period is refused, and a parameter without an attracting cycle") {
  // with 2p for p the square of the multiplier would stand for it: a disc twice as narrow, or undefined at a nucleus
  PointSource source(1405);
  for (const stable::StableParameter& found : stable::stable_parameters(source, reference::repeats(40))) {
    const auto s = shortened(found);
    if (!s) continue;
    for (const long exponent : {-6L, -12L, -30L, -60L})
      for (const std::uint64_t p : {2 * s->period, 3 * s->period, 5 * s->period, s->period + 1})
        REQUIRE_FALSE(disc_of(hint(s->c, p, s->centre, power_of_two(exponent), 256)));
  }
  for (const Complex& c :
       {Complex{ratio(1, 4), 0}, Complex{ratio(-3, 4), 0}, Complex{-2, 0}, Complex{1, 0}, Complex{0, 1}})
    for (std::uint64_t p = 1; p <= 6; ++p)
      for (const long exponent : {-2L, -10L, -40L})
        for (const Complex& at : {Complex{0, 0}, Complex{ratio(1, 2), 0}, Complex{ratio(-1, 2), 0}, Complex{2, 0}, c})
          REQUIRE_FALSE(disc_of(hint(c, p, at, power_of_two(exponent), 256)));
}

TEST_CASE("a region is inside by the rule exactly when it lies in the disc") {
  const InteriorDisc by = hint({-1, 0}, 2, {0, 0}, power_of_two(-50), 128);
  const auto disc = disc_of(by);
  REQUIRE(disc);
  const auto& [d, r] = *disc;
  const auto inside = [&](const merestone::Region& region) {
    return established(claims::claim(merestone::Inside{}, region, by));
  };
  CHECK(inside(claims::disc(d, r)));
  CHECK_FALSE(inside(claims::disc(d, r + power_of_two(-200))));
  CHECK(inside(claims::segment(d.re - r, d.re + r)) == (d.im == 0));
  CHECK(inside(claims::point({d.re, d.im + r})));
  CHECK_FALSE(inside(claims::point({d.re, d.im + r + power_of_two(-200)})));
  const merestone::Outcome result = claims::outcome(claims::claim(merestone::Inside{}, claims::disc(d, r), by));
  const auto& shown = std::get<merestone::Established>(result);
  CHECK(shown.lemmas == std::vector<std::string>{"I2", "U1", "I1", "B1"});
  REQUIRE(shown.figures.size() == 3);
  CHECK(reference::exact(*shown.figures[2].upper) == r);
}
