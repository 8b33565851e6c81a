#pragma once
#include "kernel/exact.hpp"

namespace merestone {

// Arb's balls as plain numbers of arbitrary precision: midpoints only, nothing enclosed.

/// The exact number as a ball of radius 0.
inline Acb exact_ball(const ComplexDyadic& z) {
  Acb ball;
  arb_set_arf(acb_realref(ball.raw()), z.re.raw());
  arb_set_arf(acb_imagref(ball.raw()), z.im.raw());
  return ball;
}

/// Requires a finite midpoint.
inline ComplexDyadic midpoint_of(const Acb& ball) {
  return {Dyadic(arb_midref(acb_realref(ball.raw()))), Dyadic(arb_midref(acb_imagref(ball.raw())))};
}

/// The exponent e with |z| < 2^e, roughly; very small for zero.
inline slong approx_exponent(const Acb& z) {
  Mag size;
  acb_get_mag(size, z);
  return mag_is_zero(size) ? WORD_MIN / 4 : fmpz_get_si(MAG_EXPREF(size.raw()));
}

}  // namespace merestone
