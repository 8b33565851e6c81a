// Lemma P2: nuclei and Misiurewicz points. The truth comes from complete lists of the roots: the nuclei of periods 1 to
// 4 and the Misiurewicz points of types (2, 1), (2, 2), (3, 1) by published values (each with its status in
// reference/published.cpp), refined by Newton's method in MPFR (computed).

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "reference/mpfr_jet.hpp"
#include "reference/point_source.hpp"
#include "reference/published.hpp"

using claims::established;
using merestone::IsolatedRoot;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

struct Type {
  std::uint64_t preperiod, period;  // preperiod 0: a nucleus
  friend bool operator==(const Type&, const Type&) = default;
};
struct Root {
  Complex c;
  Type type;
};

merestone::Claim claim(const merestone::Region& region, const Type& type, std::uint32_t bits) {
  if (type.preperiod == 0) return claims::claim(merestone::Nucleus{type.period}, region, IsolatedRoot{bits});
  return claims::claim(merestone::Misiurewicz{type.preperiod, type.period}, region, IsolatedRoot{bits});
}

bool isolates(const Complex& centre, const mpq_class& radius, const Type& type, std::uint32_t bits = 700) {
  return established(claim(claims::disc(centre, radius), type, bits));
}

Complex published(const reference::PublishedPoint& p) { return {reference::decimal(p.re), reference::decimal(p.im)}; }

// With the conjugates, each to 600 binary places.
std::vector<Root> refined(const std::vector<reference::PublishedPoint>& points) {
  std::vector<Root> all;
  for (const reference::PublishedPoint& p : points) {
    if (p.period == 0) continue;
    const auto c = reference::root_near(published(p), p.preperiod, p.period);
    REQUIRE(c);
    REQUIRE(norm(*c - published(p)) < power_of_two(-40));
    all.push_back({*c, {p.preperiod, p.period}});
    if (p.im != "0") all.push_back({{c->re, -c->im}, {p.preperiod, p.period}});
  }
  return all;
}

const std::vector<Root>& nuclei() {
  static const std::vector<Root> all = refined(reference::nuclei());
  return all;
}
const std::vector<Root>& misiurewicz_points() {
  static const std::vector<Root> all = refined(reference::misiurewicz_points());
  return all;
}
std::vector<Root> all_roots() {
  std::vector<Root> all = nuclei();
  all.insert(all.end(), misiurewicz_points().begin(), misiurewicz_points().end());
  return all;
}

// The types of which all_roots has every root.
const std::vector<Type> kComplete = {{0, 1}, {0, 2}, {0, 3}, {0, 4}, {2, 1}, {2, 2}, {3, 1}};

int count_in(const std::vector<Root>& roots, const Type& type, const Complex& centre, const mpq_class& radius) {
  int count = 0;
  for (const Root& root : roots) count += root.type == type && norm(root.c - centre) <= radius * radius;
  return count;
}

mpq_class figure(const merestone::Claim& claim) {
  const merestone::Outcome result = claims::outcome(claim);
  const auto* shown = std::get_if<merestone::Established>(&result);
  REQUIRE(shown != nullptr);
  REQUIRE(shown->figures.size() == 1);
  REQUIRE(shown->lemmas == std::vector<std::string>{"P2", "E2"});
  REQUIRE(shown->figures[0].lower->sign() == 0);
  return reference::exact(*shown->figures[0].upper);
}

}  // namespace

TEST_CASE("the lists of roots are complete") {
  // numbers of nuclei: OEIS A000740 (verified): 1, 1, 3, 6. Misiurewicz: the degrees of c + 2 (from z_2 + z_1),
  // c^2 + 1 (from z_3 + z_1) and c^3 + 2c^2 + 2c + 2 (from z_3 + z_2, verified), by hand
  const std::vector<Root> roots = all_roots();
  const std::vector<int> expected = {1, 1, 3, 6, 1, 2, 3};
  for (std::size_t i = 0; i < kComplete.size(); ++i) CHECK(count_in(roots, kComplete[i], {0, 0}, 8) == expected[i]);
}

TEST_CASE("the published digits lie in the disc that isolates the root") {
  for (const auto* list : {&reference::nuclei(), &reference::misiurewicz_points()})
    for (const reference::PublishedPoint& p : *list) {
      if (p.period == 0) continue;
      const std::size_t digits = std::max(p.re.size() - p.re.find('.'), p.im.size() - p.im.find('.'));
      INFO(p.source << ": " << p.re << ", " << p.im);
      mpq_class last = 1;  // the last place that is given, or 10^-12 where the value is exact
      const bool is_exact = p.re.find('.') == std::string::npos && p.im.find('.') == std::string::npos;
      for (std::size_t k = 1; k < (is_exact ? 13 : digits); ++k) last /= 10;
      const Complex at = published(p);
      // the smallest power of two that is at least one unit of the last place and the rounding of the centre
      mpq_class radius = 1;
      while (radius / 2 >= 2 * last) radius /= 2;
      CHECK(isolates(reference::truncated(at, 300), radius, {p.preperiod, p.period}, 256));
    }
}

TEST_CASE("two Misiurewicz points that are published to six digits are isolated, with type (3, 2) only") {
  // digits verified; type computed from their orbits
  for (const reference::PublishedPoint& p : reference::misiurewicz_points()) {
    if (p.period != 0) continue;
    for (std::uint64_t k = 2; k <= 6; ++k)
      for (std::uint64_t period = 1; period <= 4; ++period) {
        INFO(p.re << ", type " << k << ", " << period);
        CHECK(isolates(reference::truncated(published(p), 100), power_of_two(-18), {k, period}, 128) ==
              (k == 3 && period == 2));
      }
  }
}

TEST_CASE("roots are isolated in discs of all sizes, and lie where the figure says") {
  PointSource source(1501);
  for (const Root& root : all_roots())
    for (long exponent = -5; exponent >= -200; exponent -= exponent > -20 ? 1 : 15) {
      const mpq_class radius = power_of_two(exponent);
      const Complex centre = reference::truncated(root.c + ratio(1, 8) * radius * source.in_unit_disc(), 400);
      const merestone::Claim c = claim(claims::disc(centre, radius), root.type, 500);
      INFO("type " << root.type.preperiod << ", " << root.type.period << ", radius 2^" << exponent);
      if (!established(c)) {
        REQUIRE(exponent > -12);  // the smallest component has a width of about 2^-9
        continue;
      }
      const mpq_class distance = figure(c), truth = norm(root.c - centre), error = power_of_two(-500);
      REQUIRE(distance < radius);
      REQUIRE(truth <= (distance + error) * (distance + error));
      if (exponent < -30) REQUIRE(truth * 2 > distance * distance - error);
      // the root at the rim or beyond: nothing
      const Complex far = reference::truncated(root.c + (1 + power_of_two(-30)) * radius * source.direction(), 400);
      REQUIRE_FALSE(isolates(far, radius, root.type, 500));
    }
}

TEST_CASE("the wrong period, a multiple of it and another kind are refused") {
  for (const Root& root : all_roots())
    for (const long exponent : {-8L, -12L, -20L, -60L, -200L}) {
      const Complex centre = reference::truncated(root.c, 500);
      for (std::uint64_t k = 0; k <= 5; ++k)
        for (std::uint64_t p = 1; p <= 8; ++p) {
          const Type type{k, p};
          if (type == root.type || k == 1) continue;
          if (exponent > -20 && std::find(kComplete.begin(), kComplete.end(), type) == kComplete.end()) continue;
          INFO("type " << k << ", " << p << " claimed of " << root.type.preperiod << ", " << root.type.period);
          REQUIRE_FALSE(isolates(centre, power_of_two(exponent), type));
        }
    }
}

TEST_CASE("nuclei are roots of the equations of Misiurewicz points, and are refused as such") {
  // z_{k-1+p} + z_{k-1} = 0 wherever z_{k-1} = 0 is periodic with a period that divides p
  for (const Root& root : nuclei())
    for (std::uint64_t k = 2; k <= 9; ++k)
      for (std::uint64_t p = root.type.period; p <= 8; p += root.type.period)
        REQUIRE_FALSE(isolates(reference::truncated(root.c, 500), power_of_two(-60), {k, p}));
  CHECK(claims::refusal(claim(claims::disc({-1, 0}, power_of_two(-20)), {3, 2}, 128)).find("it may be a nucleus") !=
        std::string::npos);
  // z_4 = 0 at the nucleus -1 of period 2, and it is a simple root
  CHECK(
      claims::refusal(claim(claims::disc({-1, 0}, power_of_two(-20)), {0, 4}, 128)).find("the period may be shorter") !=
      std::string::npos);
  // z_5 + z_1 = 0 at i, of period 2, not 4
  CHECK(
      claims::refusal(claim(claims::disc({0, 1}, power_of_two(-20)), {2, 4}, 128)).find("the period may be shorter") !=
      std::string::npos);
}

TEST_CASE("discs with two roots or none are refused") {
  const std::vector<Root> roots = all_roots();
  for (const Root& a : roots)
    for (const Root& b : roots) {
      if (!(a.type == b.type) || a.c == b.c) continue;
      const Complex middle = reference::truncated(ratio(1, 2) * (a.c + b.c), 100);
      const mpq_class half = reference::sqrt_down(norm(a.c - b.c) / 4, 100) + power_of_two(-90);
      REQUIRE_FALSE(isolates(middle, half, a.type));
      REQUIRE_FALSE(isolates(middle, 2 * half, a.type));
      REQUIRE_FALSE(isolates(middle, half / 2, a.type));
    }
}

TEST_CASE("what is isolated at random is exactly one root of the list") {
  PointSource source(1502);
  const std::vector<Root> roots = all_roots();
  std::uint64_t accepted = 0;
  for (std::uint64_t k = 0; k < reference::repeats(6000); ++k) {
    const Type type = source.pick(kComplete);
    const mpq_class radius = source.dyadic(4, source.one_in(3) ? source.between(-120, -20) : source.between(-20, 0));
    const Complex about = source.one_in(4) ? source.biased() : source.pick(roots).c;
    const Complex centre = reference::truncated(about + radius * source.in_unit_disc(), 200);
    static const std::vector<std::uint32_t> precisions = {2, 8, 24, 53, 64, 128, 300};
    if (!isolates(centre, radius, type, source.pick(precisions))) continue;
    ++accepted;
    INFO("type " << type.preperiod << ", " << type.period << " about " << centre.re << ", " << centre.im);
    REQUIRE(count_in(roots, type, centre, radius) == 1);
  }
  CHECK(accepted > reference::repeats(6000) / 50);
}

TEST_CASE("the widest disc in which a root is isolated holds no other") {
  const std::vector<Root> roots = all_roots();
  for (const Root& root : roots) {
    const Complex centre = reference::truncated(root.c, 300);
    const auto accepts = [&](const mpq_class& r) { return isolates(centre, r, root.type, 400); };
    const mpq_class widest = claims::largest(-100, 2, accepts);
    INFO("type " << root.type.preperiod << ", " << root.type.period << " at " << centre.re.get_d());
    REQUIRE(widest > power_of_two(-16));
    REQUIRE(count_in(roots, root.type, centre, widest) == 1);
  }
}

TEST_CASE("nuclei of higher periods that MPFR finds are isolated, and not for another period") {
  PointSource source(1503);
  std::uint64_t found = 0;
  for (std::uint64_t k = 0; k < reference::repeats(150); ++k) {
    const std::uint64_t period = source.below(12) + 5;
    const auto c = reference::root_near(reference::truncated(source.in_window(20), 30), 0, period);
    if (!c || norm(*c) > 4) continue;
    // a root of z_period may have a shorter period
    std::uint64_t least = period;
    for (std::uint64_t q = period - 1; q >= 1; --q)
      if (period % q == 0 && norm(reference::jet(*c, q, 1200).z) < power_of_two(-400)) least = q;
    ++found;
    const Complex centre = reference::truncated(*c, 500);
    INFO("period " << least << " at " << centre.re.get_d() << ", " << centre.im.get_d());
    REQUIRE(isolates(centre, power_of_two(-150), {0, least}));
    REQUIRE_FALSE(isolates(centre, power_of_two(-150), {0, 2 * least}));
    REQUIRE_FALSE(isolates(centre, power_of_two(-150), {0, 3 * least}));
    if (least != period) REQUIRE_FALSE(isolates(centre, power_of_two(-150), {0, period}));
  }
  CHECK(found > reference::repeats(150) / 2);
}

TEST_CASE("the equation must be steep enough throughout the disc, not only at its centre") {
  // z_2 = c^2 + c about -1: |g(a)| = 0 whatever the slope, so every disc up to where c + c^2 may be flat is accepted
  CHECK(isolates({-1, 0}, ratio(1, 4), {0, 2}, 64));
  CHECK_FALSE(isolates({-1, 0}, 1, {0, 2}, 64));  // 0 is a root too, of period 1
  // g = c(c + 2) about -2 + d: |g(a)| about 2d against (2 - 2(d + r)) r
  CHECK(isolates({-2 + ratio(1, 16), 0}, ratio(1, 8), {2, 1}, 64));
  CHECK_FALSE(isolates({-2 + ratio(1, 16), 0}, ratio(1, 16), {2, 1}, 64));
}

TEST_CASE("only discs are taken") {
  for (const merestone::Region& region : {claims::point({-1, 0}), claims::segment(ratio(-9, 8), ratio(-7, 8)),
                                          claims::box({ratio(-9, 8), ratio(-1, 8)}, {ratio(-7, 8), ratio(1, 8)})}) {
    CHECK_FALSE(established(claim(region, {0, 2}, 64)));
    CHECK_FALSE(established(claim(region, {2, 1}, 64)));
  }
}
