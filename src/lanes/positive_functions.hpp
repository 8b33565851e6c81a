#pragma once
#include <cmath>
#include <limits>

namespace merestone {

/// A positive number known to lie within `error` of `value`.
struct PositiveNumber {
  double value = 0, error = 0;
};

/// The natural logarithm of a double, by its own series (Lemma E7): no library function whose error is unspecified.
/// Requires 1 <= x <= 2^1000.
inline PositiveNumber logarithm(double x) {
  constexpr double kLogTwo = 0x1.62e42fefa39efp-1;
  int exponent = 0;
  double fraction = std::frexp(x, &exponent);  // in [1/2, 1)
  if (fraction < 0x1.6p-1) {
    fraction *= 2;
    --exponent;
  }
  const double t = (fraction - 1) / (fraction + 1), s = t * t;
  double series = 0;
  for (int k = 23; k >= 1; k -= 2) series = series * s + 1.0 / k;
  const double value = exponent * kLogTwo + 2 * t * series;
  return {value, 0x1p-48 * (std::abs(exponent) + 1)};
}

/// tanh(x) / x by its continued fraction (Lemma E7). Requires x >= 0; an error that is not a number when x > 1.
inline PositiveNumber tanh_ratio(double x) {
  if (!(x >= 0 && x <= 1)) return {0, std::numeric_limits<double>::quiet_NaN()};
  const double q = x * x;
  double tail = 17;
  for (int k = 15; k >= 1; k -= 2) tail = k + q / tail;
  return {1 / tail, 0x1p-48};
}

}  // namespace merestone
