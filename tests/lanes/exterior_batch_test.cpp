// Lemmas E3 and E9 for many parameters at once. The truth comes from the kernel's discs in Arb, from MPFR's derivatives
// far beyond the index used, from MPFR's iteration at points of the rim (computed), and from members that are known
// exactly.

#include "lanes/exterior_batch.hpp"

#include <algorithm>
#include <cstring>
#include <numeric>

#include "catch.hpp"
#include "kernel/safe_disc.hpp"
#include "lanes/doubles.hpp"
#include "lanes/near_boundary.hpp"
#include "reference/convert.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/published.hpp"

using namespace merestone;
using doubles::exact;
using near_boundary::plain_index;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;
using End = ExteriorMark::End;

namespace {

constexpr OrbitLimits kFar{3'000, 0};

std::vector<ExteriorMark> marks_of(const std::vector<DoublePoint>& points, const OrbitLimits& limits = kFar) {
  std::vector<ExteriorMark> marks(points.size());
  exterior_discs(points, limits, marks);
  return marks;
}

ExteriorMark mark_of(double x, double y, const OrbitLimits& limits = kFar) { return marks_of({{x, y}}, limits)[0]; }

// Near the boundary at many distances; every eighth beside the cusp or where two components meet, where orbits are
// long.
std::vector<DoublePoint> many_points(PointSource& source, std::uint64_t count) {
  std::vector<DoublePoint> points;
  while (points.size() < count) {
    const double d = std::abs(doubles::any_double(source, source.between(-12, -6)));
    if (!source.one_in(8))
      points.push_back(near_boundary::beside(source, source.between(-26, -1)));
    else if (source.one_in(2))
      points.push_back({0.25 + d * d, d * d / 8});
    else
      points.push_back({-0.75 + d * d, source.one_in(2) ? d : -d});
  }
  return points;
}

// At the first even index at which the lanes look.
std::uint64_t index_of(const DoublePoint& c) {
  const std::uint64_t n = plain_index(c.x, c.y, kFar.steps);
  return n + n % 2;
}

bool same_bits(const std::vector<ExteriorMark>& a, const std::vector<ExteriorMark>& b) {
  return std::equal(a.begin(), a.end(), b.begin(), b.end(), [](const ExteriorMark& p, const ExteriorMark& q) {
    return p.end == q.end && std::memcmp(&p.circle, &q.circle, sizeof p.circle) == 0;
  });
}

struct AnyTarget {
  ~AnyTarget() { use_lane_target(""); }
};

}  // namespace

TEST_CASE("a lane's disc lies in the kernel's, and is hardly smaller where errors are small") {
  PointSource source(9101);
  const std::vector<DoublePoint> points = many_points(source, reference::repeats(3'000));
  const std::vector<ExteriorMark> marks = marks_of(points);
  std::uint64_t discs = 0, precise = 0, long_orbits = 0, short_orbits = 0;
  for (std::size_t k = 0; k < points.size(); ++k) {
    if (marks[k].end != End::proved) continue;
    const std::uint64_t index = index_of(points[k]);
    const Complex c = exact(points[k].x, points[k].y);
    const auto kernel = enclose_exterior_disc({reference::to_dyadic(c), index, 600});
    INFO(std::hexfloat << "c = " << points[k].x << ", " << points[k].y << std::dec << ", index " << index);
    REQUIRE(kernel);
    ++discs, long_orbits += index > 200, short_orbits += index <= 20;
    const mpq_class radius = exact(marks[k].circle.radius), theirs = reference::exact(kernel->radius);
    const Complex between = exact(marks[k].circle.x, marks[k].circle.y) - reference::exact(kernel->centre);
    REQUIRE(radius <= theirs);
    REQUIRE(norm(between) <= (theirs - radius) * (theirs - radius));
    precise += radius >= theirs * (1 - power_of_two(-16));
    if (radius > power_of_two(-9)) REQUIRE(radius >= theirs * (1 - power_of_two(-16)));
  }
  CHECK(discs * 5 > points.size() * 2);
  CHECK(precise * 3 > discs);
  CHECK(long_orbits > reference::repeats(3'000) / 50);
  CHECK(short_orbits > reference::repeats(3'000) / 50);
}

TEST_CASE("a lane's disc is covered by the map into the complement, as MPFR's derivatives show") {
  PointSource source(9102);
  const std::vector<DoublePoint> points = many_points(source, reference::repeats(200));
  const std::vector<ExteriorMark> marks = marks_of(points);
  std::uint64_t discs = 0;
  for (std::size_t k = 0; k < points.size(); ++k) {
    if (marks[k].end != End::proved || index_of(points[k]) > 600) continue;
    const Complex c = exact(points[k].x, points[k].y);
    const auto germ = reference::exterior_germ(c, 1'000);
    REQUIRE(germ);
    if (norm(germ->a2) >= ratio(399, 100)) continue;
    ++discs;
    INFO(std::hexfloat << "c = " << points[k].x << ", " << points[k].y);
    REQUIRE(reference::covers(*germ, exact(marks[k].circle.x, marks[k].circle.y) - c, exact(marks[k].circle.radius)));
  }
  CHECK(discs > reference::repeats(200) / 4);
}

TEST_CASE("points at 0.999 of the radius escape") {
  PointSource source(9103);
  const std::vector<DoublePoint> points = many_points(source, reference::repeats(120));
  const std::vector<ExteriorMark> marks = marks_of(points);
  std::uint64_t discs = 0;
  for (std::size_t k = 0; k < points.size(); ++k) {
    if (marks[k].end != End::proved || index_of(points[k]) > 600) continue;
    ++discs;
    INFO(std::hexfloat << "c = " << points[k].x << ", " << points[k].y);
    const mpq_class almost = ratio(999, 1'000) * exact(marks[k].circle.radius);
    for (int i = 0; i < 4; ++i)
      REQUIRE(reference::escape_index(exact(marks[k].circle.x, marks[k].circle.y) + almost * source.direction(), 2,
                                      40 * index_of(points[k]) + 20'000));
  }
  CHECK(discs > reference::repeats(120) / 3);
}

TEST_CASE("a member never has a disc") {
  PointSource source(9104);
  // preperiodic (-2, i, -i), parabolic (1/4, -3/4, -5/4, -7/4), nuclei 0 and -1: exactly
  std::vector<DoublePoint> members = {{-2, 0},    {0, 1},     {0, -1}, {0.25, 0}, {-0.75, 0},
                                      {-1.25, 0}, {-1.75, 0}, {0, 0},  {-1, 0}};
  for (const auto& nucleus : reference::nuclei())  // the double is in the component: its radius is far above 2^-50
    members.push_back({reference::decimal(nucleus.re).get_d(), reference::decimal(nucleus.im).get_d()});
  while (members.size() < 2'000) {  // of a multiplier up to 1 - 2^-40
    const Complex m = (1 - power_of_two(source.between(-40, -1))) * source.direction(), half = ratio(1, 2) * m;
    const Complex c = source.one_in(2) ? half - half * half : Complex{-1, 0} + ratio(1, 4) * m;
    members.push_back({c.re.get_d(), c.im.get_d()});
  }
  for (const OrbitLimits& limits : {OrbitLimits{3'000, 0}, OrbitLimits{3'000, 0x1p-20}}) {
    for (const ExteriorMark& mark : marks_of(members, limits)) {
      REQUIRE(mark.circle.radius == 0);
      REQUIRE((mark.end == End::stayed || (mark.end == End::close && limits.smallest > 0)));
    }
  }
  // and no disc beside them reaches a member
  const std::vector<DoublePoint> points = many_points(source, reference::repeats(3'000));
  for (const ExteriorMark& mark : marks_of(points)) {
    if (mark.end != End::proved) continue;
    INFO(std::hexfloat << "disc about " << mark.circle.x << ", " << mark.circle.y << " of radius "
                       << mark.circle.radius);
    for (std::size_t k = 0; k < 9; ++k)
      REQUIRE(norm(exact(mark.circle.x - members[k].x, mark.circle.y - members[k].y)) >
              exact(mark.circle.radius) * exact(mark.circle.radius));
  }
}

TEST_CASE("every width of lanes, every order and all neighbours give the same bits") {
  PointSource source(9105);
  std::vector<DoublePoint> points = many_points(source, reference::repeats(1'500));
  for (std::uint64_t k = 0; k < reference::repeats(300); ++k) points.push_back(near_boundary::biased(source));
  const AnyTarget restored;
  const std::vector<std::string> targets = lane_targets();
  REQUIRE(!targets.empty());
  for (const OrbitLimits& limits : {OrbitLimits{1'000, 0}, OrbitLimits{777, 0x1p-24}, OrbitLimits{30, 0x1p-10}}) {
    REQUIRE(use_lane_target(""));
    const std::vector<ExteriorMark> expected = marks_of(points, limits);
    std::vector<std::size_t> order(points.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    for (const std::string& target : targets) {
      INFO("target " << target);
      REQUIRE(use_lane_target(target));
      REQUIRE(same_bits(marks_of(points, limits), expected));
      for (std::size_t n = order.size(); n > 1; --n) std::swap(order[n - 1], order[source.below(n)]);
      for (std::size_t first = 0; first < order.size();) {
        const std::size_t size =
            std::min<std::size_t>(order.size() - first, 1 + source.below(source.one_in(2) ? 9 : 300));
        std::vector<DoublePoint> some;
        std::vector<ExteriorMark> wanted;
        for (std::size_t i = first; i < first + size; ++i)
          some.push_back(points[order[i]]), wanted.push_back(expected[order[i]]);
        REQUIRE(same_bits(marks_of(some, limits), wanted));
        first += size;
      }
    }
  }
  CHECK_FALSE(use_lane_target("none of Highway's"));
}

TEST_CASE("an orbit is followed to the limit, in twos") {
  for (const DoublePoint& c : {DoublePoint{-0.75, 0.1}, {0.26, 0}, {0.5, 0.5}, {-1.8, 0.01}}) {
    const auto index = static_cast<std::uint32_t>(index_of(c));
    const ExteriorMark found = mark_of(c.x, c.y, {index, 0});
    INFO("c = " << c.x << ", " << c.y << ", index " << index);
    CHECK(found.end == End::proved);
    CHECK(mark_of(c.x, c.y, {index - 1, 0}).end == End::proved);
    CHECK(same_bits({mark_of(c.x, c.y, {10 * index, 0})}, {found}));
    const ExteriorMark stayed = mark_of(c.x, c.y, {index - 2, 0});
    REQUIRE(stayed.end == End::stayed);
    CHECK(stayed.circle.radius == 0);
    const reference::Jet last = reference::jet(exact(c.x, c.y), index - 2, 300);
    CHECK(norm(last.z - exact(stayed.circle.x, stayed.circle.y)) < power_of_two(-40) * (1 + norm(last.z)));
  }
  CHECK(mark_of(-0.75, 0.1, {0, 0}).end == End::stayed);
}

TEST_CASE(
    "an orbit is given up only when its disc is below eight times what is asked for; the others keep their bits") {
  PointSource source(9106);
  const std::vector<DoublePoint> points = many_points(source, reference::repeats(2'000));
  const std::vector<ExteriorMark> all = marks_of(points);
  for (const double smallest : {0x1p-4, 0x1p-10, 0x1p-16, 0x1p-20}) {
    const std::vector<ExteriorMark> worth = marks_of(points, {kFar.steps, smallest});
    std::uint64_t given_up = 0;
    for (std::size_t k = 0; k < points.size(); ++k) {
      INFO(std::hexfloat << "c = " << points[k].x << ", " << points[k].y << ", radius " << all[k].circle.radius);
      if (worth[k].end == End::close) {
        ++given_up;
        REQUIRE(all[k].circle.radius < 8 * smallest);
      } else {
        REQUIRE(same_bits({worth[k]}, {all[k]}));
        REQUIRE((all[k].end != End::proved || all[k].circle.radius > smallest / 64));
      }
    }
    CHECK(given_up > points.size() / 10);
  }
}

TEST_CASE("nothing, parameters far out and numbers that underflow end without a number that is none") {
  exterior_discs({}, kFar, {});
  std::vector<DoublePoint> points;
  const std::vector<double> parts = {0.0,  -0.0, 0x1p-1074, -0x1p-1022, 0x1p-600, 0x1p-60, 0.25, -1.25,
                                     1.75, -2.0, 2.09,      2.2,        3.0,      4.0,     -4.0};
  for (const double x : parts)
    for (const double y : parts) points.push_back({x, y});
  for (const OrbitLimits& limits :
       {OrbitLimits{2'000, 0}, OrbitLimits{2'000, 0x1p-1070}, OrbitLimits{7, 8.0}, OrbitLimits{2'000, 0x1p-30}}) {
    const std::vector<ExteriorMark> marks = marks_of(points, limits);
    for (std::size_t k = 0; k < points.size(); ++k) {
      const auto& [circle, end] = marks[k];
      INFO(std::hexfloat << "c = " << points[k].x << ", " << points[k].y);
      REQUIRE((std::isfinite(circle.radius) && circle.radius >= 0));
      REQUIRE((circle.radius > 0) == (end == End::proved));
      if (end == End::proved || end == End::stayed) REQUIRE((std::isfinite(circle.x) && std::isfinite(circle.y)));
      const double modulus = std::hypot(points[k].x, points[k].y);
      if (modulus > 2.1) REQUIRE(end != End::proved);
      if (modulus > 2.1) REQUIRE(end != End::stayed);
    }
  }
}
