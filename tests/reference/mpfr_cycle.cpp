#include "reference/mpfr_cycle.hpp"

#include "reference/mpfr_orbit.hpp"

namespace reference {

namespace {

// out = a b
void multiply(RealPair& out, const RealPair& a, const RealPair& b, mpfr_prec_t bits) {
  RealPair product(bits);
  mpfr_fmms(product.re, a.re, b.re, a.im, b.im, MPFR_RNDN);
  mpfr_fmma(product.im, a.re, b.im, a.im, b.re, MPFR_RNDN);
  out = product;
}

// out = a / b
void divide(RealPair& out, const RealPair& a, const RealPair& b, mpfr_prec_t bits) {
  Real norm(bits);
  mpfr_fmma(norm, b.re, b.re, b.im, b.im, MPFR_RNDN);
  RealPair quotient(bits);
  mpfr_fmma(quotient.re, a.re, b.re, a.im, b.im, MPFR_RNDN);
  mpfr_fmms(quotient.im, a.im, b.re, a.re, b.im, MPFR_RNDN);
  mpfr_div(quotient.re, quotient.re, norm, MPFR_RNDN);
  mpfr_div(quotient.im, quotient.im, norm, MPFR_RNDN);
  out = quotient;
}

mpfr_exp_t size(const RealPair& z) {
  const mpfr_exp_t least = mpfr_get_emin();
  const mpfr_exp_t re = mpfr_zero_p(static_cast<mpfr_srcptr>(z.re)) ? least : mpfr_get_exp(z.re);
  const mpfr_exp_t im = mpfr_zero_p(static_cast<mpfr_srcptr>(z.im)) ? least : mpfr_get_exp(z.im);
  return re > im ? re : im;
}

struct Return {
  RealPair image, multiplier;
};

Return go_round(const Complex& c, const Complex& z, std::uint64_t period, mpfr_prec_t bits) {
  MpfrOrbit orbit(c, z, bits);
  RealPair multiplier(Complex{1, 0}, bits);
  for (std::uint64_t k = 0; k < period; ++k) {
    multiply(multiplier, multiplier, orbit.z(), bits);
    mpfr_mul_2ui(multiplier.re, multiplier.re, 1, MPFR_RNDN);
    mpfr_mul_2ui(multiplier.im, multiplier.im, 1, MPFR_RNDN);
    orbit.step();
  }
  return {orbit.z(), multiplier};
}

// z <- z - (f^p(z) - z) / (multiplier - 1); the exponent of the correction
mpfr_exp_t newton_step(RealPair& z, const Complex& c, std::uint64_t period, mpfr_prec_t bits) {
  Return r = go_round(c, z.exact(), period, bits);
  mpfr_sub(r.image.re, r.image.re, z.re, MPFR_RNDN);
  mpfr_sub(r.image.im, r.image.im, z.im, MPFR_RNDN);
  mpfr_sub_ui(r.multiplier.re, r.multiplier.re, 1, MPFR_RNDN);
  divide(r.image, r.image, r.multiplier, bits);
  mpfr_sub(z.re, z.re, r.image.re, MPFR_RNDN);
  mpfr_sub(z.im, z.im, r.image.im, MPFR_RNDN);
  return size(r.image);
}

bool is_finite(const RealPair& z) {
  return mpfr_number_p(static_cast<mpfr_srcptr>(z.re)) && mpfr_number_p(static_cast<mpfr_srcptr>(z.im));
}

std::uint64_t least_period(const Complex& c, const RealPair& z, std::uint64_t period, mpfr_prec_t bits) {
  MpfrOrbit orbit(c, z.exact(), bits);
  RealPair offset(bits);
  for (std::uint64_t k = 1; k < period; ++k) {
    orbit.step();
    if (period % k != 0) continue;
    mpfr_sub(offset.re, orbit.z().re, z.re, MPFR_RNDN);
    mpfr_sub(offset.im, orbit.z().im, z.im, MPFR_RNDN);
    if (size(offset) < -bits / 2) return k;
  }
  return period;
}

Cycle describe(const Complex& c, const RealPair& z, std::uint64_t period, mpfr_prec_t bits) {
  Cycle cycle;
  MpfrOrbit orbit(c, z.exact(), bits);
  for (std::uint64_t k = 0; k < period; ++k) {
    cycle.points.push_back(orbit.z().exact());
    orbit.step();
  }
  cycle.multiplier = go_round(c, z.exact(), period, bits).multiplier.exact();
  cycle.attracting = norm(cycle.multiplier) < 1;
  return cycle;
}

}  // namespace

std::optional<Cycle> find_cycle(const Complex& c, const Complex& start, std::uint64_t period, mpfr_prec_t bits,
                                std::uint64_t settle) {
  constexpr int kMostSteps = 2000;
  MpfrOrbit orbit(c, start, bits);
  for (std::uint64_t k = 0; k < settle * period; ++k) orbit.step();
  RealPair z = orbit.z();
  if (!is_finite(z)) return std::nullopt;
  for (int step = 0; step < kMostSteps; ++step) {
    const mpfr_exp_t correction = newton_step(z, c, period, bits);
    if (!is_finite(z)) return std::nullopt;
    if (correction < -bits * 3 / 4) return describe(c, z, least_period(c, z, period, bits), bits);
  }
  return std::nullopt;
}

}  // namespace reference
