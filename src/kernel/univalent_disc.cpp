#include "kernel/univalent_disc.hpp"

#include <algorithm>

namespace merestone {

namespace {

constexpr slong kRadiusBits = 53;

// |z - midpoint| <= this over the ball
Mag radius_of(const Acb& z) {
  Mag radius;
  mag_hypot(radius, arb_radref(acb_realref(z.raw())), arb_radref(acb_imagref(z.raw())));
  return radius;
}

Acb midpoint_of(const Acb& z) {
  Acb midpoint;
  acb_get_mid(midpoint, z);
  return midpoint;
}

Arb modulus_of(const Acb& z, slong bits) {
  Arb modulus;
  acb_abs(modulus, z, bits);
  return modulus;
}

Arb plus(const Arb& a, const Mag& b, slong bits) {
  Arf exact;
  arf_set_mag(exact, b);
  Arb sum;
  arb_add_arf(sum, a, exact, bits);
  return sum;
}

// max(2 + e2, |a2| + 2^-20), rounded up
Arb slope_of(const Arb& a2_modulus, const Mag& e2, slong bits) {
  Arb two, slope, room;
  arb_set_ui(two, 2);
  arb_one(room);
  arb_mul_2exp_si(room, room, -20);
  arb_add(room, room, a2_modulus, bits);
  arb_max(slope, plus(two, e2, bits), room, bits);
  Arf upper;
  arb_get_ubound_arf(upper, slope, bits);
  arb_set_arf(slope, upper);
  return slope;
}

}  // namespace

std::optional<Disc> univalent_disc(const ComplexDyadic& centre, const Acb& f1, const Acb& a2, slong bits) {
  const Mag e1 = radius_of(f1), e2 = radius_of(a2);
  const Acb f1_middle = midpoint_of(f1), a2_middle = midpoint_of(a2);
  const Arb a2_modulus = modulus_of(a2_middle, bits);
  const Arb b = slope_of(a2_modulus, e2, bits);

  Arb sum, delta;  // b + |a2|, b² - |a2|²
  arb_add(sum, b, a2_modulus, bits);
  arb_sub(delta, b, a2_modulus, bits);
  arb_mul(delta, delta, sum, bits);

  Acb offset;  // f1 conj(a2) / delta
  acb_conj(offset, a2_middle);
  acb_mul(offset, offset, f1_middle, bits);
  acb_div_arb(offset, offset, delta, bits);

  Arb radius, loss, e1_exact;  // (b |f1| - (b + |a2|) e1) / delta
  arb_mul(radius, b, modulus_of(f1_middle, bits), bits);
  arb_mul(loss, sum, plus(e1_exact, e1, bits), bits);
  arb_sub(radius, radius, loss, bits);
  arb_div(radius, radius, delta, bits);
  if (!acb_is_finite(offset) || !arb_is_finite(radius)) return std::nullopt;

  // The open disc of this radius is proved; a closed one of a slightly smaller radius lies in it.
  Arf lower, uncertain;
  arb_get_lbound_arf(lower, radius, bits);
  arf_set_mag(uncertain, radius_of(offset));
  arf_sub(lower, lower, uncertain, kRadiusBits, ARF_RND_FLOOR);
  if (arf_sgn(lower) <= 0) return std::nullopt;
  Arf shrink;
  arf_mul_2exp_si(shrink, lower, -40);
  arf_sub(lower, lower, shrink, kRadiusBits, ARF_RND_FLOOR);
  return Disc{{centre.re + Dyadic(arb_midref(acb_realref(offset.raw()))),
               centre.im + Dyadic(arb_midref(acb_imagref(offset.raw())))},
              Dyadic(lower.raw())};
}

}  // namespace merestone
