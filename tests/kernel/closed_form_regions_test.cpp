// Lemma I3 over discs and boxes, which are cut into cells. The truth comes from the multiplier, exactly: c = m/2 - m²/4
// is in the closed cardioid and c = -1 + m/4 in the closed disc of period 2 for |m| <= 1 (textbook, derived by hand).

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "reference/point_source.hpp"

using claims::box;
using claims::disc;
using claims::established;
using merestone::ClosedForm;
using merestone::Inside;
using merestone::Member;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

bool inside(const merestone::Region& region, std::uint32_t period) {
  return established(claims::claim(Inside{}, region, ClosedForm{period}));
}
bool member(const merestone::Region& region, std::uint32_t period) {
  return established(claims::claim(Member{}, region, ClosedForm{period}));
}

Complex with_multiplier(const Complex& m, std::uint32_t period) {
  const Complex half = ratio(1, 2) * m;
  return period == 1 ? half - half * half : Complex{-1, 0} + ratio(1, 4) * m;
}

// c is in the open component, by the polynomials of the lemma.
bool is_in_component(const Complex& c, std::uint32_t period) {
  const mpq_class u = c.re - ratio(1, 4), y = c.im * c.im, q = u * u + y, x = c.re + 1;
  return period == 1 ? q * (q + u) < y / 4 : x * x + y < ratio(1, 16);
}

}  // namespace

TEST_CASE("discs and boxes near the curve are inside only where every sample is") {
  PointSource source(1801);
  std::uint64_t accepted = 0, near = 0;
  for (std::uint64_t k = 0; k < reference::repeats(300); ++k) {
    const std::uint32_t period = source.one_in(2) ? 1 : 2;
    // a centre short of the curve by about the size of the region
    const mpq_class gap = power_of_two(source.between(-12, -3));
    const Complex c = reference::truncated(with_multiplier((1 - gap) * source.direction(), period), 60);
    const mpq_class size = gap * ratio(source.between(1, 24), 64);
    const bool round = source.one_in(2);
    const auto region = round ? disc(c, size) : box(c - Complex{size, size / 2}, c + Complex{size, size / 2});
    if (!inside(region, period)) continue;
    ++accepted;
    for (const Complex& unit : reference::unit_directions()) {
      const mpq_class height = round ? size : mpq_class(size / 2);
      const Complex z = round ? c + size * unit : c + Complex{size * (unit.re > 0 ? 1 : -1), height * unit.im};
      REQUIRE(is_in_component(z, period));
      near += !is_in_component(c + mpq_class(2) * (z - c), period);
    }
  }
  CHECK(accepted > reference::repeats(300) / 4);
  CHECK(near > accepted / 4);  // the samples come near the curve
}

TEST_CASE("a region that pokes out of the curve by a little is refused, whatever is claimed") {
  PointSource source(1802);
  for (std::uint64_t k = 0; k < reference::repeats(20); ++k)
    for (const std::uint32_t period : {1U, 2U}) {
      const Complex on = with_multiplier(source.direction(), period);
      const mpq_class radius = power_of_two(source.between(-20, -4)), less = radius * (1 - power_of_two(-20));
      // the curve's point `on` lies in the disc about a point inside, close to its rim
      const Complex in = with_multiplier((1 - power_of_two(-3)) * source.direction(), period);
      const Complex inward = in - on;
      const mpq_class length = reference::sqrt_down(norm(inward), 80) + power_of_two(-80), step = less / length;
      const Complex centre = reference::truncated(on + step * inward, 100);
      REQUIRE_FALSE(inside(disc(centre, radius), period));
      REQUIRE_FALSE(inside(box(centre - Complex{radius, radius}, centre + Complex{radius, radius}), period));
    }
}

TEST_CASE("discs about the nuclei are inside up to a small share of the component's inradius") {
  // about -1 the component of period 2 is the disc of radius 1/4. About 0 the cardioid's nearest point is 1/4.
  for (const std::uint32_t period : {1U, 2U}) {
    const Complex centre{period == 1 ? 0 : -1, 0};
    const auto accepts = [&](const mpq_class& r) { return inside(disc(centre, r), period); };
    CHECK(accepts(ratio(15, 64)));
    CHECK_FALSE(accepts(ratio(1, 4)));
    CHECK_FALSE(accepts(ratio(1, 4) + power_of_two(-60)));
    // the square in it: half side 1/4 / sqrt(2) = 0.1767...
    const auto square = [&](const mpq_class& half) {
      return inside(box(centre - Complex{half, half}, centre + Complex{half, half}), period);
    };
    CHECK(square(ratio(22, 128)));
    if (period == 2) CHECK_FALSE(square(ratio(23, 128)));
  }
}

TEST_CASE("a region outside of the curve, or wholly around it, is refused at once") {
  for (const std::uint32_t period : {1U, 2U}) {
    CHECK_FALSE(member(disc({3, 0}, 1), period));
    CHECK_FALSE(member(disc({0, 0}, 3), period));
    CHECK_FALSE(member(box({-3, -3}, {3, 3}), period));
    CHECK_FALSE(member(box({1, 1}, {2, 2}), period));
    CHECK_FALSE(inside(disc({ratio(1, 4) + power_of_two(-30), 0}, power_of_two(-31)), period));
  }
  CHECK_FALSE(member(disc({-1, 0}, ratio(1, 8)), 1));
  CHECK_FALSE(member(disc({0, 0}, ratio(1, 8)), 2));
}

TEST_CASE("a box is a member up to a corner on the curve, and inside no more") {
  // -1 + (3/5 + 4/5 i)/4 is on the circle of period 2; it is not dyadic: a corner of few digits just within and beyond
  const Complex corner{-1 + ratio(3, 20), ratio(1, 5)};
  const Complex within = reference::truncated(corner, 40),
                beyond = within + Complex{power_of_two(-38), power_of_two(-38)};
  CHECK(inside(box({-1, 0}, Complex{within.re - power_of_two(-38), within.im}), 2));
  CHECK_FALSE(member(box({-1, 0}, beyond), 2));
  // with a corner at -3/4 or -5/4, exactly on the curve
  CHECK(member(box({-1, 0}, {ratio(-7, 8), ratio(1, 8)}), 2));
  CHECK_FALSE(inside(box({-1, power_of_two(-60)}, {ratio(-3, 4), ratio(1, 8)}), 2));
}

TEST_CASE("a refusal says that cells were cut") {
  const auto reason = [](const merestone::Region& region) {
    return claims::refusal(claims::claim(Inside{}, region, ClosedForm{1}));
  };
  CHECK(reason(disc({0, 0}, 1)) ==
        "the inequality of the main cardioid does not hold strictly over the region, as far as it was cut into cells");
  CHECK(reason(claims::point({1, 0})) == "the inequality of the main cardioid does not hold strictly over the region");
}
