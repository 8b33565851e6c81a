// Lemma I3 over a disc against the exact polynomials in GMP, at points of its rim (computed).

#include "lanes/closed_form_cell.hpp"

#include "catch.hpp"
#include "lanes/doubles.hpp"

using namespace merestone;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

bool is_inside(const Complex& c, int period) {
  const mpq_class u = c.re - ratio(1, 4), y = c.im * c.im, q = u * u + y;
  if (period == 1) return q * (q + u) < y / 4;
  return (c.re + 1) * (c.re + 1) + y < ratio(1, 16);
}

bool holds_on_rim(const DoubleCircle& disc, int period) {
  const Complex centre = doubles::exact(disc.x, disc.y);
  const auto holds = [&](const Complex& unit) {
    return is_inside(centre + doubles::exact(disc.radius) * unit, period);
  };
  for (const Complex& unit : reference::unit_directions())
    if (!holds(unit)) return false;
  for (long k = -8; k <= 8; ++k)
    for (const Complex& quarter : {Complex{1, 0}, Complex{-1, 0}})
      if (!holds(reference::on_unit_circle(ratio(k, 8)) * quarter)) return false;
  return holds({0, 0});
}

// The parameter whose cycle has the multiplier m: on the curve when |m| = 1.
Complex with_multiplier(const Complex& m, int period) {
  const Complex half = ratio(1, 2) * m;
  return period == 1 ? half - half * half : Complex{-1, 0} + ratio(1, 4) * m;
}

DoubleCircle disc_at(const Complex& c, double radius) { return {c.re.get_d(), c.im.get_d(), radius}; }

}  // namespace

TEST_CASE("a disc that is said to be inside is: at random, touching the curve from within and crossing it") {
  PointSource source(9201);
  std::uint64_t said = 0, crossing = 0;
  for (std::uint64_t k = 0; k < reference::repeats(12'000); ++k) {
    const int period = source.one_in(3) ? 2 : 1;
    const double radius = std::abs(doubles::any_double(source, source.between(-40, -2)));
    // the curve is about so many radii away, a little less or more
    const mpq_class away = doubles::exact(radius) *
                           (1 + source.between(-4, 24) * power_of_two(-source.between(0, 20))) * (period == 2 ? 4 : 2);
    const DoubleCircle disc = disc_at(with_multiplier((1 - away) * source.direction(), period), radius);
    const bool answer = lies_in_closed_form(disc), truth = holds_on_rim(disc, 1) || holds_on_rim(disc, 2);
    INFO(std::hexfloat << "disc about " << disc.x << ", " << disc.y << " of radius " << disc.radius);
    if (answer) REQUIRE(truth);
    said += answer, crossing += !truth;
  }
  CHECK(said > reference::repeats(12'000) / 10);
  CHECK(crossing > reference::repeats(12'000) / 10);
}

TEST_CASE("a disc at half the distance of the curve that a small radius has is said to be inside") {
  PointSource source(9202);
  std::uint64_t small = 0;
  for (std::uint64_t k = 0; k < reference::repeats(5'000); ++k) {
    const int period = source.one_in(3) ? 2 : 1;
    const mpq_class gap = power_of_two(-source.between(2, 30));
    const Complex unit = source.direction(), c = with_multiplier((1 - gap) * unit, period);
    // dc/dm = (1 - m)/2 or 1/4: the curve is at about |dc/dm| gap; nearer the cusp it bends more
    if (period == 1 && norm(Complex{1, 0} - unit) < ratio(1, 4)) continue;
    const double radius = mpq_class(gap / (period == 1 ? 64 : 8)).get_d();
    INFO(std::hexfloat << "disc about " << c.re.get_d() << ", " << c.im.get_d() << " of radius " << radius);
    REQUIRE(lies_in_closed_form(disc_at(c, radius)));
    ++small;
  }
  CHECK(small > reference::repeats(5'000) / 2);
}

TEST_CASE("points: the answer is that of the exact polynomials but for those within 2^-30 of the curve") {
  PointSource source(9203);
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    const DoubleCircle point = disc_at(source.one_in(2) ? source.biased() : source.in_window(53), 0);
    const Complex c = doubles::exact(point.x, point.y);
    INFO(std::hexfloat << "c = " << point.x << ", " << point.y);
    const bool answer = lies_in_closed_form(point), truth = is_inside(c, 1) || is_inside(c, 2);
    if (answer) REQUIRE(truth);
    if (answer == truth) continue;
    DoubleCircle wider = point;
    wider.radius = 0x1p-30;
    REQUIRE_FALSE((holds_on_rim(wider, 1) || holds_on_rim(wider, 2)));
  }
}

TEST_CASE("on the curves, across them, far out and for numbers that are none the answer is no") {
  for (const DoubleCircle& disc : {DoubleCircle{0.25, 0, 0},
                                   {-0.75, 0, 0},
                                   {-1.25, 0, 0},
                                   {0.25, 0, 0x1p-30},
                                   {-1, 0, 0.25},
                                   {-1, 0, 0.2500001},
                                   {0, 0, 0.2500001},
                                   {0, 0, 1},
                                   {0, 0, 100},
                                   {0.1, 0, 0.2},
                                   {-0.75, 0, 0x1p-20},
                                   {-2, 0, 0},
                                   {0, 1, 0},
                                   {3, 3, 0.5},
                                   {0.25, 0x1p-1074, 0}})
    CHECK_FALSE(lies_in_closed_form(disc));
  const double nan = std::nan(""), infinity = HUGE_VAL;
  for (const double bad : {nan, infinity, -infinity})
    for (const DoubleCircle& disc : {DoubleCircle{bad, 0, 0.01}, {0, bad, 0.01}, {0, 0, std::abs(bad)}})
      CHECK_FALSE(lies_in_closed_form(disc));
  CHECK(lies_in_closed_form({0, 0, 0.02}));
  CHECK(lies_in_closed_form({-1, 0, 0.249}));
  CHECK(lies_in_closed_form({-0.5, 0, 0.02}));
  CHECK(lies_in_closed_form({-0.125, 0.5, 0.01}));
  CHECK(lies_in_closed_form({0.25 - 0x1p-8, 0, 0x1p-15}));
}
