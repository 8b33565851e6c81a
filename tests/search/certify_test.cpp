// Claims written for proofs: established, independent of how the proof was found, and none for what is false.

#include "search/verdicts.hpp"

using namespace merestone;
using reference::ratio;

namespace {

const ComplexRational kPoint{Rational(-3, 4), Rational(1, 10)};

std::optional<Claim> written(const Statement& statement, const Rule& by, const Limits& limits = {}) {
  return certify(kPoint, "-0.75+0.1i", {statement, by}, limits);
}

std::uint32_t bits_in(const Claim& claim) { return std::get<Escape>(claim.by).bits; }

}  // namespace

TEST_CASE("a claim has the least precision at which the kernel establishes it") {
  // -3/4 + i/10 leaves at 33 (OEIS A097486, verified)
  for (const std::uint32_t found_with : {53U, 128U, 4096U}) {
    const auto claim = written(Count{Dyadic(2.0), 33}, Escape{0, found_with});
    REQUIRE(claim);
    CHECK(bits_in(*claim) == 64);
  }
  const auto near_tip = parse_complex("1e-200+i");
  const auto claim = certify(*near_tip, "1e-200+i", {Count{Dyadic(2.0), 533}, Escape{0, 1024}}, Limits{});
  REQUIRE(claim);
  Claim fewer = *claim;
  std::get<Escape>(fewer.by).bits = bits_in(*claim) / 2;
  CHECK(std::holds_alternative<NotEstablished>(establish(fewer, Limits{})));
}

TEST_CASE("nothing is written for what is false") {
  CHECK_FALSE(written(Count{Dyadic(2.0), 32}, Escape{0, 64}));
  CHECK_FALSE(written(Count{Dyadic(2.0), 34}, Escape{0, 64}));
  CHECK_FALSE(written(Count{Dyadic(4.0), 33}, Escape{0, 64}));
  CHECK_FALSE(written(Inside{}, ClosedForm{1}));
  CHECK_FALSE(written(Inside{}, ClosedForm{2}));
  CHECK_FALSE(written(Member{}, RealSegment{}));
  CHECK_FALSE(written(Member{}, Preperiodic{2, 1}));
  CHECK_FALSE(written(Inside{}, AttractingDisc{1, {{Dyadic(-0.5), Dyadic()}, Dyadic(0.125)}, 64}));
  CHECK_FALSE(written(Member{}, Escape{33, 64}));
}

TEST_CASE("nothing is written beyond the limits or for another request") {
  CHECK_FALSE(written(Count{Dyadic(2.0), 33}, Escape{0, 64}, Limits{10, 65'536}));
  CHECK_FALSE(written(Count{Dyadic(2.0), 33}, Escape{0, 64}, Limits{1'000'000, 63}));
  CHECK(written(Count{Dyadic(2.0), 33}, Escape{0, 64}, Limits{1'000'000, 64}));
  CHECK_FALSE(certify(kPoint, "-0.75+0.2i", {Count{Dyadic(2.0), 33}, Escape{0, 64}}, Limits{}));
  CHECK(certify(kPoint, std::nullopt, {Count{Dyadic(2.0), 33}, Escape{0, 64}}, Limits{}));
}
