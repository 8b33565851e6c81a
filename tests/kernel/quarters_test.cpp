// Lemma N1 (e): a statement that holds on each quarter of a box holds on the box. The truth comes from the exact
// inequality of the cardioid and from MPFR's escape indices (computed) at points of the box.

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using claims::established;
using reference::Complex;
using reference::PointSource;
using reference::power_of_two;
using reference::ratio;

namespace {

struct Corners {
  Complex lo, hi;
};

std::array<Corners, 4> quarters(const Corners& box) {
  const Complex middle = ratio(1, 2) * (box.lo + box.hi);
  return {Corners{box.lo, middle}, Corners{{middle.re, box.lo.im}, {box.hi.re, middle.im}},
          Corners{{box.lo.re, middle.im}, {middle.re, box.hi.im}}, Corners{middle, box.hi}};
}

bool outside(const Corners& box, const Rule& by) {
  return established(claims::claim(Outside{}, claims::box(box.lo, box.hi), by));
}

// A rule that shows the box to be outside: an escape, or quarters of quarters up to the depth.
std::optional<Rule> rule_for(const Corners& box, int depth) {
  for (std::uint64_t index = 1; index <= 12; ++index)
    if (outside(box, Escape{index, 64})) return Escape{index, 64};
  if (depth == 0) return std::nullopt;
  Quarters four;
  for (const Corners& quarter : quarters(box)) {
    auto by = rule_for(quarter, depth - 1);
    if (!by) return std::nullopt;
    four.rules.push_back(std::move(*by));
  }
  return four;
}

Rule nested(const Rule& innermost, int depth) {
  Rule by = innermost;
  for (int k = 0; k < depth; ++k) by = Quarters{{by, by, by, by}};
  return by;
}

const Corners kUnit{{ratio(-1, 16), ratio(-1, 16)}, {ratio(1, 16), ratio(1, 16)}};

Claim inside(const Corners& box, const Rule& by) { return claims::claim(Inside{}, claims::box(box.lo, box.hi), by); }

}  // namespace

TEST_CASE("boxes that quarters of quarters show to be outside escape at every sample") {
  PointSource source(1601);
  std::uint64_t cut = 0;
  for (std::uint64_t k = 0; k < reference::repeats(150); ++k) {
    const Complex lo = reference::truncated(source.in_window(20), 20);
    const mpq_class size = source.dyadic(2, source.between(-5, 0));
    const Corners box{lo, lo + Complex{size, size}};
    const auto by = rule_for(box, 3);
    if (!by) continue;
    REQUIRE(outside(box, *by));
    if (!std::holds_alternative<Quarters>(*by)) continue;
    ++cut;
    for (int i = 0; i < 20; ++i) {
      const mpq_class s = ratio(source.between(0, 16), 16), t = ratio(source.between(0, 16), 16);
      REQUIRE(reference::exact_escape_index(box.lo + Complex{s * size, t * size}, 2, 13) != 0);
    }
  }
  CHECK(cut > reference::repeats(150) / 20);
}

TEST_CASE("each rule stands for its own quarter") {
  const Corners box{{ratio(1, 2), ratio(1, 2)}, {ratio(3, 2), ratio(3, 2)}};
  std::vector<Rule> rules;
  for (const Corners& quarter : quarters(box)) {
    const auto by = rule_for(quarter, 5);
    REQUIRE(by);
    rules.push_back(*by);
  }
  REQUIRE(outside(box, Quarters{rules}));
  for (std::size_t i = 0; i < 4; ++i) {
    std::vector<Rule> wrong = rules;
    wrong[i] = Escape{1, 64};  // of no quarter: each has points with |c| <= 2
    REQUIRE_FALSE(outside(box, Quarters{wrong}));
  }
  // the lower left quarter is the only one that has to be cut
  REQUIRE(std::holds_alternative<Quarters>(rules[0]));
  REQUIRE(std::holds_alternative<Escape>(rules[3]));
  std::swap(rules[0], rules[3]);
  CHECK_FALSE(outside(box, Quarters{rules}));
}

TEST_CASE("a box of which one quarter reaches over the cardioid is not inside") {
  const Corners within{{ratio(-1, 4), ratio(-1, 4)}, {ratio(1, 8), ratio(1, 4)}};
  CHECK(established(inside(within, nested(ClosedForm{1}, 1))));
  const Corners beyond{{ratio(-1, 4), ratio(-1, 4)}, {ratio(3, 8), ratio(1, 4)}};
  CHECK_FALSE(established(inside(beyond, nested(ClosedForm{1}, 1))));
  CHECK_FALSE(established(inside(beyond, nested(ClosedForm{1}, 3))));
  CHECK(claims::refusal(inside(beyond, nested(ClosedForm{1}, 1))).find("quarter 1: ") == 0);
}

TEST_CASE("quarters are nested to the limit and no deeper") {
  CHECK(established(inside(kUnit, nested(ClosedForm{1}, 2))));
  // one path to the limit, closed forms beside it
  const auto path = [](int depth) {
    Rule by = ClosedForm{1};
    for (int k = 0; k < depth; ++k) by = Quarters{{by, ClosedForm{1}, ClosedForm{1}, ClosedForm{1}}};
    return by;
  };
  CHECK(established(inside(kUnit, path(kDeepestRule))));
  CHECK_FALSE(established(inside(kUnit, path(kDeepestRule + 1))));
  CHECK_FALSE(established(inside(kUnit, path(1000))));
  // a witness is one deep already
  const auto witnessed = [&](int depth) {
    return claims::claim(
        Straddles{}, claims::box({-1, -1}, {1, 1}),
        Witnesses{{inside(kUnit, path(depth)), claims::claim(Outside{}, claims::point({1, 0}), RealSegment{})}});
  };
  CHECK(established(witnessed(kDeepestRule - 1)));
  CHECK_FALSE(established(witnessed(kDeepestRule)));
}

TEST_CASE("quarters need four rules, each in range, of a box") {
  const Rule one = ClosedForm{1};
  CHECK(established(inside(kUnit, Quarters{{one, one, one, one}})));
  CHECK_FALSE(established(inside(kUnit, Quarters{{}})));
  CHECK_FALSE(established(inside(kUnit, Quarters{{one, one, one}})));
  CHECK_FALSE(established(inside(kUnit, Quarters{{one, one, one, one, one}})));
  CHECK_FALSE(established(inside(kUnit, Quarters{{one, one, one, ClosedForm{3}}})));
  CHECK_FALSE(established(inside(kUnit, Quarters{{one, one, one, Escape{0, 64}}})));
  for (const Region& region :
       {claims::disc({0, 0}, ratio(1, 16)), claims::point({0, 0}), claims::segment(0, ratio(1, 16))})
    CHECK_FALSE(established(claims::claim(Inside{}, region, nested(ClosedForm{1}, 1))));
}

TEST_CASE("statements that something is in a box do not follow from its quarters, nor do rules for other statements") {
  const Claim nucleus = claims::claim(Nucleus{1}, claims::box(kUnit.lo, kUnit.hi), nested(IsolatedRoot{64}, 1));
  CHECK_FALSE(established(nucleus));
  CHECK_FALSE(
      established(claims::claim(Misiurewicz{2, 1}, claims::box({-3, -1}, {-1, 1}), nested(IsolatedRoot{64}, 1))));
  CHECK_FALSE(established(inside(kUnit, nested(RealSegment{}, 1))));
  const Claim out = claims::claim(Outside{}, claims::point({1, 0}), RealSegment{});
  const Rule both = Witnesses{{inside(kUnit, ClosedForm{1}), out}};
  CHECK_FALSE(
      established(claims::claim(Straddles{}, claims::box({-1, -1}, {1, 1}), Quarters{{both, both, both, both}})));
  CHECK_FALSE(outside({{3, 3}, {4, 4}}, Quarters{{both, both, both, both}}));
}

TEST_CASE("the lemmas of all quarters are named once") {
  const Rule by = Quarters{{ClosedForm{1}, AttractingDisc{1, {{Dyadic(), Dyadic()}, Dyadic(0.5)}, 64}, ClosedForm{1},
                            nested(ClosedForm{1}, 1)}};
  const Outcome result = claims::outcome(inside(kUnit, by));
  CHECK(std::get<Established>(result).lemmas == std::vector<std::string>{"N1", "I3", "I1", "E2"});
}
