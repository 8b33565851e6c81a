#pragma once
#include <gmpxx.h>
#include <mpfr.h>

#include "reference/exact_complex.hpp"

namespace reference {

/// RAII around mpfr_t. Assignment keeps the source's precision.
class Real {
 public:
  explicit Real(mpfr_prec_t bits) { mpfr_init2(held_, bits); }
  Real(const Real& other) {
    mpfr_init2(held_, mpfr_get_prec(other.held_));
    mpfr_set(held_, other.held_, MPFR_RNDN);
  }
  Real& operator=(const Real& other) {
    if (this == &other) return *this;
    mpfr_set_prec(held_, mpfr_get_prec(other.held_));
    mpfr_set(held_, other.held_, MPFR_RNDN);
    return *this;
  }
  ~Real() { mpfr_clear(held_); }

  operator mpfr_ptr() { return held_; }
  operator mpfr_srcptr() const { return held_; }

  /// The number that is stored, exactly.
  mpq_class exact() const {
    if (mpfr_zero_p(held_)) return 0;
    mpz_class mantissa;
    const mpfr_exp_t exponent = mpfr_get_z_2exp(mantissa.get_mpz_t(), held_);
    return mpq_class(mantissa) * power_of_two(exponent);
  }

 private:
  mpfr_t held_;
};

/// A complex number, rounded to nearest part by part: what MPFR computes with, no enclosure.
struct RealPair {
  explicit RealPair(mpfr_prec_t bits) : re(bits), im(bits) {}
  RealPair(const Complex& z, mpfr_prec_t bits) : RealPair(bits) {
    mpfr_set_q(re, z.re.get_mpq_t(), MPFR_RNDN);
    mpfr_set_q(im, z.im.get_mpq_t(), MPFR_RNDN);
  }
  Complex exact() const { return {re.exact(), im.exact()}; }

  Real re, im;
};

}  // namespace reference
