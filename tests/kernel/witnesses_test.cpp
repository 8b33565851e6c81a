// Lemma P3: a region that holds a member and a parameter outside, or a Misiurewicz point, meets the boundary of M.
// Which points are which is known exactly: 0 and -1 are nuclei, -2 and i Misiurewicz points (textbook), 1/4 + s is
// outside (M meets the reals in [-2, 1/4], textbook).

#include "catch.hpp"
#include "kernel/claims.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using claims::established;
using reference::Complex;
using reference::power_of_two;
using reference::ratio;

namespace {

Claim straddles(const Region& region, std::vector<Claim> witnesses) {
  return claims::claim(Straddles{}, region, Witnesses{std::move(witnesses)});
}

const mpq_class kTiny = power_of_two(-10);

Claim outside_at(const Complex& c) { return claims::claim(Outside{}, claims::point(c), RealSegment{}); }
Claim inside_at(const Complex& c) { return claims::claim(Inside{}, claims::point(c), ClosedForm{1}); }
Claim member_at(const Complex& c) { return claims::claim(Member{}, claims::point(c), RealSegment{}); }
Claim nucleus_about(const Complex& c, std::uint64_t period) {
  return claims::claim(Nucleus{period}, claims::disc(c, kTiny), IsolatedRoot{64});
}
Claim misiurewicz_about(const Complex& c, std::uint64_t preperiod, std::uint64_t period) {
  return claims::claim(Misiurewicz{preperiod, period}, claims::disc(c, kTiny), IsolatedRoot{64});
}

// [-1/4, 1/2] x [-1/4, 1/4]
const Region kAboutCusp = claims::box({ratio(-1, 4), ratio(-1, 4)}, {ratio(1, 2), ratio(1, 4)});
const Complex kZero{0, 0}, kOutside{ratio(3, 8), 0};

}  // namespace

TEST_CASE("a member and a parameter outside straddle the boundary, in either order and however they are shown") {
  const std::vector<Claim> members = {inside_at(kZero), member_at(kZero), member_at({ratio(1, 4), 0}),
                                      nucleus_about(kZero, 1)},
                           others = {outside_at(kOutside), claims::count(claims::point(kOutside), 2, 7, 64),
                                     claims::outside(claims::point(kOutside), 9, 64)};
  for (const Claim& member : members)
    for (const Claim& other : others) {
      REQUIRE(established(member));
      CHECK(established(straddles(kAboutCusp, {member, other})));
      CHECK(established(straddles(kAboutCusp, {other, member})));
    }
}

TEST_CASE("a Misiurewicz point alone straddles the boundary") {
  CHECK(established(straddles(claims::disc({-2, 0}, ratio(1, 8)), {misiurewicz_about({-2, 0}, 2, 1)})));
  CHECK(established(straddles(claims::disc({0, 1}, kTiny), {misiurewicz_about({0, 1}, 2, 2)})));
  CHECK(established(straddles(claims::disc({0, 1}, 2), {misiurewicz_about({0, 1}, 2, 2), nucleus_about({0, 0}, 1)})));
}

TEST_CASE("witnesses of one kind show nothing, however many they are") {
  const Claim out = outside_at(kOutside), other_out = outside_at({ratio(7, 16), 0}),
              count = claims::count(claims::point(kOutside), 2, 7, 64);
  for (const std::vector<Claim>& some : {std::vector<Claim>{out},
                                         {out, other_out},
                                         {count},
                                         {count, out},
                                         {out, out},
                                         {inside_at(kZero)},
                                         {inside_at(kZero), member_at(kZero)},
                                         {nucleus_about(kZero, 1)},
                                         {nucleus_about(kZero, 1), inside_at(kZero)}})
    CHECK_FALSE(established(straddles(kAboutCusp, some)));
  CHECK(claims::refusal(straddles(kAboutCusp, {out})) == "no witness is a member of M");
  CHECK(claims::refusal(straddles(kAboutCusp, {inside_at(kZero)})) == "no witness is outside M or on its boundary");
}

TEST_CASE("a witness must lie in the region, wholly") {
  const mpq_class least = power_of_two(-300);
  const Claim in = inside_at(kZero), out = outside_at(kOutside);
  const auto up_to = [&](const mpq_class& end) { return claims::segment(0, end); };
  CHECK(established(straddles(up_to(ratio(3, 8)), {in, out})));
  CHECK_FALSE(established(straddles(up_to(ratio(3, 8) - least), {in, out})));
  CHECK_FALSE(established(straddles(claims::segment(least, ratio(3, 8)), {in, out})));
  CHECK_FALSE(established(straddles(claims::segment(least, ratio(3, 8)), {out, in})));
  // the nucleus is in the region, the disc that isolates it is not
  const Claim nucleus = nucleus_about(kZero, 1);
  CHECK(established(straddles(claims::box({-kTiny, -kTiny}, {1, 1}), {nucleus, out})));
  CHECK_FALSE(established(straddles(claims::box({-kTiny + least, -kTiny}, {1, 1}), {nucleus, out})));
  CHECK_FALSE(established(straddles(claims::disc({-2, 0}, kTiny - least), {misiurewicz_about({-2, 0}, 2, 1)})));
  CHECK(established(straddles(claims::disc({-2, 0}, kTiny), {misiurewicz_about({-2, 0}, 2, 1)})));
}

TEST_CASE("a witness that is not established establishes nothing, nor does any other beside it") {
  const Claim in = inside_at(kZero), out = outside_at(kOutside);
  for (const Claim& wrong :
       {outside_at(kZero), inside_at(kOutside), member_at(kOutside), claims::outside(claims::point(kZero), 50, 64),
        nucleus_about(kZero, 2), misiurewicz_about(kZero, 2, 1),
        claims::claim(Outside{}, claims::point(kOutside), ClosedForm{1}),
        claims::count(claims::point(kOutside), 2, 6, 64)}) {
    CHECK_FALSE(established(wrong));
    for (const std::vector<Claim>& some :
         {std::vector<Claim>{wrong, in}, {wrong, out}, {in, wrong}, {out, wrong}, {wrong}})
      CHECK_FALSE(established(straddles(kAboutCusp, some)));
  }
}

TEST_CASE("a refusal names the witness, and the lemmas of the witnesses are named") {
  const std::string reason = claims::refusal(straddles(kAboutCusp, {inside_at(kZero), outside_at(kZero)}));
  CHECK(reason == "witness 1: the region meets [-2, 1/4]");
  CHECK(claims::refusal(straddles(kAboutCusp, {inside_at({-1, 0}), outside_at(kOutside)})) ==
        "witness 0: its region does not lie in the region");
  const Outcome both = claims::outcome(straddles(kAboutCusp, {inside_at(kZero), outside_at(kOutside)}));
  CHECK(std::get<Established>(both).lemmas == std::vector<std::string>{"P3", "I3", "I4"});
}

TEST_CASE("witnesses take no witnesses, no request, and at least one and at most two claims") {
  const Claim in = inside_at(kZero), out = outside_at(kOutside), whole = straddles(kAboutCusp, {in, out});
  REQUIRE(established(whole));
  CHECK_FALSE(established(straddles(kAboutCusp, {})));
  CHECK_FALSE(established(straddles(kAboutCusp, {in, out, in})));
  CHECK_FALSE(established(straddles(kAboutCusp, {whole, whole})));
  CHECK_FALSE(established(straddles(kAboutCusp, {in, whole})));
  Claim asked = in;
  asked.request = "0";
  CHECK(established(asked));
  CHECK_FALSE(established(straddles(kAboutCusp, {asked, out})));
  CHECK_FALSE(
      established(straddles(kAboutCusp, {claims::claim(Inside{}, claims::disc(kZero, 0), ClosedForm{1}), out})));
  CHECK_FALSE(established(straddles(kAboutCusp, {claims::claim(Inside{}, claims::point(kZero), ClosedForm{3}), out})));
}

TEST_CASE("only straddling is shown by witnesses, and by nothing else") {
  const std::vector<Claim> both = {inside_at(kZero), outside_at(kOutside)};
  for (const Statement& statement :
       std::vector<Statement>{Outside{}, Inside{}, Member{}, Count{Dyadic(2.0), 6}, Nucleus{1}, Misiurewicz{2, 1}})
    CHECK_FALSE(established(claims::claim(statement, kAboutCusp, Witnesses{both})));
  for (const Rule& by :
       std::vector<Rule>{Escape{5, 64}, ClosedForm{1}, RealSegment{}, Preperiodic{2, 1}, IsolatedRoot{64}})
    CHECK_FALSE(established(claims::claim(Straddles{}, claims::disc({-2, 0}, kTiny), by)));
}
