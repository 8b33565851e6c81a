// What establish() accepts at all: which rule fits which claim, the hints' ranges, the request, the limits on work.

#include <cmath>
#include <limits>

#include "catch.hpp"
#include "kernel/claims.hpp"

using namespace merestone;
using claims::established;
using claims::point;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;

namespace {

bool refused(const Claim& claim) { return std::holds_alternative<NotEstablished>(claims::outcome(claim)); }

Claim with_request(Claim claim, const std::string& request) {
  claim.request = request;
  return claim;
}

const Disc kHalf{{Dyadic(), Dyadic()}, Dyadic(0.5)};

}  // namespace

TEST_CASE("a rule establishes only the statements that its lemma is about") {
  // for every pair that does not fit, a region of which the statement is true and the rule's own inequality holds
  const Rule escape = Escape{3, 64}, escape_for_count = Escape{0, 64}, disc = AttractingDisc{1, kHalf, 64},
             closed = ClosedForm{1}, real = RealSegment{}, preperiodic = Preperiodic{2, 1};
  const Statement count = Count{Dyadic(2.0), 3};
  const auto holds = [](const Statement& s, const Complex& c, const Rule& by) {
    return established(claims::claim(s, point(c), by));
  };
  const Complex one{1, 0}, zero{0, 0}, tip{-2, 0};
  CHECK(holds(Outside{}, one, escape));
  CHECK_FALSE(holds(Inside{}, one, escape));
  CHECK_FALSE(holds(Member{}, one, escape));
  CHECK(holds(count, one, escape_for_count));
  CHECK(holds(Inside{}, zero, disc));
  CHECK_FALSE(holds(Outside{}, zero, disc));
  CHECK_FALSE(holds(Member{}, zero, disc));
  CHECK_FALSE(holds(count, zero, disc));
  CHECK(holds(Inside{}, zero, closed));
  CHECK(holds(Member{}, zero, closed));
  CHECK_FALSE(holds(Outside{}, zero, closed));
  CHECK_FALSE(holds(count, zero, closed));
  CHECK(holds(Outside{}, one, real));
  CHECK(holds(Member{}, zero, real));
  CHECK_FALSE(holds(Inside{}, zero, real));
  CHECK_FALSE(holds(count, one, real));
  CHECK(holds(Member{}, tip, preperiodic));
  CHECK_FALSE(holds(Inside{}, tip, preperiodic));
  CHECK_FALSE(holds(Outside{}, tip, preperiodic));
  CHECK_FALSE(holds(count, tip, preperiodic));
}

TEST_CASE("a disc or a root establishes no statement but its own") {
  // each rule at a place where its own inequality holds, first with the statement that it is for
  const ComplexDyadic one = reference::to_dyadic(Complex{1, 0}), minus_one = reference::to_dyadic(Complex{-1, 0});
  const AttractingDisc cycle{2, {{}, Dyadic(0x1p-20)}, 128};
  const Region tip = claims::disc({-2, 0}, ratio(1, 16));
  struct Fitting {
    Region region;
    Rule by;
    Statement own;
  };
  const std::vector<Statement> all = {Outside{},   Inside{},   Member{},         Count{Dyadic(2.0), 3},
                                      Straddles{}, Nucleus{2}, Misiurewicz{2, 1}};
  for (const Fitting& f :
       {Fitting{point({1, 0}), ExteriorDisc{one, 6, 128}, Outside{}},
        Fitting{point({-1, 0}), InteriorDisc{minus_one, cycle}, Inside{}},
        Fitting{claims::disc({-1, 0}, ratio(1, 16)), IsolatedRoot{64}, Nucleus{2}},
        Fitting{tip, IsolatedRoot{64}, Misiurewicz{2, 1}},
        Fitting{tip, Witnesses{{claims::claim(Misiurewicz{2, 1}, tip, IsolatedRoot{64})}}, Straddles{}},
        Fitting{claims::box({3, 3}, {4, 4}), Quarters{std::vector<Rule>(4, Escape{1, 64})}, Outside{}},
        Fitting{claims::box({0, 0}, {ratio(1, 8), ratio(1, 8)}), Quarters{std::vector<Rule>(4, ClosedForm{1})},
                Inside{}}})
    for (const Statement& statement : all) {
      INFO("rule " << f.by.index() << ", statement " << statement.index());
      CHECK(established(claims::claim(statement, f.region, f.by)) == (statement == f.own));
    }
}

TEST_CASE("a bailout below 2 or above 2^60 and an index of 0 are refused") {
  // with bailout 1 the count 2 of c = -1.1 would be "established" and nothing would follow from it
  const auto count = [](const mpq_class& bailout, std::uint64_t index, const Complex& c) {
    return claims::count(point(c), bailout, index, 64);
  };
  CHECK(established(count(2, 3, {1, 0})));
  CHECK(refused(count(1, 1, {ratio(-11, 10), 0})));
  CHECK(refused(count(2 - power_of_two(-60), 1, {3, 0})));
  CHECK(refused(count(0, 1, {1, 0})));
  CHECK(refused(count(-2, 1, {3, 0})));
  CHECK(established(count(power_of_two(60), 1, {power_of_two(61), 0})));
  CHECK(refused(count(power_of_two(60) + 1, 1, {power_of_two(61), 0})));
  CHECK(refused(count(2, 0, {3, 0})));
  CHECK(refused(claims::outside(point({3, 0}), 0, 64)));
  CHECK(refused(claims::claim(Count{Dyadic(2.0), 1}, point({3, 0}), Escape{1, 64})));
  CHECK(established(claims::claim(Count{Dyadic(2.0), 1}, point({3, 0}), Escape{0, 64})));
}

TEST_CASE("precisions, periods and radii out of range are refused") {
  for (const std::uint32_t bits : {0U, 1U}) {
    CHECK(refused(claims::outside(point({3, 0}), 1, bits)));
    CHECK(refused(claims::count(point({3, 0}), 2, 1, bits)));
    CHECK(refused(claims::inside(point({0, 0}), 1, {0, 0}, ratio(1, 2), bits)));
  }
  CHECK(established(claims::outside(point({3, 0}), 1, 2)));
  CHECK(established(claims::inside(point({0, 0}), 1, {0, 0}, ratio(1, 2), 2)));
  CHECK(refused(claims::inside(point({0, 0}), 0, {0, 0}, ratio(1, 2), 64)));
  CHECK(refused(claims::inside(point({0, 0}), 1, {0, 0}, 0, 64)));
  CHECK(refused(claims::inside(point({0, 0}), 1, {0, 0}, ratio(-1, 2), 64)));
  for (const std::uint32_t period : {0U, 3U, 4U, 1000U}) {
    CHECK(refused(claims::claim(Inside{}, point({0, 0}), ClosedForm{period})));
    CHECK(refused(claims::claim(Member{}, point({-1, 0}), ClosedForm{period})));
  }
  CHECK(refused(claims::claim(Member{}, point({0, 0}), Preperiodic{0, 0})));
  CHECK(refused(claims::claim(Member{}, point({1, 0}), Preperiodic{5, 0})));
}

TEST_CASE("a region that is none is refused, whatever is claimed of it") {
  // of an empty set everything is true: D(1/4, -13/128) "contained" the request 0.26, which is not in M
  const auto everything = [](const Region& region) {
    return std::vector<Claim>{claims::outside(region, 1, 64),
                              claims::count(region, 2, 1, 64),
                              claims::inside(region, 1, {0, 0}, ratio(1, 2), 64),
                              claims::claim(Inside{}, region, ClosedForm{1}),
                              claims::claim(Member{}, region, ClosedForm{1}),
                              claims::claim(Member{}, region, RealSegment{}),
                              claims::claim(Outside{}, region, RealSegment{})};
  };
  for (const mpq_class& radius : {ratio(-13, 128), ratio(-3, 128), mpq_class(-4), mpq_class(0)})
    for (const Complex& centre : {Complex{ratio(1, 4), 0}, Complex{0, 0}, Complex{5, 0}})
      for (const Claim& claim : everything(claims::disc(centre, radius))) CHECK(refused(claim));
  for (const Claim& claim : everything(claims::segment(ratio(1, 8), -3))) CHECK(refused(claim));
  for (const Claim& claim : everything(claims::segment(3, ratio(-1, 8)))) CHECK(refused(claim));
  CHECK(refused(
      with_request(claims::claim(Inside{}, claims::disc({ratio(1, 4), 0}, ratio(-13, 128)), ClosedForm{1}), "0.26")));
}

TEST_CASE("the region must contain the request, exactly") {
  const Claim at = claims::claim(Member{}, claims::point({ratio(1, 4), 0}), ClosedForm{1});
  for (const char* same : {"1/4", "0.25", "2/8", "0x1p-2", "0.25,0", "25e-2+0i"})
    CHECK(established(with_request(at, same)));
  for (const char* other : {"0.26", "-1/4", "1/4+1e-400i", "0.2500000000000000000000000000000001", "0.25,1e-5", "1/3"})
    CHECK(refused(with_request(at, other)));
  for (const char* unread : {"", "x", "1/0", "nan", "1/4 1/4",
                             "\xE2\x88\x92"
                             "1"})
    CHECK(refused(with_request(at, unread)));
  const Claim about = claims::outside(claims::disc({3, 0}, ratio(1, 2)), 1, 64);
  for (const char* within : {"3", "2.5", "3.5", "3+1/2i", "2.7+0.4i"}) CHECK(established(with_request(about, within)));
  for (const char* beyond : {"2.4999999", "3.5+1e-300i", "3+0.5000001i", "2.6+0.4i", "4"})
    CHECK(refused(with_request(about, beyond)));
  const Claim along = claims::claim(Member{}, claims::segment(-1, 0), RealSegment{});
  CHECK(established(with_request(along, "-1/2")));
  CHECK(refused(with_request(along, "1/8")));
  CHECK(refused(with_request(along, "-1/2+1e-300i")));
}

TEST_CASE("a request may be a box or a disc, which the region must contain as a whole") {
  const Claim about = claims::outside(claims::disc({3, 0}, ratio(1, 2)), 1, 64);
  for (const char* within : {"disc 3 1/2", "disc 3 0.4999", "disc 3+1/4i 1/4", "box 2.7-0.4i 3.3+0.4i"})
    CHECK(established(with_request(about, within)));
  for (const char* beyond :
       {"box 3,0 3.5,1e-9", "disc 3 0.5000001", "disc 3+1e-300i 1/2", "box 2.7-0.4i 3.3+0.4001i", "disc 3 8"})
    CHECK(refused(with_request(about, beyond)));
  const Claim over =
      claims::claim(Inside{}, claims::box({ratio(-1, 8), ratio(-1, 8)}, {ratio(1, 8), ratio(1, 8)}), ClosedForm{1});
  for (const char* within : {"box -1/8-1/8i 1/8+1/8i", "box -1/8+1/8i 1/8-1/8i", "disc 0 1/8", "0.125-0.125i"})
    CHECK(established(with_request(over, within)));
  for (const char* beyond : {"box -1/8-1/8i 1/8+0.126i", "disc 0 0.126", "disc 1e-300 1/8", "box -1-i 1+i"})
    CHECK(refused(with_request(over, beyond)));
  for (const char* unread : {"box 0 0", "disc 0 -1", "box 0", "disc 0 1 2", "box 0 1+i,"})
    CHECK(refused(with_request(over, unread)));
}

TEST_CASE("what is in the region must be in the request, so the request contains the region") {
  const Claim nucleus = claims::claim(Nucleus{2}, claims::disc({-1, 0}, ratio(1, 16)), IsolatedRoot{64}),
              tip = claims::claim(Misiurewicz{2, 1}, claims::disc({-2, 0}, ratio(1, 16)), IsolatedRoot{64}),
              boundary = claims::claim(Straddles{}, claims::disc({-2, 0}, ratio(1, 16)), Witnesses{{tip}});
  CHECK(established(with_request(nucleus, "disc -1 1/16")));
  CHECK(established(with_request(nucleus, "box -2-i 0+i")));
  for (const char* smaller : {"disc -1 1/32", "-1", "disc -1+1e-300i 1/16", "box -1-i 0+i", "disc -1 0.0624999"})
    CHECK(refused(with_request(nucleus, smaller)));
  for (const Claim& claim : {tip, boundary}) {
    CHECK(established(with_request(claim, "disc -2 1/16")));
    CHECK(established(with_request(claim, "disc -2 1")));
    CHECK(established(with_request(claim, "box -2.0625-0.0625i -1.9375+0.0625i")));
    for (const char* smaller : {"-2", "disc -2 1/17", "box -2.0625-0.0625i -1.9375+0.0624i", "disc -2+1e-300 1/16"})
      CHECK(refused(with_request(claim, smaller)));
  }
}

TEST_CASE("numbers that are not finite, or far larger than certificates admit, are refused") {
  const double infinity = std::numeric_limits<double>::infinity(), nan = std::nan("");
  Integer one;
  fmpz_one(one);
  const Dyadic zero, half(0.5), huge = Dyadic::scaled(one, 1'000'000'000'000),
                                tiny = Dyadic::scaled(one, -1'000'000'000'000);
  const auto refused_everywhere = [](const Region& region) {
    return refused(claims::claim(Inside{}, region, ClosedForm{1})) &&
           refused(claims::claim(Member{}, region, RealSegment{})) &&
           refused(claims::claim(Outside{}, region, RealSegment{})) && refused(claims::outside(region, 1, 64));
  };
  for (const Dyadic& bad : {Dyadic(infinity), Dyadic(-infinity), Dyadic(nan), huge, tiny}) {
    CHECK(refused_everywhere(Disc{{bad, zero}, half}));
    CHECK(refused_everywhere(Disc{{zero, bad}, half}));
    CHECK(refused_everywhere(Disc{{zero, zero}, bad}));
    CHECK(refused_everywhere(Segment{bad, half}));
    CHECK(refused_everywhere(Segment{half, bad}));
    for (const Disc& hint : {Disc{{bad, zero}, half}, Disc{{zero, bad}, half}, Disc{{zero, zero}, bad}})
      CHECK(refused(claims::claim(Inside{}, claims::point({0, 0}), AttractingDisc{1, hint, 64})));
    CHECK(refused(claims::claim(Count{bad, 1}, claims::point({3, 0}), Escape{0, 64})));
  }
}

TEST_CASE("a claim above a limit is refused before anything is computed") {
  const auto over = [](const Claim& claim, const Limits& limits) {
    return std::holds_alternative<OverLimit>(establish(claim, limits));
  };
  for (const Claim& claim : {claims::count(point({1, 0}), 2, 3, 64), claims::outside(point({1, 0}), 900, 128),
                             claims::inside(point({0, 0}), 40, {0, 0}, ratio(1, 2), 64),
                             claims::claim(Member{}, point({0, 1}), Preperiodic{2, 20}),
                             claims::claim(Member{}, point({ratio(1, 3), 0}), RealSegment{})}) {
    const std::uint64_t work = work_of(claim);
    CHECK_FALSE(over(claim, {work, 65'536}));
    CHECK(over(claim, {work - 1, 65'536}));
    CHECK_FALSE(over(claim, {work, bits_of(claim)}));
    CHECK(over(claim, {work, bits_of(claim) - 1}));
  }
  CHECK(over(claims::outside(point({1, 0}), 1'000'000'001, 64), Limits{}));
  CHECK(over(claims::count(point({1, 0}), 2, 1'000'000'001, 64), Limits{}));
  CHECK(over(claims::inside(point({0, 0}), 1'000'000'001, {0, 0}, ratio(1, 2), 64), Limits{}));
  CHECK(over(claims::claim(Member{}, point({0, 0}), Preperiodic{1'000'000'000, 1}), Limits{}));
  CHECK(over(claims::outside(point({1, 0}), 3, 65'537), Limits{}));
  CHECK_FALSE(over(claims::outside(point({1, 0}), 3, 65'536), Limits{}));
  CHECK(over(claims::outside(point({1, 0}), ~std::uint64_t{0}, 0xFFFFFFFFU), {1'000'000'000'000, 0xFFFFFFFFU}));
}

TEST_CASE("the work of a claim grows with its steps, its precision and its numbers") {
  const auto at = [](std::uint64_t index, std::uint32_t bits) {
    return work_of(claims::outside(point({1, 0}), index, bits));
  };
  CHECK(at(1'000'000, 64) >= 1'000'000);
  CHECK(at(1'000'000, 64) <= 1'001'000);
  CHECK(at(1'000'000, 65) >= 2'000'000);
  CHECK(at(1'000'000, 640) >= 10'000'000);
  CHECK(at(2'000'000, 64) > at(1'000'000, 64));
  CHECK(work_of(claims::count(point({1, 0}), 2, 5'000'000, 64)) >= 5'000'000);
  CHECK(work_of(claims::inside(point({0, 0}), 12'000'000, {0, 0}, 1, 64)) >= 12'000'000);
  CHECK(work_of(claims::claim(Member{}, point({0, 0}), Preperiodic{3'000'000, 4'000'000})) >= 7'000'000);
  const Claim simple = claims::claim(Member{}, point({0, 0}), RealSegment{});
  const Claim long_point = claims::claim(Member{}, point({-power_of_two(-300'000), 0}), RealSegment{});
  const Claim long_disc = claims::claim(Inside{}, claims::disc({0, 0}, power_of_two(-300'000)), ClosedForm{1});
  CHECK(work_of(long_point) > work_of(simple) + 1000);
  CHECK(work_of(long_disc) > work_of(simple) + 1000);
  CHECK(work_of(with_request(simple, std::string(90'000, '0'))) > work_of(simple) + 1000);
  CHECK(work_of(with_request(simple, "0e-100000")) > work_of(simple) + 1000);
  CHECK(at(~std::uint64_t{0}, 0xFFFFFFFFU) >= std::uint64_t{1} << 63);
}
