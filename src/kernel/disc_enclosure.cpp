#include "kernel/disc_enclosure.hpp"

#include <algorithm>

namespace merestone {

namespace {

// Bits that hold the square of either midpoint part exactly, and room for a bound beside it.
slong comparison_bits(const DiscEnclosure& z) { return 2 * std::max(arf_bits(z.re), arf_bits(z.im)) + 64; }

void squared_modulus(Arf& out, const DiscEnclosure& z, slong bits, arf_rnd_t direction) {
  Arf re_squared, im_squared;
  arf_mul(re_squared, z.re, z.re, ARF_PREC_EXACT, ARF_RND_DOWN);
  arf_mul(im_squared, z.im, z.im, ARF_PREC_EXACT, ARF_RND_DOWN);
  arf_add(out, re_squared, im_squared, bits, direction);
}

void bound_plus_radius_upper(Arf& out, const DiscEnclosure& z, const Dyadic& bound, slong bits) {
  Arf radius;
  arf_set_mag(radius, z.radius);
  arf_add(out, bound.raw(), radius, bits, ARF_RND_CEIL);
}

// With room = bound - radius rounded down: room < 0 or the sign of room² - |mid|², both rounded against the claim.
// Returns -1 when nothing is proved, 0 when |z| <= bound, 1 when |z| < bound.
int proved_below(const DiscEnclosure& z, const Dyadic& bound) {
  const slong bits = comparison_bits(z);
  Arf radius, room, modulus_squared;
  arf_set_mag(radius, z.radius);
  arf_sub(room, bound.raw(), radius, bits, ARF_RND_FLOOR);
  if (arf_sgn(room) < 0) return -1;
  arf_mul(room, room, room, bits, ARF_RND_FLOOR);
  squared_modulus(modulus_squared, z, bits, ARF_RND_CEIL);
  const int order = arf_cmp(modulus_squared, room);
  return order < 0 ? 1 : order == 0 ? 0 : -1;
}

Bounds bounds_about(const Arf& middle, const Mag& radius) {
  const slong bits = arf_bits(middle) + 64;
  Arf width, lower, upper;
  arf_set_mag(width, radius);
  arf_sub(lower, middle, width, bits, ARF_RND_FLOOR);
  arf_add(upper, middle, width, bits, ARF_RND_CEIL);
  return {Dyadic(lower.raw()), Dyadic(upper.raw())};
}

// Adds to z.radius the rounding of the two midpoint parts: at most one unit in the last place of each that is inexact.
void add_rounding(DiscEnclosure& z, bool re_inexact, bool im_inexact, slong bits) {
  if (re_inexact) arf_mag_add_ulp(z.radius, z.radius, z.re, bits);
  if (im_inexact) arf_mag_add_ulp(z.radius, z.radius, z.im, bits);
}

}  // namespace

Acb ball_around(const ComplexRational& z, slong bits) {
  Acb ball;
  arb_set_fmpq(acb_realref(ball.raw()), z.re.raw(), bits);
  arb_set_fmpq(acb_imagref(ball.raw()), z.im.raw(), bits);
  return ball;
}

Acb ball_around(const DiscEnclosure& z) {
  Acb ball;
  for (const auto& [part, middle] : {std::pair{acb_realref(ball.raw()), &z.re}, {acb_imagref(ball.raw()), &z.im}}) {
    arb_set_arf(part, *middle);
    mag_set(arb_radref(part), z.radius);
  }
  return ball;
}

DiscEnclosure DiscEnclosure::of(const Acb& ball) {
  DiscEnclosure disc;
  arf_set(disc.re, arb_midref(acb_realref(ball.raw())));
  arf_set(disc.im, arb_midref(acb_imagref(ball.raw())));
  mag_hypot(disc.radius, arb_radref(acb_realref(ball.raw())), arb_radref(acb_imagref(ball.raw())));
  return disc;
}

DiscEnclosure DiscEnclosure::of(const ComplexRational& z, slong bits) { return of(ball_around(z, bits)); }

DiscEnclosure DiscEnclosure::of(const Disc& disc, slong bits) {
  DiscEnclosure out;
  const int re_inexact = arf_set_round(out.re, disc.centre.re.raw(), bits, ARF_RND_DOWN);
  const int im_inexact = arf_set_round(out.im, disc.centre.im.raw(), bits, ARF_RND_DOWN);
  arf_get_mag(out.radius, disc.radius.raw());
  add_rounding(out, re_inexact != 0, im_inexact != 0, bits);
  return out;
}

void midpoint_modulus_upper(Mag& out, const DiscEnclosure& z) {
  Mag im;
  arf_get_mag(out, z.re);
  arf_get_mag(im, z.im);
  mag_hypot(out, out, im);
}

void modulus_upper(Mag& out, const DiscEnclosure& z) {
  midpoint_modulus_upper(out, z);
  mag_add(out, out, z.radius);
}

void multiply(DiscEnclosure& out, const DiscEnclosure& a, const DiscEnclosure& b, slong bits) {
  // |ab - ãb̃| <= |ã| rb + (|b̃| + rb) ra
  Mag radius, modulus;
  midpoint_modulus_upper(modulus, a);
  mag_mul(radius, modulus, b.radius);
  modulus_upper(modulus, b);
  mag_addmul(radius, modulus, a.radius);
  const int inexact = arf_complex_mul(out.re, out.im, a.re, a.im, b.re, b.im, bits, ARF_RND_DOWN);
  out.radius = radius;
  add_rounding(out, (inexact & 1) != 0, (inexact & 2) != 0, bits);
}

void square(DiscEnclosure& out, const DiscEnclosure& a, slong bits) {
  // |a² - ã²| <= (2|ã| + ra) ra
  Mag radius;
  midpoint_modulus_upper(radius, a);
  mag_mul_2exp_si(radius, radius, 1);
  mag_add(radius, radius, a.radius);
  mag_mul(radius, radius, a.radius);
  const int inexact = arf_complex_sqr(out.re, out.im, a.re, a.im, bits, ARF_RND_DOWN);
  out.radius = radius;
  add_rounding(out, (inexact & 1) != 0, (inexact & 2) != 0, bits);
}

void add(DiscEnclosure& out, const DiscEnclosure& a, const DiscEnclosure& b, slong bits) {
  mag_add(out.radius, a.radius, b.radius);
  const int re_inexact = arf_add(out.re, a.re, b.re, bits, ARF_RND_DOWN);
  const int im_inexact = arf_add(out.im, a.im, b.im, bits, ARF_RND_DOWN);
  add_rounding(out, re_inexact != 0, im_inexact != 0, bits);
}

void twice(DiscEnclosure& out, const DiscEnclosure& a) {
  arf_mul_2exp_si(out.re, a.re, 1);
  arf_mul_2exp_si(out.im, a.im, 1);
  mag_mul_2exp_si(out.radius, a.radius, 1);
}

DiscEnclosure difference(const DiscEnclosure& a, const DiscEnclosure& b, slong bits) {
  DiscEnclosure out;
  arf_neg(out.re, b.re);
  arf_neg(out.im, b.im);
  out.radius = b.radius;
  add(out, a, out, bits);
  return out;
}

bool certainly_beyond(const DiscEnclosure& z, const Dyadic& bound) {
  const slong bits = comparison_bits(z);
  Arf reach, modulus_squared;
  bound_plus_radius_upper(reach, z, bound, bits);
  arf_mul(reach, reach, reach, bits, ARF_RND_CEIL);
  squared_modulus(modulus_squared, z, bits, ARF_RND_FLOOR);
  return arf_cmp(modulus_squared, reach) > 0;
}

bool certainly_within(const DiscEnclosure& z, const Dyadic& bound) { return proved_below(z, bound) >= 0; }

bool certainly_inside(const DiscEnclosure& z, const Dyadic& bound) { return proved_below(z, bound) > 0; }

Bounds re_bounds(const DiscEnclosure& z) { return bounds_about(z.re, z.radius); }

Bounds im_bounds(const DiscEnclosure& z) { return bounds_about(z.im, z.radius); }

Dyadic modulus_lower_bound(const DiscEnclosure& z) {
  Arf modulus, radius;
  squared_modulus(modulus, z, comparison_bits(z), ARF_RND_FLOOR);
  arf_sqrt(modulus, modulus, 64, ARF_RND_FLOOR);
  arf_set_mag(radius, z.radius);
  arf_sub(modulus, modulus, radius, 64, ARF_RND_FLOOR);
  if (arf_sgn(modulus) < 0) arf_zero(modulus);
  return Dyadic(modulus.raw());
}

Dyadic modulus_upper_bound(const DiscEnclosure& z) {
  Arf modulus, radius;
  squared_modulus(modulus, z, comparison_bits(z), ARF_RND_CEIL);
  arf_sqrt(modulus, modulus, 64, ARF_RND_CEIL);
  arf_set_mag(radius, z.radius);
  arf_add(modulus, modulus, radius, 64, ARF_RND_CEIL);
  return Dyadic(modulus.raw());
}

}  // namespace merestone
