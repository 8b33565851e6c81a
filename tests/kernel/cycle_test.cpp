// Enclosures of cycles and multipliers against Newton's method in MPFR at 1024 bits (computed).

#include "kernel/cycle.hpp"

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "kernel/stable_parameters.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;
using reference::power_of_two;
using reference::ratio;
using reference::to_rational;

namespace {

// MPFR's points are right to 2^-700 or so.
bool encloses(const DiscEnclosure& disc, const Complex& approx) {
  const mpq_class reach = exact(disc.radius) + power_of_two(-500);
  return norm(approx - reference::midpoint(disc)) <= reach * reach;
}

// Each enclosure holds the point of the cycle that is nearest to its midpoint, and no point is left out.
void require_cycle(const CycleEnclosure& cycle, const reference::Cycle& truth) {
  REQUIRE(cycle.period == truth.period());
  REQUIRE(cycle.points.size() == truth.points.size());
  std::vector<bool> met(truth.points.size(), false);
  for (std::size_t k = 0; k < cycle.points.size(); ++k) {
    std::size_t nearest = 0;
    const Complex middle = reference::midpoint(cycle.points[k]);
    for (std::size_t j = 1; j < truth.points.size(); ++j)
      if (norm(truth.points[j] - middle) < norm(truth.points[nearest] - middle)) nearest = j;
    REQUIRE(encloses(cycle.points[k], truth.points[nearest]));
    met[nearest] = true;
  }
  REQUIRE(std::count(met.begin(), met.end(), false) == 0);
  REQUIRE(encloses(cycle.multiplier, truth.multiplier));
}

}  // namespace

TEST_CASE("the cycle of a closed form is enclosed, and tightly") {
  reference::PointSource source(1001);
  for (std::uint64_t k = 0; k < reference::repeats(400); ++k)
    for (const std::uint32_t period : {1U, 2U}) {
      const mpq_class e = source.one_in(8) ? mpq_class(1) : power_of_two(source.between(-100, -1));
      const Complex multiplier = (1 - e) * source.direction();
      const Complex half = ratio(1, 2) * multiplier;
      const Complex c = period == 1 ? half - half * half : Complex{-1, 0} + ratio(1, 4) * multiplier;
      const auto cycle = enclose_cycle(to_rational(c), ClosedForm{period});
      INFO("period " << period << ", multiplier " << multiplier.re << ", " << multiplier.im);
      REQUIRE(cycle);
      REQUIRE(cycle->points.size() == period);
      REQUIRE(cycle->period == period);
      // the multiplier is known exactly; a point's image under f^period must meet the point's own enclosure
      REQUIRE(encloses(cycle->multiplier, multiplier));
      REQUIRE(exact(cycle->multiplier.radius) < power_of_two(-40));
      for (std::size_t j = 0; j < period; ++j) {
        DiscEnclosure image;
        square(image, cycle->points[j], 400);
        add(image, image, DiscEnclosure::of(to_rational(c), 400), 400);
        REQUIRE_FALSE(certainly_beyond(difference(image, cycle->points[(j + 1) % period], 400), Dyadic()));
        REQUIRE(exact(cycle->points[j].radius) < power_of_two(-40));
      }
      if (period == 1) REQUIRE(encloses(cycle->points[0], half));
    }
}

TEST_CASE("the cycle of period 2 is that of MPFR") {
  for (const Complex& c : {Complex{-1, 0}, Complex{ratio(-9, 10), 0}, Complex{ratio(-11, 10), ratio(1, 10)},
                           Complex{-1, ratio(-6, 25)}, Complex{ratio(-4, 5), ratio(1, 10)}}) {
    const auto truth = reference::find_cycle(c, {0, 0}, 2, 1024, 3000);
    REQUIRE(truth);
    require_cycle(*enclose_cycle(to_rational(c), ClosedForm{2}), *truth);
  }
  const auto at_nucleus = enclose_cycle({Rational(-1), Rational(0)}, ClosedForm{2});
  CHECK(reference::midpoint(at_nucleus->multiplier) == Complex{0, 0});
  CHECK(at_nucleus->multiplier.is_exact());
}

TEST_CASE("the cycle in an attracting disc is that of MPFR") {
  reference::PointSource source(1002);
  std::uint64_t checked = 0;
  for (const stable::StableParameter& s : stable::stable_parameters(source, reference::repeats(80))) {
    const auto truth = reference::find_cycle(s.c, s.centre, s.period);
    for (const long exponent : {-6, -20, -45}) {
      const Claim claim = claims::inside(claims::point(s.c), s.period, s.centre, power_of_two(exponent), 128);
      if (!claims::established(claim)) continue;
      const auto cycle = enclose_cycle(to_rational(s.c), claim.by);
      REQUIRE(cycle);
      require_cycle(*cycle, *truth);
      REQUIRE(exact(cycle->points[0].radius) >= power_of_two(exponent));
      ++checked;
    }
  }
  CHECK(checked > 80);
}

TEST_CASE("of a long cycle no more points are kept than asked for, and the multiplier is the same") {
  const auto nucleus = reference::find_cycle({ratio(-1625, 1000), 0}, {0, 0}, 5, 1024, 500);
  REQUIRE(nucleus);
  const Complex centre = reference::truncated(nucleus->points[0], 100);
  const Claim claim = claims::inside(claims::point({ratio(-1625, 1000), 0}), 5, centre, power_of_two(-20), 128);
  REQUIRE(claims::established(claim));
  const ComplexRational c{Rational(-1625, 1000), Rational(0)};
  const auto whole = enclose_cycle(c, claim.by), part = enclose_cycle(c, claim.by, 2);
  CHECK(whole->points.size() == 5);
  CHECK(part->points.size() == 2);
  CHECK(part->period == 5);
  CHECK(reference::midpoint(part->multiplier) == reference::midpoint(whole->multiplier));
  for (std::size_t k = 0; k < 2; ++k)
    CHECK(reference::midpoint(part->points[k]) == reference::midpoint(whole->points[k]));
}

TEST_CASE("a rule without a cycle has none to enclose") {
  CHECK_FALSE(enclose_cycle({Rational(-2), Rational(0)}, RealSegment{}));
  CHECK_FALSE(enclose_cycle({Rational(-2), Rational(0)}, Preperiodic{2, 1}));
  CHECK_FALSE(enclose_cycle({Rational(3), Rational(0)}, Escape{1, 64}));
}
