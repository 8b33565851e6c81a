#pragma once
#include <cstdint>

#include "kernel/disc_enclosure.hpp"

namespace merestone {

/// Encloses z_n(c) and its first two derivatives with respect to c at one exact parameter (Lemma B1).
class OrbitJet {
 public:
  OrbitJet(const ComplexDyadic& c, slong bits);

  /// From n to n + 1. On failure (false): z_n is enclosed too widely or lies too far out, as in OrbitEnclosure.
  bool step();

  std::uint64_t index() const { return index_; }
  const DiscEnclosure& z() const { return z_; }
  const DiscEnclosure& first() const { return first_; }
  const DiscEnclosure& second() const { return second_; }
  const DiscEnclosure& parameter() const { return c_; }

 private:
  slong bits_;
  std::uint64_t index_ = 0;
  DiscEnclosure c_, z_, first_, second_;
};

}  // namespace merestone
