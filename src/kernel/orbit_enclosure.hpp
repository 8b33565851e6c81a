#pragma once
#include <cstdint>

#include "kernel/disc_enclosure.hpp"

namespace merestone {

/// Is the disc wider than 1 or farther out than 2^64? More steps would prove nothing.
bool is_lost(const DiscEnclosure& z);

/// derivative <- 2 z derivative + 1: from z_n' to z_{n+1}' (Lemma B1).
void advance_derivative(DiscEnclosure& derivative, const DiscEnclosure& z, slong bits);

/// Encloses z_n(c) for every c of a region, step by step: the first-order model of Lemma E2,
/// z_n(c) in Z_n + D_n (c - c0) + D(0, R_n), with Z_n and D_n disc enclosures (Lemma B1) of the orbit and of its
/// derivative at the centre c0 of a disc that contains the region. For a point only Z_n is carried.
class OrbitEnclosure {
 public:
  /// The critical orbit, z_0 = 0.
  OrbitEnclosure(const Region& parameters, slong bits);
  /// All orbits that start in the closed disc.
  OrbitEnclosure(const Region& parameters, const Disc& start, slong bits);

  /// From z_n to z_{n+1}. On failure (false): the enclosure is lost, the orbit stays as it was.
  bool step();

  std::uint64_t index() const { return index_; }
  /// Encloses z_n(c) for every c of the region and every start.
  DiscEnclosure range() const;
  /// Encloses z_n at the region's centre, for every start: the same as range() for a point, without a copy.
  const DiscEnclosure& at_centre() const { return z_; }
  /// Encloses the derivative of z_n with respect to c at the region's centre. Not for a point.
  const DiscEnclosure& slope_at_centre() const { return d_; }

 private:
  void advance_remainder();

  slong bits_;
  std::uint64_t index_ = 0;
  DiscEnclosure centre_;      // contains c0
  Mag spread_;                // every c of the region has |c - c0| <= spread_
  bool is_point_;             // spread_ = 0
  DiscEnclosure z_, d_;       // Z_n, D_n
  Mag remainder_;             // R_n
};

}  // namespace merestone
