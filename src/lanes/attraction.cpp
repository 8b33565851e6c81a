#include "lanes/attraction.hpp"

#include "kernel/primes.hpp"
#include "lanes/tracked_orbit.hpp"

namespace merestone {

namespace {

// |z - (x + iy)| as a tracked modulus: two subtractions, rounded, then as in TrackedValue.
TrackedValue offset(const TrackedValue& z, double x, double y) {
  TrackedValue d;
  d.x = z.x - x;
  d.y = z.y - y;
  // off by (1 + u)^3 in proportion, the subtractions included: 4u in the comparisons covers it (Lemma E4)
  d.modulus = std::sqrt(d.x * d.x + d.y * d.y);
  d.error = z.error;
  return d;
}

}  // namespace

bool proves_attraction(const DoubleParameter& c, double x, double y, double radius, std::uint64_t period) {
  TrackedValue z{x, y, std::sqrt(x * x + y * y), radius};
  const auto shorter = proper_prime_cofactors(period);
  for (std::uint64_t k = 1; k <= period; ++k) {
    z = next_tracked(z, c);
    if (!(z.error < 1)) return false;
    for (const std::uint64_t divisor : shorter)
      if (k == divisor && !offset(z, x, y).certainly_beyond(radius * kBoundInflation)) return false;
  }
  const TrackedValue d = offset(z, x, y);
  return (d.modulus * (1 + 8 * kRoundingUnit) + d.error) * kBoundInflation < radius;
}

}  // namespace merestone
