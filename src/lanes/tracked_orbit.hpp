#pragma once
#include <cmath>
#include <cstdint>

#include "lanes/double_parameter.hpp"

namespace merestone {

/// Half a unit in the last place of 1: the relative rounding error of one operation, u in Lemma E4.
inline constexpr double kRoundingUnit = 0x1p-53;
/// Covers the rounding of a bound that is itself computed in at most 16 double operations (Lemma E4).
inline constexpr double kBoundInflation = 0x1.0000000000010p+0;  // 1 + 2^-48
/// Covers every underflow in one step: a modulus below 2^-537 may come out as 0, which costs 2^-536 times the error,
/// and each other underflow costs at most 2^-1074 (Lemma E4).
inline constexpr double kUnderflowGuard = 0x1p-500;
/// While the error is below this, its square is replaced by this times the error (Lemma E4).
inline constexpr double kTrackedError = 0x1p-20;

/// z_n of the exact parameter lies within `error` of x + iy; `modulus` is sqrt(x² + y²) as rounded.
struct TrackedValue {
  double x = 0, y = 0, modulus = 0, error = 0;

  /// |z_n| > bound is proved. False for NaN.
  bool certainly_beyond(double bound) const { return modulus * (1 - 4 * kRoundingUnit) - error > bound; }
  /// |z_n| <= bound is proved. False for NaN.
  bool certainly_within(double bound) const {
    return (modulus * (1 + 4 * kRoundingUnit) + error) * kBoundInflation <= bound;
  }
};

namespace detail {

inline TrackedValue rounded_next(const TrackedValue& z, const DoubleParameter& c) {
  TrackedValue next;
  next.x = z.x * z.x - z.y * z.y + c.x;
  next.y = 2 * z.x * z.y + c.y;
  next.modulus = std::sqrt(next.x * next.x + next.y * next.y);
  return next;
}

// rounding of z² + c, and the error of c
inline double fresh_error(const TrackedValue& z, double next_modulus, const DoubleParameter& c) {
  return c.error + kRoundingUnit * (2 * z.modulus * z.modulus + next_modulus);
}

}  // namespace detail

/// One step of Lemma E4 for an error of any size.
inline TrackedValue next_tracked(const TrackedValue& z, const DoubleParameter& c) {
  TrackedValue next = detail::rounded_next(z, c);
  const double fresh = detail::fresh_error(z, next.modulus, c);
  next.error = ((2 * z.modulus + z.error) * z.error + fresh) * kBoundInflation + kUnderflowGuard;
  return next;
}

/// The same for z.error <= kTrackedError: one multiplication and one addition in the chain of errors.
inline TrackedValue next_tracked_small(const TrackedValue& z, const DoubleParameter& c) {
  TrackedValue next = detail::rounded_next(z, c);
  const double fresh = detail::fresh_error(z, next.modulus, c);
  const double slope = (2 * z.modulus + kTrackedError) * kBoundInflation;
  next.error = slope * z.error + (fresh * kBoundInflation + kUnderflowGuard);
  return next;
}

}  // namespace merestone
