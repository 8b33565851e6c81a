#pragma once
#include <limits>

#include "lanes/tracked_orbit.hpp"

namespace merestone {

/// A complex number known to lie within `error` of x + iy, in double precision (Lemma E6). Results of overflow have an
/// infinite or undefined error, which fails every comparison that is written as in TrackedValue.
struct TrackedComplex {
  double x = 0, y = 0, error = 0;

  /// |x + iy|, rounded up.
  double modulus_upper() const { return std::sqrt(x * x + y * y) * (1 + 4 * kRoundingUnit) + kUnderflowGuard; }
  /// |x + iy|, rounded down.
  double modulus_lower() const { return std::sqrt(x * x + y * y) * (1 - 4 * kRoundingUnit) - kUnderflowGuard; }
  TrackedComplex conjugate() const { return {x, -y, error}; }
  /// Twice the number, exactly.
  TrackedComplex twice() const { return {2 * x, 2 * y, 2 * error}; }
  /// The number, and everything within `by` of it.
  TrackedComplex widened(double by) const { return {x, y, (error + by) * kBoundInflation}; }
};

inline TrackedComplex operator+(const TrackedComplex& a, const TrackedComplex& b) {
  TrackedComplex sum{a.x + b.x, a.y + b.y, 0};
  sum.error = (a.error + b.error + kRoundingUnit * sum.modulus_upper()) * kBoundInflation + kUnderflowGuard;
  return sum;
}

inline TrackedComplex operator-(const TrackedComplex& a) { return {-a.x, -a.y, a.error}; }

inline TrackedComplex operator-(const TrackedComplex& a, const TrackedComplex& b) { return a + -b; }

inline TrackedComplex operator*(const TrackedComplex& a, const TrackedComplex& b) {
  constexpr double kProduct = 0x1.2p+1 * kRoundingUnit;  // 2.25 u > sqrt(5) u
  const double p = a.modulus_upper(), q = b.modulus_upper();
  TrackedComplex product{a.x * b.x - a.y * b.y, a.x * b.y + a.y * b.x, 0};
  product.error = (p * b.error + (q + b.error) * a.error + kProduct * (p * q)) * kBoundInflation + kUnderflowGuard;
  return product;
}

/// An error that is not a number where b may be 0.
inline TrackedComplex operator/(const TrackedComplex& a, const TrackedComplex& b) {
  constexpr double kQuotient = 8 * kRoundingUnit;
  const double norm = b.x * b.x + b.y * b.y;
  TrackedComplex quotient{(a.x * b.x + a.y * b.y) / norm, (a.y * b.x - a.x * b.y) / norm, 0};
  const double room = (b.modulus_lower() - b.error) * (1 - 4 * kRoundingUnit);
  if (!(room > 0x1p-200)) return {0, 0, std::numeric_limits<double>::quiet_NaN()};
  const double size = quotient.modulus_upper();
  quotient.error = ((a.error + size * b.error) / room + kQuotient * size) * kBoundInflation + 0x1p-250;
  return quotient;
}

}  // namespace merestone
