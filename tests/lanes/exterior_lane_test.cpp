// Lemma E3 in double precision: discs outside M. The truth comes from MPFR's iteration at points of the rim (computed),
// from Bieberbach's bound on MPFR's derivatives far beyond the index used, from boundary points that are known exactly,
// and from the kernel's disc.

#include "lanes/exterior_lane.hpp"

#include "catch.hpp"
#include "kernel/safe_disc.hpp"
#include "lanes/doubles.hpp"
#include "reference/boundary.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/mpfr_orbit.hpp"

using namespace merestone;
using doubles::exact;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

constexpr std::uint64_t kSteps = 3'000;

Complex centre(const DoubleCircle& disc) { return exact(disc.x, disc.y); }

bool reaches(const DoubleCircle& disc, const Complex& z) {
  return norm(z - centre(disc)) <= exact(disc.radius) * exact(disc.radius);
}

Complex beside_boundary(PointSource& source, long exponent) {
  return reference::beside_boundary(source, exponent, 2);
}

Complex any_centre(PointSource& source) {
  Complex c = source.one_in(3) ? source.biased() : beside_boundary(source, source.between(-34, -2));
  return {mpq_class(c.re.get_d()), mpq_class(c.im.get_d())};
}

struct Found {
  Complex at;
  std::uint64_t index;
  DoubleCircle disc;
};

std::optional<Found> found_at(const Complex& at) {
  const ExteriorLane lane = exterior_disc(at.re.get_d(), at.im.get_d(), kSteps);
  if (!lane.circle) return std::nullopt;
  return Found{at, lane.index, *lane.circle};
}

// 1/4, -3/4, -5/4, -7/4, -2, i and -i are on the boundary of M (the ends of real intervals of components, tips).
void require_misses_known_points(const DoubleCircle& disc) {
  for (const Complex& point : {Complex{ratio(1, 4), 0},
                               {ratio(-3, 4), 0},
                               {ratio(-5, 4), 0},
                               {ratio(-7, 4), 0},
                               {-2, 0},
                               {0, 1},
                               {0, -1},
                               {0, 0},
                               {-1, 0}})
    REQUIRE_FALSE(reaches(disc, point));
}

}  // namespace

TEST_CASE("rim points of an exterior disc escape") {
  PointSource source(3701);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(200); ++k) {
    const auto found = found_at(any_centre(source));
    if (!found) continue;
    ++discs;
    INFO("centre " << found->at.re << ", " << found->at.im);
    require_misses_known_points(found->disc);
    const mpq_class almost = ratio(9999, 10'000) * exact(found->disc.radius);
    for (int i = 0; i < 6; ++i)
      REQUIRE(
          reference::escape_index(centre(found->disc) + almost * source.direction(), 2, 40 * found->index + 20'000));
  }
  CHECK(discs > reference::repeats(200) / 2);
}

TEST_CASE("an exterior disc is covered by the map into the complement, as MPFR's derivatives show") {
  PointSource source(3702);
  std::uint64_t discs = 0;
  for (std::uint64_t k = 0; k < reference::repeats(250); ++k) {
    const auto found = found_at(any_centre(source));
    if (!found || found->index > 600) continue;
    const auto germ = reference::exterior_germ(found->at, 1'000);
    REQUIRE(germ);
    if (norm(germ->a2) >= ratio(399, 100)) continue;
    ++discs;
    INFO("centre " << found->at.re << ", " << found->at.im);
    REQUIRE(reference::covers(*germ, centre(found->disc) - found->at, exact(found->disc.radius)));
  }
  CHECK(discs > reference::repeats(250) / 3);
}

TEST_CASE("an exterior disc is hardly smaller than the kernel's, and nowhere larger") {
  PointSource source(3703);
  std::uint64_t discs = 0, precise = 0, close = 0;
  for (std::uint64_t k = 0; k < reference::repeats(400); ++k) {
    const auto found = found_at(any_centre(source));
    if (!found) continue;
    const auto kernel = enclose_exterior_disc({reference::to_dyadic(found->at), found->index, 1'000});
    REQUIRE(kernel);
    ++discs;
    INFO("centre " << found->at.re << ", " << found->at.im);
    const mpq_class radius = exact(found->disc.radius), theirs = reference::exact(kernel->radius);
    REQUIRE(radius < theirs * (1 + power_of_two(-20)));
    precise += radius > theirs * (1 - power_of_two(-16)) ? 1 : 0;
    close += radius > theirs * ratio(9, 10) ? 1 : 0;
  }
  CHECK(discs > reference::repeats(400) / 2);
  CHECK(precise * 2 > discs);
  CHECK(close * 10 > discs * 9);
}

TEST_CASE("beside -2 the disc is at least half as wide as the distance, and does not reach -2") {
  // M meets the axis from -2 on, so the distance of -2 - d to M is d; f1 is d at least by Schwarz's lemma, and
  // Lemma U1 gives f1 / 2 at least
  for (int exponent = -4; exponent >= -30; --exponent) {
    const double d = std::ldexp(1.0, exponent);
    const auto found = found_at({mpq_class(-2 - d), 0});
    INFO("d = 2^" << exponent);
    REQUIRE(found);
    CHECK_FALSE(reaches(found->disc, {-2, 0}));
    CHECK(found->disc.radius > 0.499 * d);
    CHECK(reaches(found->disc, found->at));
  }
}

TEST_CASE("beside the cusp, the bifurcation points and the tips the disc does not reach them") {
  struct Approach {
    double x, y, along_x, along_y;
    int closest;
  };
  for (const Approach& a : {Approach{0.25, 0, 1, 0, -12},
                            {-0.75, 0, 0, 1, -8},
                            {-0.75, 0, 0, -1, -8},
                            {0, 1, 0, 1, -30},
                            {0, 1, 1, 0, -30},
                            {0, -1, -1, 0, -30},
                            {-1.25, 0, 0, 1, -4},
                            {-2, 0, 0, 1, -30}})
    for (int exponent = -2; exponent >= a.closest; --exponent) {
      const double d = std::ldexp(1.0, exponent);
      const auto found = found_at(exact(a.x + d * a.along_x, a.y + d * a.along_y));
      INFO("beside " << a.x << ", " << a.y << ", d = 2^" << exponent);
      REQUIRE(found);
      REQUIRE_FALSE(reaches(found->disc, exact(a.x, a.y)));
      require_misses_known_points(found->disc);
      REQUIRE(reaches(found->disc, found->at));
    }
}

TEST_CASE("there is no disc about members, beyond the limit, or for parameters that are too large") {
  PointSource source(3704);
  for (const Complex& c :
       {Complex{0, 0}, {-1, 0}, {-2, 0}, {0, 1}, {ratio(1, 4), 0}, {ratio(-3, 4), 0}, {ratio(-7, 4), 0}}) {
    const ExteriorLane lane = exterior_disc(c.re.get_d(), c.im.get_d(), kSteps);
    CHECK(lane.index == 0);
    CHECK_FALSE(lane.circle);
  }
  CHECK_FALSE(exterior_disc(2.125, 0, 100).circle);
  CHECK_FALSE(exterior_disc(-1.5, 1.5, 100).circle);
  CHECK(exterior_disc(1.5, 1, 100).circle);
  const ExteriorLane lane = exterior_disc(-0.75, 0.1, 100);
  REQUIRE(lane.circle);
  CHECK_FALSE(exterior_disc(-0.75, 0.1, lane.index - 1).circle);
  CHECK(exterior_disc(-0.75, 0.1, lane.index).circle);
  const auto jet = reference::jet_beyond(exact(-0.75, 0.1), 19, 100, 300);
  REQUIRE(jet);
  CHECK(norm(jet->z) > power_of_two(38));
  CHECK(lane.index >= jet->index);
  CHECK(lane.index <= jet->index + 1);
}
