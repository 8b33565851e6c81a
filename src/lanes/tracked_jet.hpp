#pragma once
#include "lanes/tracked_orbit.hpp"

namespace merestone {

/// z_n and its first two derivatives with respect to c at a parameter that is exactly a double (Lemma E4, derivatives):
/// each part with its modulus as rounded and an upper bound of its error.
struct TrackedJet {
  TrackedValue z, first, second;
};

namespace detail {

// |x + iy|, as rounded, and never too small by underflow (Lemma E4, derivatives)
inline double modulus(double x, double y) { return std::sqrt(x * x + y * y + 0x1p-1000); }

}  // namespace detail

/// From n to n + 1. Old values stand on every right-hand side.
inline TrackedJet next_tracked(const TrackedJet& jet, double c_x, double c_y) {
  constexpr double kTwiceProduct = 0x1.1e38p+2;  // 4.47216… > 2 sqrt(5)
  constexpr double u = kRoundingUnit;
  const auto& [z, a, b] = jet;
  TrackedJet next;

  next.z.x = z.x * z.x - z.y * z.y + c_x;
  next.z.y = 2 * z.x * z.y + c_y;
  next.z.modulus = detail::modulus(next.z.x, next.z.y);
  const double z_fresh = u * (2 * z.modulus * z.modulus + next.z.modulus);
  next.z.error = ((2 * z.modulus + z.error) * z.error + z_fresh) * kBoundInflation + kUnderflowGuard;

  next.first.x = 2 * (z.x * a.x - z.y * a.y) + 1;
  next.first.y = 2 * (z.x * a.y + z.y * a.x);
  next.first.modulus = detail::modulus(next.first.x, next.first.y);
  const double a_fresh = u * (kTwiceProduct * (z.modulus * a.modulus) + next.first.modulus);
  next.first.error = (2 * ((z.modulus + z.error) * a.error + a.modulus * z.error) + a_fresh) * kBoundInflation + kUnderflowGuard;

  next.second.x = 2 * ((a.x * a.x - a.y * a.y) + (z.x * b.x - z.y * b.y));
  next.second.y = 2 * (2 * a.x * a.y + (z.x * b.y + z.y * b.x));
  next.second.modulus = detail::modulus(next.second.x, next.second.y);
  const double b_fresh = u * (4 * a.modulus * a.modulus + kTwiceProduct * (z.modulus * b.modulus) + next.second.modulus);
  next.second.error = (2 * ((2 * a.modulus + a.error) * a.error + (z.modulus + z.error) * b.error + b.modulus * z.error) +
                       b_fresh) * kBoundInflation + kUnderflowGuard;
  return next;
}

}  // namespace merestone
