// Roots of one type in a region: exact nuclei and Misiurewicz points on, inside and beside the rim.

#include "search/isolate_roots.hpp"

#include "search/regions.hpp"

using namespace merestone;
using reference::Complex;
using reference::exact;

namespace {

constexpr RootEquation kPeriod1{0, 1}, kPeriod2{0, 2}, kPeriod3{0, 3}, kTip{1, 2}, kSecondTip{1, 3};

IsolatedRoots isolated(const RootEquation& equation, const std::string& text, const IsolationLimits& limits = {},
                       double seconds = 600) {
  Deadline deadline(seconds);
  return isolate_roots(equation, regions::shape(text), limits, deadline);
}

Complex centre(const Claim& claim) { return exact(std::get<Disc>(claim.region).centre); }

// The roots of the whole plane that lie in the box.
std::vector<Complex> within(const IsolatedRoots& all, const Complex& lo, const Complex& hi) {
  std::vector<Complex> some;
  for (const Claim& claim : all.claims) {
    const Complex c = centre(claim);
    if (lo.re < c.re && c.re < hi.re && lo.im < c.im && c.im < hi.im) some.push_back(c);
  }
  return some;
}

}  // namespace

TEST_CASE("the equation's type is what its roots are") {
  CHECK(kPeriod3.type() == Statement(Nucleus{3}));
  CHECK(kTip.type() == Statement(Misiurewicz{2, 1}));
  CHECK(kSecondTip.type() == Statement(Misiurewicz{2, 2}));
}

TEST_CASE("a root on the rim is not said to be in the region, and the list not to be complete") {
  for (const auto& [equation, text] : {std::pair{kPeriod1, "box 0-1i 1+1i"},
                                       {kPeriod1, "box -1+0i 1+1i"},
                                       {kPeriod1, "disc 1 1"},
                                       {kPeriod1, "box 0 1+1i"},
                                       {kPeriod2, "box -1-0.1i -0.5+0.1i"},
                                       {kPeriod2, "disc -1/2 1/2"},
                                       {kTip, "disc -1 1"},
                                       {kTip, "box -3-1i -2+1i"},
                                       {kSecondTip, "box -1-1i 1+1i"},
                                       {kSecondTip, "disc 3/5+1/5i 1"}}) {
    const IsolatedRoots roots = isolated(equation, text);
    INFO(text);
    CHECK_FALSE(roots.is_complete);
    CHECK(roots.claims.empty());
  }
}

TEST_CASE("a root just inside the rim is found, one just outside is not") {
  for (const auto& [text, times] : {std::pair{"box -1e-12-1i 1+1i", 1U},
                                    {"box 1e-12-1i 1+1i", 0U},
                                    {"disc 1 1000000000001/1000000000000", 1U},
                                    {"disc 1 999999999999/1000000000000", 0U},
                                    {"box -1e-15-1e-15i 1+1i", 1U}}) {
    const IsolatedRoots roots = isolated(kPeriod1, text);
    INFO(text);
    CHECK(roots.is_complete);
    REQUIRE(roots.claims.size() == times);
    if (times == 0) continue;
    const Disc& disc = std::get<Disc>(roots.claims.front().region);
    CHECK(norm(exact(disc.centre)) <= exact(disc.radius) * exact(disc.radius));
    CHECK(is_within(shape_of(roots.claims.front().region), regions::shape(text)));
    CHECK(std::holds_alternative<Established>(establish(roots.claims.front(), Limits{})));
  }
}

TEST_CASE("roots of lesser types are no roots of the type") {
  // 0 and -1 are zeros of z_4, -2 of z_4 + z_1 and z_3 + z_1
  CHECK(isolated({0, 4}, "disc 0 1/10").claims.empty());
  CHECK(isolated({0, 4}, "disc -1 1/10").claims.empty());
  CHECK(isolated({0, 4}, "disc 0 1/10").is_complete);
  CHECK(isolated({0, 4}, "disc -1 1/10").is_complete);
  for (const RootEquation& equation : {RootEquation{1, 3}, RootEquation{1, 4}, RootEquation{1, 5}}) {
    const IsolatedRoots roots = isolated(equation, "disc -2 1/1000");
    CHECK(roots.is_complete);
    for (const Claim& claim : roots.claims) {
      const Disc& disc = std::get<Disc>(claim.region);
      CHECK(norm(exact(disc.centre) - Complex{-2, 0}) > exact(disc.radius) * exact(disc.radius));
    }
  }
}

TEST_CASE("in any box the complete list is the part of the whole list that lies in it") {
  // the whole lists have as many roots as OEIS A000740 (verified) and degrees say, which locate_test checks
  reference::PointSource source(4401);
  for (const RootEquation& equation : {RootEquation{0, 4}, RootEquation{0, 6}, RootEquation{0, 8}, RootEquation{1, 5},
                                       RootEquation{2, 6}, RootEquation{3, 5}}) {
    const IsolatedRoots all = isolated(equation, "box -2.5-1.5i 1+1.5i");
    REQUIRE(all.is_complete);
    for (std::uint64_t k = 0; k < reference::repeats(60); ++k) {
      const Complex near = source.one_in(2) ? centre(source.pick(all.claims)) : source.in_window(20);
      const mpq_class size =
          reference::power_of_two(source.between(-12, 0)) * reference::ratio(source.between(5, 9), 8);
      const Complex lo = reference::truncated(near + size * source.in_unit_disc() - Complex{size, size}, 40);
      const Complex hi = lo + mpq_class(2) * Complex{size, size / source.between(1, 3)};
      const IsolatedRoots roots = isolated(equation, regions::typed_box(lo, hi));
      const std::vector<Complex> expected = within(all, lo, hi);
      INFO("z_" << equation.late << " + z_" << equation.early << ", " << regions::typed_box(lo, hi));
      REQUIRE(roots.claims.size() <= expected.size());
      if (roots.is_complete) REQUIRE(roots.claims.size() == expected.size());
      for (const Claim& claim : roots.claims)
        REQUIRE(std::any_of(expected.begin(), expected.end(),
                            [&](const Complex& c) { return norm(c - centre(claim)) < reference::power_of_two(-100); }));
    }
  }
}

TEST_CASE("limits are kept, and the list is then not said to be complete") {
  const std::string all = "box -2.5-1.5i 1+1.5i";
  CHECK(isolated(kPeriod3, all).is_complete);
  CHECK(isolated(kPeriod3, all).claims.size() == 3);
  CHECK_FALSE(isolated(kPeriod3, all, {64, 10}).is_complete);
  CHECK_FALSE(isolated(kPeriod3, all, {}, 0).is_complete);
  CHECK(isolated(kPeriod3, all, {}, 0).claims.empty());
}

TEST_CASE("where cells are not cut far enough to tell roots apart the list is not said to be complete") {
  for (const slong places : {0, 1, 2, 3}) {
    const IsolatedRoots roots = isolated({0, 8}, "box -2.5-1.5i 1+1.5i", {places, 1'000'000});
    INFO(places << " places");
    CHECK(roots.claims.size() < 120);  // OEIS A000740, verified
    CHECK_FALSE(roots.is_complete);
  }
}

TEST_CASE("the discs are as small as is asked for") {
  for (const slong places : {64, 100, 300}) {
    IsolationLimits limits;
    limits.places = places;
    for (const Claim& claim : isolated(kPeriod3, "box -2.5-1.5i 1+1.5i", limits).claims)
      CHECK(exact(std::get<Disc>(claim.region).radius) == reference::power_of_two(-places));
  }
}
