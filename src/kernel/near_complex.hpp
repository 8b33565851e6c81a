#pragma once
#include <cmath>
#include <limits>

#include "kernel/ieee754.hpp"

namespace merestone {

/// A complex number within `error` of x + iy (Lemma E8, numbers). Sum, product and quotient enclose the results for all
/// choices of elements; overflow makes the error infinite or not a number, and a test that is written as `error < …`
/// false.
struct NearComplex {
  double x = 0, y = 0, error = 0;

  /// Not below |x + iy|, the midpoint's modulus, nor more than 1 + 2^-50 times it and 2^-499.
  double modulus_upper() const { return std::sqrt(x * x + y * y + 0x1p-1000) * (1 + 0x1p-51); }
  /// Not above |x + iy|.
  double modulus_lower() const { return std::sqrt(x * x + y * y) * (1 - 0x1p-51) - 0x1p-500; }
};

namespace detail {

inline constexpr double kNearUnit = 0x1p-53;           // u
inline constexpr double kNearInflation = 1 + 0x1p-48;  // covers the rounding of a bound
inline constexpr double kNearGuard = 0x1p-500;         // covers underflow

inline NearComplex near(double x, double y, double error) { return {x, y, error * kNearInflation + kNearGuard}; }

}  // namespace detail

inline NearComplex operator-(const NearComplex& a) { return {-a.x, -a.y, a.error}; }
inline NearComplex conjugate(const NearComplex& a) { return {a.x, -a.y, a.error}; }
/// Twice the number and half of it, but for underflow exactly.
inline NearComplex twice(const NearComplex& a) { return {2 * a.x, 2 * a.y, 2 * a.error}; }
inline NearComplex half(const NearComplex& a) { return detail::near(0.5 * a.x, 0.5 * a.y, 0.5 * a.error); }

inline NearComplex operator+(const NearComplex& a, const NearComplex& b) {
  const NearComplex sum{a.x + b.x, a.y + b.y, 0};
  return detail::near(sum.x, sum.y, a.error + b.error + detail::kNearUnit * sum.modulus_upper());
}

inline NearComplex operator-(const NearComplex& a, const NearComplex& b) { return a + -b; }

inline NearComplex operator*(const NearComplex& a, const NearComplex& b) {
  constexpr double kProduct = 0x1.2p+1 * detail::kNearUnit;  // 2.25 u, above sqrt(5) u
  const double p = a.modulus_upper(), q = b.modulus_upper();
  return detail::near(a.x * b.x - a.y * b.y, a.x * b.y + a.y * b.x,
                      p * b.error + (q + b.error) * a.error + kProduct * (p * q));
}

/// z² + c for the exact c = cx + i cy.
inline NearComplex next_value(const NearComplex& z, double cx, double cy) {
  const double p = z.modulus_upper();
  const NearComplex next{z.x * z.x - z.y * z.y + cx, 2 * z.x * z.y + cy, 0};
  return detail::near(next.x, next.y,
                      (2 * p + z.error) * z.error + detail::kNearUnit * (2 * p * p + next.modulus_upper()));
}

/// An error that is not a number where b may be 0, or nearly.
inline NearComplex operator/(const NearComplex& a, const NearComplex& b) {
  constexpr double kQuotient = 8 * detail::kNearUnit;
  const double room = (b.modulus_lower() - b.error) * (1 - 0x1p-51), norm = b.x * b.x + b.y * b.y;
  if (!(room > 0x1p-100)) return {0, 0, std::numeric_limits<double>::quiet_NaN()};
  const NearComplex quotient{(a.x * b.x + a.y * b.y) / norm, (a.y * b.x - a.x * b.y) / norm, 0};
  const double size = quotient.modulus_upper();
  return detail::near(quotient.x, quotient.y, (a.error + size * b.error) / room + kQuotient * size + 0x1p-400);
}

}  // namespace merestone
