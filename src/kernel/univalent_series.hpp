#pragma once
#include <vector>

#include "kernel/disc_enclosure.hpp"

namespace merestone {

/// Encloses the first coefficients a_1, ..., a_n of f(zeta) = a_1 zeta + a_2 zeta^2 + ..., univalent in the unit disc.
struct UnivalentSeries {
  std::vector<Acb> coefficients;  // a_1 first

  /// Of |a_n|, n >= 1, rounded down; 0 where the enclosure says nothing.
  Dyadic modulus_lower(std::size_t n) const;
  /// Of the area of the image of the unit disc: pi sum n |a_n|^2 over the coefficients that are here, rounded down
  /// (Lemma A2).
  Dyadic image_area_lower() const;
};

/// Encloses the inverse of t -> l_1 t + l_2 t^2 + ..., l_1 first, to as many coefficients. Where l_1 may be 0 the
/// enclosures say nothing. Requires at least one coefficient.
UnivalentSeries reverted(const std::vector<DiscEnclosure>& series, slong bits);

}  // namespace merestone
