// One step of Lemma E4 and its comparisons against exact rational arithmetic in GMP (computed).

#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "lanes/tracked_orbit.hpp"

using namespace merestone;
using doubles::exact;
using reference::Complex;
using reference::ratio;

namespace {

TrackedValue tracked(double x, double y, double error) { return {x, y, std::sqrt(x * x + y * y), error}; }

DoubleParameter any_parameter(reference::PointSource& source, bool with_error) {
  DoubleParameter c{doubles::coordinate(source), doubles::coordinate(source), 0};
  if (with_error) c.error = std::abs(doubles::any_double(source, source.between(-80, -21)));
  return c;
}

using Step = TrackedValue (*)(const TrackedValue&, const DoubleParameter&);

// Every true value within the error bound, moved one step exactly, lies within the next bound: the rims' extreme points
// are tried, in the direction of z too, where 2 z e and e² add up.
void check_step(Step step, const TrackedValue& z, const DoubleParameter& c, const std::vector<Complex>& directions) {
  const TrackedValue next = step(z, c);
  const mpq_class bound = exact(next.error);
  for (const Complex& of_z : directions)
    for (const Complex& of_c : directions) {
      const Complex true_z = exact(z.x, z.y) + exact(z.error) * of_z;
      const Complex true_c = exact(c) + exact(c.error) * of_c;
      const Complex off = true_z * true_z + true_c - exact(next.x, next.y);
      INFO(std::hexfloat << "z = " << z.x << ", " << z.y << " +- " << z.error << "; c = " << c.x << ", " << c.y);
      REQUIRE(norm(off) <= bound * bound);
      if (c.error == 0) break;
    }
}

std::vector<Complex> directions_for(const TrackedValue& z, reference::PointSource& source) {
  std::vector<Complex> all = {{1, 0}, {-1, 0}, {0, 1}, {0, -1}, source.direction()};
  if (z.x != 0) {
    // within 2^-20 of the direction of z
    const double t = z.y / (std::abs(z.x) + std::hypot(z.x, z.y));
    const Complex along = reference::on_unit_circle(ratio(std::lround(t * 0x1p20), 1UL << 20));
    all.push_back(z.x < 0 ? Complex{-along.re, along.im} : along);
  }
  return all;
}

}  // namespace

TEST_CASE("a step from an exact value is off by no more than its bound, and the bound is nearly reached") {
  reference::PointSource source(1101);
  double most = 0;
  for (std::uint64_t k = 0; k < reference::repeats(60000); ++k) {
    const TrackedValue z = tracked(doubles::coordinate(source), doubles::coordinate(source), 0);
    const DoubleParameter c = any_parameter(source, false);
    for (const Step step : {static_cast<Step>(next_tracked), static_cast<Step>(next_tracked_small)}) {
      const TrackedValue next = step(z, c);
      const Complex off = exact(z.x, z.y) * exact(z.x, z.y) + exact(c) - exact(next.x, next.y);
      const mpq_class bound = exact(next.error);
      INFO(std::hexfloat << "z = " << z.x << ", " << z.y << "; c = " << c.x << ", " << c.y);
      REQUIRE(norm(off) <= bound * bound);
      most = std::max(most, std::sqrt(mpq_class(norm(off) / (bound * bound)).get_d()));
    }
  }
  CHECK(most > 0.6);
}

TEST_CASE("a step from a value known up to an error holds for every true value") {
  reference::PointSource source(1102);
  for (std::uint64_t k = 0; k < reference::repeats(6000); ++k) {
    const double small = std::abs(doubles::any_double(source, source.between(source.one_in(4) ? -300 : -60, -21)));
    const double large = std::abs(doubles::any_double(source, source.between(-20, 1)));
    const TrackedValue z = tracked(doubles::coordinate(source), doubles::coordinate(source), small);
    const TrackedValue wide = tracked(z.x, z.y, large);
    const DoubleParameter c = any_parameter(source, source.one_in(2));
    check_step(next_tracked, z, c, directions_for(z, source));
    check_step(next_tracked_small, z, c, directions_for(z, source));
    check_step(next_tracked, wide, c, directions_for(z, source));
  }
}

TEST_CASE("a step at the largest error for which the small step is allowed holds") {
  reference::PointSource source(1103);
  for (std::uint64_t k = 0; k < reference::repeats(3000); ++k) {
    const TrackedValue z = tracked(doubles::coordinate(source), doubles::coordinate(source), kTrackedError);
    const DoubleParameter c = any_parameter(source, source.one_in(2));
    check_step(next_tracked_small, z, c, directions_for(z, source));
  }
}

TEST_CASE("where squares underflow the bound holds") {
  for (const double tiny : {0x1p-1074, 0x1p-600, 0x1.8p-540, 0x1.fffffffffffffp-538, 0x1p-537, 0x1.2345p-520, 0x1p-500})
    for (const double other : {0.0, tiny, 0x1p-1022, 0x1.7p-530})
      for (const double error : {0.0, 0x1p-1074, 0x1p-600, 0x1p-300, 0x1p-21}) {
        const TrackedValue z = tracked(tiny, other, error);
        for (const double c : {0.0, 0x1p-1074, 0x1p-1060, 0x1p-30}) {
          check_step(next_tracked, z, {c, c, 0}, reference::unit_directions());
          check_step(next_tracked_small, z, {c, -c, 0}, reference::unit_directions());
        }
      }
}

TEST_CASE("comparisons of tracked values are proofs") {
  reference::PointSource source(1104);
  std::uint64_t beyond = 0, within = 0;
  for (std::uint64_t k = 0; k < reference::repeats(60000); ++k) {
    TrackedValue z = tracked(doubles::coordinate(source) * 4, doubles::coordinate(source) * 4, 0);
    if (source.one_in(3)) z.error = std::abs(doubles::any_double(source, source.between(-60, -10)));
    // an error almost as large as the modulus leaves a small difference, and bounds as finely spaced as that
    if (source.one_in(3)) z.error = z.modulus * (1 - std::ldexp(1.0, -static_cast<int>(source.between(1, 12))));
    const double error = z.error;
    double bound = source.one_in(2) ? z.modulus - error : z.modulus + error;
    const double towards = source.one_in(2) ? 9 : 0;
    for (long ulps = source.between(0, source.one_in(2) ? 2 : 80); ulps > 0; --ulps)
      bound = std::nextafter(bound, towards);
    if (!(bound > 0x1p-200)) continue;
    const mpq_class size = norm(exact(z.x, z.y)), b = exact(bound), e = exact(error);
    INFO(std::hexfloat << "z = " << z.x << ", " << z.y << " +- " << error << " against " << bound);
    if (z.certainly_beyond(bound)) {
      REQUIRE(size > (b + e) * (b + e));
      ++beyond;
    }
    if (z.certainly_within(bound)) {
      REQUIRE(b >= e);
      REQUIRE(size <= (b - e) * (b - e));
      ++within;
    }
    REQUIRE(z.certainly_beyond((z.modulus - 2 * error) * (1 - 0x1p-40) - 0x1p-400));
    REQUIRE(z.certainly_within((z.modulus + 2 * error) * (1 + 0x1p-40) + 0x1p-400));
  }
  CHECK(beyond > 100);
  CHECK(within > 100);
}

TEST_CASE("comparisons are false for what is not a number, and for infinities that prove nothing") {
  const double nan = std::nan(""), infinity = std::numeric_limits<double>::infinity();
  for (const TrackedValue& z : {TrackedValue{nan, 0, nan, 0}, TrackedValue{0, 0, 1, nan}, TrackedValue{0, 0, nan, nan},
                                TrackedValue{infinity, 0, infinity, infinity}}) {
    CHECK_FALSE(z.certainly_beyond(2));
    CHECK_FALSE(z.certainly_within(2));
  }
  CHECK_FALSE(TrackedValue{3, 0, 3, infinity}.certainly_beyond(2));
  CHECK_FALSE(TrackedValue{1, 0, 1, infinity}.certainly_within(2));
}
