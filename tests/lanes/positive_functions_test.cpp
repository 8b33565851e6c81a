// The logarithm and the hyperbolic tangent of the lanes (Lemma E7) against MPFR at 200 bits (computed).

#include "lanes/positive_functions.hpp"

#include "catch.hpp"
#include "lanes/doubles.hpp"
#include "reference/mpfr_real.hpp"

using namespace merestone;

namespace {

constexpr mpfr_prec_t kBits = 200;

// |value - truth| in units of the error bound.
double share_of_bound(const PositiveNumber& number, const reference::Real& truth) {
  reference::Real off(kBits);
  mpfr_sub_d(off, truth, number.value, MPFR_RNDN);
  mpfr_abs(off, off, MPFR_RNDN);
  mpfr_div_d(off, off, number.error, MPFR_RNDU);
  return mpfr_get_d(off, MPFR_RNDU);
}

double check_logarithm(double x) {
  reference::Real truth(kBits);
  mpfr_set_d(truth, x, MPFR_RNDN);
  mpfr_log(truth, truth, MPFR_RNDN);
  const PositiveNumber number = logarithm(x);
  INFO(std::hexfloat << "x = " << x);
  const double share = share_of_bound(number, truth);
  REQUIRE(share <= 1);
  // not absurdly large: within some 2^-46 of the size of the logarithm of 2x
  REQUIRE(number.error <= 0x1p-46 * (std::log(x) + 1));
  return share;
}

double check_tangent(double x) {
  reference::Real truth(kBits), argument(kBits);
  mpfr_set_d(argument, x, MPFR_RNDN);
  mpfr_tanh(truth, argument, MPFR_RNDN);
  if (x == 0)
    mpfr_set_ui(truth, 1, MPFR_RNDN);
  else
    mpfr_div(truth, truth, argument, MPFR_RNDN);
  const PositiveNumber number = tanh_ratio(x);
  INFO(std::hexfloat << "x = " << x);
  const double share = share_of_bound(number, truth);
  REQUIRE(share <= 1);
  REQUIRE(number.error <= 0x1p-48);
  return share;
}

}  // namespace

TEST_CASE("the logarithm is within its error from 1 to 2^1000") {
  reference::PointSource source(3201);
  double most = 0;
  for (std::uint64_t k = 0; k < reference::repeats(200'000); ++k) {
    const long exponent = source.one_in(3) ? source.between(0, 2) : source.between(0, 999);
    most = std::max(most, check_logarithm(std::abs(doubles::any_double(source, exponent))));
  }
  CHECK(most > 0.02);
}

TEST_CASE("the logarithm is within its error at the ends, at powers of two and where the fraction is split") {
  for (int exponent = 0; exponent <= 1000; ++exponent)
    for (const double start :
         {std::ldexp(1.0, exponent), std::ldexp(0x1.6p0, exponent), std::ldexp(0x1.5p0, exponent)}) {
      double x = start;
      for (int k = 0; k < 4 && x <= 0x1p1000; ++k, x = std::nextafter(x, 0x1p1010)) check_logarithm(x);
      x = start;
      for (int k = 0; k < 4 && x >= 1; ++k, x = std::nextafter(x, 0))
        if (x <= 0x1p1000) check_logarithm(x);
    }
  CHECK(logarithm(1).value == 0);
}

TEST_CASE("the tangent's ratio is within its error from 0 to 1") {
  reference::PointSource source(3202);
  double most = 0;
  for (std::uint64_t k = 0; k < reference::repeats(200'000); ++k) {
    const long exponent = source.one_in(4) ? source.between(-1000, -3) : source.between(-4, -1);
    most = std::max(most, check_tangent(std::abs(doubles::any_double(source, exponent))));
  }
  CHECK(most > 0.02);
}

TEST_CASE("the tangent's ratio is within its error at the ends") {
  for (double x : {0.0, 0x1p-1074, 0x1p-1022, 0x1p-540, 0x1p-30, 0.5, 1.0}) {
    check_tangent(x);
    if (x > 0) check_tangent(std::nextafter(x, 0));
  }
  double x = 1;
  for (int k = 0; k < 1000; ++k, x = std::nextafter(x, 0)) check_tangent(x);
}

TEST_CASE("beyond its range the tangent's ratio has no error bound") {
  for (const double x : {std::nextafter(1, 2), 2.0, 0x1p1000, -0x1p-1074, -1.0, std::nan("")})
    CHECK(std::isnan(tanh_ratio(x).error));
}
