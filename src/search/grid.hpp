#pragma once
#include "kernel/exact.hpp"

namespace merestone {

/// The multiple of 2^exponent that is nearest to x: a number with few digits, since people read them.
inline Dyadic nearest_on_grid(const Dyadic& x, slong exponent) {
  Integer units;
  arf_get_fmpz(units, x.shifted(-exponent).raw(), ARF_RND_NEAR);
  return Dyadic::scaled(units, exponent);
}

}  // namespace merestone
