#include "reference/mpfi_orbit.hpp"

#include "reference/mpfr_real.hpp"

namespace reference {

namespace {

mpq_class outside(const mpq_class& x, const mpq_class& lo, const mpq_class& hi) {
  if (x < lo) return lo - x;
  if (x > hi) return x - hi;
  return 0;
}

mpq_class lower_end(const mpfi_t x) {
  Real end(mpfi_get_prec(x));
  mpfi_get_left(end, x);
  return end.exact();
}

mpq_class upper_end(const mpfi_t x) {
  Real end(mpfi_get_prec(x));
  mpfi_get_right(end, x);
  return end.exact();
}

}  // namespace

mpq_class distance_squared(const Box& box, const Complex& z) {
  const mpq_class dx = outside(z.re, box.x_lo, box.x_hi), dy = outside(z.im, box.y_lo, box.y_hi);
  return dx * dx + dy * dy;
}

bool contains(const Box& box, const Complex& z) { return distance_squared(box, z) == 0; }

MpfiOrbit::MpfiOrbit(const Complex& c, mpfr_prec_t bits) {
  for (mpfi_ptr x : {c_re_, c_im_, re_, im_, product_, square_}) mpfi_init2(x, bits);
  mpfi_set_q(c_re_, c.re.get_mpq_t());
  mpfi_set_q(c_im_, c.im.get_mpq_t());
  mpfi_set_si(re_, 0);
  mpfi_set_si(im_, 0);
}

MpfiOrbit::~MpfiOrbit() {
  for (mpfi_ptr x : {c_re_, c_im_, re_, im_, product_, square_}) mpfi_clear(x);
}

void MpfiOrbit::step() {
  mpfi_mul(product_, re_, im_);
  mpfi_mul_2ui(product_, product_, 1);
  mpfi_sqr(square_, im_);
  mpfi_sqr(re_, re_);
  mpfi_sub(re_, re_, square_);
  mpfi_add(re_, re_, c_re_);
  mpfi_add(im_, product_, c_im_);
}

bool MpfiOrbit::is_narrow() const {
  Real width(53);
  for (mpfi_srcptr part : {re_, im_}) {
    mpfi_diam_abs(width, part);
    if (!(mpfr_cmp_ui(static_cast<mpfr_srcptr>(width), 1) <= 0) || mpfr_nan_p(static_cast<mpfr_srcptr>(width)))
      return false;
  }
  return true;
}

Box MpfiOrbit::z() const { return {lower_end(re_), upper_end(re_), lower_end(im_), upper_end(im_)}; }

}  // namespace reference
