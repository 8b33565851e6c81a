// The ranges that rules require of regions, statements and hints, as kernel/claim.hpp and docs/certificate-format.md
// state them.

#include "kernel/sane.hpp"

#include <cmath>
#include <limits>

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "kernel/work.hpp"

using namespace merestone;
using claims::claim;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;

namespace {

const Region kPoint = claims::point({0, 0}), kDisc = claims::disc({0, 0}, 1);
constexpr std::uint64_t kMost = std::uint64_t{1} << 53;

bool sane(const Statement& statement, const Rule& by) { return hints_are_sane(claim(statement, kDisc, by)); }

std::vector<Dyadic> improper_numbers() {
  const double infinity = std::numeric_limits<double>::infinity();
  Integer one;
  fmpz_one(one);
  return {Dyadic(infinity), Dyadic(-infinity), Dyadic(std::nan("")), Dyadic::scaled(one, 1'000'000'000'000),
          Dyadic::scaled(one, -1'000'000'000'000)};
}

}  // namespace

TEST_CASE("regions are proper when their ends are in order and their numbers moderate") {
  CHECK(is_proper(kPoint));
  CHECK(is_proper(claims::segment(0, 1)));
  CHECK_FALSE(is_proper(claims::segment(1, 1)));
  CHECK_FALSE(is_proper(claims::segment(1, 0)));
  CHECK(is_proper(claims::disc({0, 0}, power_of_two(-1000))));
  CHECK_FALSE(is_proper(claims::disc({0, 0}, 0)));
  CHECK_FALSE(is_proper(claims::disc({0, 0}, -1)));
  CHECK(is_proper(claims::box({0, 0}, {1, power_of_two(-1000)})));
  for (const auto& [lo, hi] : {std::pair<Complex, Complex>{{0, 0}, {0, 1}},
                               {{0, 0}, {1, 0}},
                               {{0, 0}, {-1, 1}},
                               {{0, 0}, {1, -1}},
                               {{0, 0}, {0, 0}},
                               {{1, 1}, {0, 0}}})
    CHECK_FALSE(is_proper(claims::box(lo, hi)));
  const Dyadic one(1.0), minus(-1.0);
  for (const Dyadic& bad : improper_numbers()) {
    for (const Box& box : {Box{{bad, minus}, {one, one}}, Box{{minus, bad}, {one, one}},
                           Box{{minus, minus}, {bad, one}}, Box{{minus, minus}, {one, bad}}})
      CHECK_FALSE(is_proper(box));
    for (const Disc& disc : {Disc{{bad, one}, one}, Disc{{one, bad}, one}, Disc{{one, one}, bad}})
      CHECK_FALSE(is_proper(disc));
    CHECK_FALSE(is_proper(Segment{bad, one}));
    CHECK_FALSE(is_proper(Segment{one, bad}));
  }
}

TEST_CASE("periods are 1 to 2^53, preperiods of Misiurewicz points 2 to 2^53") {
  const Rule by = IsolatedRoot{64};
  for (const std::uint64_t p : {std::uint64_t{1}, std::uint64_t{7}, kMost}) {
    CHECK(sane(Nucleus{p}, by));
    CHECK(sane(Misiurewicz{2, p}, by));
    CHECK(sane(Misiurewicz{p + 1 < kMost ? p + 1 : kMost, 1}, by));
  }
  for (const std::uint64_t p : {std::uint64_t{0}, kMost + 1, ~std::uint64_t{0}}) {
    CHECK_FALSE(sane(Nucleus{p}, by));
    CHECK_FALSE(sane(Misiurewicz{2, p}, by));
    CHECK_FALSE(sane(Misiurewicz{p, 1}, by));
  }
  CHECK_FALSE(sane(Misiurewicz{1, 1}, by));
  for (const std::uint32_t bits : {0U, 1U}) CHECK_FALSE(sane(Nucleus{1}, IsolatedRoot{bits}));
  CHECK(sane(Nucleus{1}, IsolatedRoot{2}));
}

TEST_CASE("hints of discs are in range") {
  const ComplexDyadic zero{};
  CHECK(sane(Outside{}, ExteriorDisc{zero, 1, 2}));
  CHECK_FALSE(sane(Outside{}, ExteriorDisc{zero, 0, 64}));
  CHECK_FALSE(sane(Outside{}, ExteriorDisc{zero, 1, 1}));
  const AttractingDisc cycle{1, {zero, Dyadic(1.0)}, 2};
  CHECK(sane(Inside{}, InteriorDisc{zero, cycle}));
  CHECK_FALSE(sane(Inside{}, InteriorDisc{zero, {0, cycle.disc, 64}}));
  CHECK_FALSE(sane(Inside{}, InteriorDisc{zero, {kMost + 1, cycle.disc, 64}}));
  CHECK_FALSE(sane(Inside{}, InteriorDisc{zero, {1, cycle.disc, 1}}));
  CHECK_FALSE(sane(Inside{}, InteriorDisc{zero, {1, {zero, Dyadic()}, 64}}));
  for (const Dyadic& bad : improper_numbers())
    for (const ComplexDyadic& centre : {ComplexDyadic{bad, Dyadic()}, ComplexDyadic{Dyadic(), bad}}) {
      CHECK_FALSE(sane(Outside{}, ExteriorDisc{centre, 1, 64}));
      CHECK_FALSE(sane(Inside{}, InteriorDisc{centre, cycle}));
      CHECK_FALSE(sane(Inside{}, InteriorDisc{zero, {1, {centre, Dyadic(1.0)}, 64}}));
    }
}

TEST_CASE("claims within a rule are as sane as others") {
  const Claim good = claim(Inside{}, kPoint, ClosedForm{1});
  CHECK(sane(Straddles{}, Witnesses{{good}}));
  CHECK(sane(Straddles{}, Witnesses{{good, good}}));
  CHECK_FALSE(sane(Straddles{}, Witnesses{}));
  CHECK_FALSE(sane(Straddles{}, Witnesses{{good, good, good}}));
  for (const Claim& bad :
       {claim(Inside{}, kPoint, ClosedForm{0}), claim(Inside{}, claims::disc({0, 0}, 0), ClosedForm{1}),
        claim(Count{Dyadic(1.0), 3}, kPoint, Escape{0, 64}), claim(Nucleus{0}, kDisc, IsolatedRoot{64}),
        claim(Straddles{}, kDisc, Witnesses{{good}}), claim(Outside{}, kPoint, Escape{0, 64})}) {
    CHECK_FALSE(sane(Straddles{}, Witnesses{{bad}}));
    CHECK_FALSE(sane(Straddles{}, Witnesses{{good, bad}}));
  }
  // Escape has its index in the statement for Count, in the rule for Outside; so too within witnesses and quarters
  CHECK(sane(Straddles{}, Witnesses{{claim(Count{Dyadic(2.0), 3}, kPoint, Escape{0, 64})}}));
  CHECK_FALSE(sane(Straddles{}, Witnesses{{claim(Count{Dyadic(2.0), 3}, kPoint, Escape{3, 64})}}));
  const Rule escape = Escape{3, 64}, none = Escape{0, 64};
  CHECK(sane(Outside{}, Quarters{{escape, escape, escape, escape}}));
  for (std::size_t i = 0; i < 4; ++i) {
    std::vector<Rule> rules(4, escape);
    rules[i] = none;
    CHECK_FALSE(sane(Outside{}, Quarters{rules}));
  }
}
