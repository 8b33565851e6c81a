// Comparisons and bounds of discs against exact rational arithmetic in GMP (computed).

#include "catch.hpp"
#include "kernel/disc_samples.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;
using reference::midpoint;
using reference::power_of_two;
using reference::ratio;

namespace {

// Exactly, of the closed disc: the least modulus exceeds the bound; the greatest one is at most, or below, the bound.
bool truly_beyond(const DiscEnclosure& z, const mpq_class& bound) {
  const mpq_class reach = bound + exact(z.radius);
  return norm(midpoint(z)) > reach * reach;
}
bool truly_within(const DiscEnclosure& z, const mpq_class& bound) {
  const mpq_class room = bound - exact(z.radius);
  return room >= 0 && norm(midpoint(z)) <= room * room;
}
bool truly_inside(const DiscEnclosure& z, const mpq_class& bound) {
  const mpq_class room = bound - exact(z.radius);
  return room > 0 && norm(midpoint(z)) < room * room;
}

// Every proof is true, and what is true by a relative margin of 2^-40 is proved.
void check_comparisons(const DiscEnclosure& z, const mpq_class& bound) {
  const Dyadic b = reference::to_dyadic(bound);
  INFO("midpoint " << midpoint(z).re << ", " << midpoint(z).im << " radius " << exact(z.radius) << " bound " << bound);
  const mpq_class less = bound * (1 - power_of_two(-40)), more = bound + (bound + exact(z.radius)) * power_of_two(-40);
  if (bound >= 0) {
    if (certainly_beyond(z, b)) REQUIRE(truly_beyond(z, bound));
    if (truly_beyond(z, more)) REQUIRE(certainly_beyond(z, b));
  }
  if (certainly_within(z, b)) REQUIRE(truly_within(z, bound));
  if (certainly_inside(z, b)) REQUIRE(truly_inside(z, bound));
  if (bound > 0 && truly_within(z, less)) {
    REQUIRE(certainly_within(z, b));
    REQUIRE(certainly_inside(z, b));
  }
}

DiscEnclosure disc(const mpq_class& re, const mpq_class& im, const mpq_class& radius) {
  DiscEnclosure z;
  samples::set_arf(z.re, re);
  samples::set_arf(z.im, im);
  z.radius = reference::to_mag(radius);
  return z;
}

}  // namespace

TEST_CASE("comparisons of random discs with random bounds are true") {
  reference::PointSource source(201);
  for (std::uint64_t k = 0; k < reference::repeats(20000); ++k) {
    const DiscEnclosure z = samples::any_disc(source);
    const mpq_class bound = source.any_dyadic();
    check_comparisons(z, abs(bound));
    check_comparisons(z, -abs(bound));
  }
}

TEST_CASE("comparisons with a bound that differs from the modulus by the last of very many bits are true") {
  // bounds of 70 to 500 bits next to the square root of a sum of two squares, and the radius that bridges the gap
  reference::PointSource source(202);
  for (std::uint64_t k = 0; k < reference::repeats(6000); ++k) {
    const mpq_class re = source.between(0, 40), im = source.between(1, 40);
    const unsigned long places = static_cast<unsigned long>(source.between(66, 500));
    const mpq_class below = reference::sqrt_down(re * re + im * im, places),
                    step = power_of_two(-static_cast<long>(places));
    for (const mpq_class& radius : {mpq_class(0), step, mpq_class(2 * step), mpq_class(power_of_two(-64)), ratio(1, 4)})
      for (const long offset : {-1, 0, 1, 2})
        for (const mpq_class& edge : {mpq_class(below + radius), mpq_class(below - radius)})
          check_comparisons(disc(re, im, radius), edge + offset * step);
  }
}

TEST_CASE("a part too small for the working precision still counts") {
  const DiscEnclosure just_beyond = disc(2, power_of_two(-200), 0);
  CHECK_FALSE(certainly_within(just_beyond, Dyadic(2.0)));
  CHECK_FALSE(certainly_inside(just_beyond, Dyadic(2.0)));
  const DiscEnclosure just_wider = disc(2, 0, power_of_two(-200));
  CHECK_FALSE(certainly_within(just_wider, Dyadic(2.0)));
  CHECK_FALSE(certainly_beyond(just_wider, Dyadic(2.0)));
}

TEST_CASE("ties are decided exactly") {
  // 3-4-5 triangles: |mid| = 5 scale, exactly
  for (const long exponent : {-300, -1, 0, 50}) {
    const mpq_class scale = power_of_two(exponent);
    for (const mpq_class& r : {mpq_class(0), mpq_class(scale), mpq_class(2 * scale)}) {
      const DiscEnclosure z = disc(3 * scale, -4 * scale, r);
      const mpq_class nearest = 5 * scale - r, farthest = 5 * scale + r, bit = scale * power_of_two(-20);
      CHECK_FALSE(certainly_beyond(z, reference::to_dyadic(nearest)));
      CHECK(certainly_beyond(z, reference::to_dyadic(nearest - bit)));
      CHECK(certainly_within(z, reference::to_dyadic(farthest)));
      CHECK_FALSE(certainly_inside(z, reference::to_dyadic(farthest)));
      CHECK(certainly_inside(z, reference::to_dyadic(farthest + bit)));
      CHECK_FALSE(certainly_within(z, reference::to_dyadic(farthest - bit)));
    }
  }
  CHECK_FALSE(certainly_beyond(disc(0, 0, 0), Dyadic()));
  CHECK(certainly_within(disc(0, 0, 0), Dyadic()));
  CHECK_FALSE(certainly_inside(disc(0, 0, 0), Dyadic()));
}

TEST_CASE("a disc that holds zero is beyond nothing, and nothing is within a negative bound") {
  CHECK_FALSE(certainly_beyond(disc(1, 0, 1), Dyadic()));
  CHECK_FALSE(certainly_beyond(disc(1, 0, 2), Dyadic()));
  CHECK_FALSE(certainly_within(disc(0, 0, 0), Dyadic(-1.0)));
  CHECK_FALSE(certainly_within(disc(3, 0, 0), Dyadic(-3.0)));
  CHECK_FALSE(certainly_within(disc(0, 0, 5), Dyadic(2.0)));
  CHECK_FALSE(certainly_within(disc(1, 0, 5), Dyadic(2.0)));
}

TEST_CASE("bounds of the modulus and of the parts hold and are tight") {
  reference::PointSource source(203);
  for (std::uint64_t k = 0; k < reference::repeats(6000); ++k) {
    const DiscEnclosure z = samples::any_disc(source);
    const mpq_class r = exact(z.radius), size = norm(midpoint(z));
    const mpq_class lower = exact(modulus_lower_bound(z)), upper = exact(modulus_upper_bound(z));
    INFO("midpoint " << midpoint(z).re << ", " << midpoint(z).im << " radius " << r);
    REQUIRE(lower >= 0);
    if (lower > 0) REQUIRE((lower + r) * (lower + r) <= size);
    REQUIRE(upper >= r);
    REQUIRE((upper - r) * (upper - r) >= size);
    const mpq_class slack = upper * power_of_two(-60);
    REQUIRE(size <= (lower + r + slack) * (lower + r + slack));
    if (upper - r - slack > 0) REQUIRE(size >= (upper - r - slack) * (upper - r - slack));
    const Bounds re = re_bounds(z), im = im_bounds(z);
    REQUIRE(exact(re.lower) <= exact(z.re) - r);
    REQUIRE(exact(re.upper) >= exact(z.re) + r);
    REQUIRE(exact(im.lower) <= exact(z.im) - r);
    REQUIRE(exact(im.upper) >= exact(z.im) + r);
    REQUIRE(exact(im.upper) - exact(im.lower) <= 2 * r + upper * power_of_two(-60));
    REQUIRE(exact(re.upper) - exact(re.lower) <= 2 * r + upper * power_of_two(-60));
  }
}

TEST_CASE("upper moduli are upper") {
  reference::PointSource source(204);
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const DiscEnclosure z = samples::any_disc(source);
    Mag middle, most;
    midpoint_modulus_upper(middle, z);
    modulus_upper(most, z);
    REQUIRE(exact(middle) * exact(middle) >= norm(midpoint(z)));
    const mpq_class room = exact(most) - exact(z.radius);
    REQUIRE(room >= 0);
    REQUIRE(room * room >= norm(midpoint(z)));
  }
}

TEST_CASE("enclosures of exact numbers hold them") {
  reference::PointSource source(205);
  for (std::uint64_t k = 0; k < reference::repeats(4000); ++k) {
    const slong bits = samples::any_bits(source);
    const Complex z = source.biased();
    REQUIRE(reference::holds(DiscEnclosure::of(reference::to_rational(z), bits), z));
    const ComplexDyadic centre{reference::to_dyadic(source.any_dyadic()), reference::to_dyadic(source.any_dyadic())};
    const mpq_class radius = abs(source.any_dyadic());
    const DiscEnclosure disc = DiscEnclosure::of(Disc{centre, reference::to_dyadic(radius)}, bits);
    for (const Complex& unit : reference::unit_directions())
      REQUIRE(reference::holds(disc, exact(centre) + radius * unit));
  }
}

TEST_CASE("an exact number that fits the precision is enclosed exactly") {
  CHECK(DiscEnclosure::of(ComplexRational{Rational(-3, 4), Rational(1, 8)}, 2).is_exact());
  CHECK(DiscEnclosure::of(Disc{{Dyadic(0.75), Dyadic(-0.5)}, Dyadic()}, 2).is_exact());
  CHECK_FALSE(DiscEnclosure::of(ComplexRational{Rational(1, 3), Rational(0)}, 64).is_exact());
  CHECK_FALSE(DiscEnclosure::of(Disc{{Dyadic(0.625), Dyadic()}, Dyadic()}, 2).is_exact());
}

TEST_CASE("a rectangular ball's corners lie in its disc") {
  reference::PointSource source(206);
  for (std::uint64_t k = 0; k < reference::repeats(2000); ++k) {
    const mpq_class re = source.any_dyadic(), im = source.any_dyadic();
    Acb ball;
    arb_set_arf(acb_realref(ball.raw()), reference::to_dyadic(re).raw());
    arb_set_arf(acb_imagref(ball.raw()), reference::to_dyadic(im).raw());
    const Mag width = samples::any_disc(source).radius, height = samples::any_disc(source).radius;
    mag_set(arb_radref(acb_realref(ball.raw())), width);
    mag_set(arb_radref(acb_imagref(ball.raw())), height);
    const DiscEnclosure disc = DiscEnclosure::of(ball);
    for (const long x : {-1, 1})
      for (const long y : {-1, 1}) REQUIRE(reference::holds(disc, {re + x * exact(width), im + y * exact(height)}));
  }
}
