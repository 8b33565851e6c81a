#include "catch.hpp"

#include <random>

#include "format/literal.hpp"
#include "kernel/typed_number.hpp"

using namespace merestone;

namespace {

// The literal's ends as exact rationals, read by the reader of typed decimals.
std::pair<Rational, Rational> ends_of(const std::string& literal) {
  REQUIRE(literal.front() == '[');
  REQUIRE(literal.back() == ']');
  const std::string inner = literal.substr(1, literal.size() - 2);
  const std::size_t comma = inner.find(',');
  const Result<Rational> lower = parse_real(inner.substr(0, comma));
  const Result<Rational> upper = comma == inner.npos ? lower : parse_real(inner.substr(comma + 2));
  REQUIRE(lower);
  REQUIRE(upper);
  return {*lower, *upper};
}

}  // namespace

TEST_CASE("literals worked by hand") {
  CHECK(interval_literal(Dyadic(0.5), Dyadic(0.5), 6) == "[0.5]");
  CHECK(interval_literal(Dyadic(0.0), Dyadic(0.0), 6) == "[0]");
  CHECK(interval_literal(Dyadic(-0.25), Dyadic(3.0), 6) == "[-0.25, 3]");
  CHECK(interval_literal(Dyadic(0.328125), Dyadic(0.328125), 3) == "[0.328, 0.329]");
  CHECK(interval_literal(Dyadic(-0.328125), Dyadic(-0.328125), 3) == "[-0.329, -0.328]");
  CHECK(interval_literal(Dyadic(999.75), Dyadic(999.75), 3) == "[999, 1000]");
  CHECK(interval_literal(Dyadic(0x1p-20), Dyadic(0x1p-20), 3) == "[9.53e-7, 9.54e-7]");
  CHECK(interval_literal(Dyadic(0x1p80), Dyadic(0x1p80), 2) == "[1.2e24, 1.3e24]");
  CHECK(interval_literal(std::nullopt, Dyadic(1.0), 3) == "[-inf, 1]");
  CHECK(interval_literal(Dyadic(1.0), std::nullopt, 3) == "[1, inf]");
}

TEST_CASE("literals enclose, and are as narrow as their digits allow") {
  std::mt19937_64 random(7);
  std::uniform_int_distribution<long> mantissas(-(1L << 52), 1L << 52), exponents(-400, 300);
  std::uniform_int_distribution<int> lengths(1, 40);
  for (int k = 0; k < 20'000; ++k) {
    Integer mantissa;
    fmpz_set_si(mantissa, mantissas(random));
    const Dyadic x = Dyadic::scaled(mantissa, exponents(random));
    const int digits = lengths(random);
    const auto [lower, upper] = ends_of(interval_literal(x, x, digits));
    const Rational exact = x.to_rational();
    REQUIRE(lower <= exact);
    REQUIRE(exact <= upper);
    if (digits < 2 || exact.sign() == 0) continue;
    // two neighbours of that many digits differ by at most 10^(1 - digits) in proportion
    Rational allowed = exact.sign() < 0 ? -exact : exact;
    for (int d = 1; d < digits; ++d) allowed = allowed / Rational(10);
    REQUIRE(upper - lower <= allowed);
  }
}
