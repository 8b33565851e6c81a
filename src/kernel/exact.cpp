#include "kernel/exact.hpp"

namespace merestone {

Rational Rational::quotient(const Integer& numerator, const Integer& denominator) {
  Rational r;
  fmpq_set_fmpz_frac(r.held_, numerator, denominator);
  return r;
}

Rational Rational::operator-() const {
  Rational r;
  fmpq_neg(r.held_, held_);
  return r;
}

Rational operator+(const Rational& a, const Rational& b) {
  Rational r;
  fmpq_add(r.held_, a.held_, b.held_);
  return r;
}

Rational operator-(const Rational& a, const Rational& b) {
  Rational r;
  fmpq_sub(r.held_, a.held_, b.held_);
  return r;
}

Rational operator*(const Rational& a, const Rational& b) {
  Rational r;
  fmpq_mul(r.held_, a.held_, b.held_);
  return r;
}

Rational operator/(const Rational& a, const Rational& b) {
  Rational r;
  fmpq_div(r.held_, a.held_, b.held_);
  return r;
}

Dyadic Dyadic::scaled(const Integer& mantissa, long exponent) {
  Dyadic d;
  arf_set_fmpz(d.held_, mantissa);
  arf_mul_2exp_si(d.held_, d.held_, exponent);
  return d;
}

Dyadic operator+(const Dyadic& a, const Dyadic& b) {
  Dyadic sum;
  arf_add(sum.held_, a.held_, b.held_, ARF_PREC_EXACT, ARF_RND_DOWN);
  return sum;
}

Dyadic operator-(const Dyadic& a, const Dyadic& b) {
  Dyadic difference;
  arf_sub(difference.held_, a.held_, b.held_, ARF_PREC_EXACT, ARF_RND_DOWN);
  return difference;
}

Dyadic Dyadic::shifted(long exponent) const {
  Dyadic d;
  arf_mul_2exp_si(d.held_, held_, exponent);
  return d;
}

bool Dyadic::is_moderate() const {
  constexpr slong kMost = 400'000;
  if (arf_is_zero(held_)) return true;
  return arf_is_finite(held_) && arf_cmpabs_2exp_si(held_, kMost) < 0 && arf_cmpabs_2exp_si(held_, -kMost) > 0 &&
         arf_bits(held_) <= kMost;
}

Rational Dyadic::to_rational() const {
  Integer mantissa, exponent, power;
  arf_get_fmpz_2exp(mantissa, exponent, held_);
  const slong e = fmpz_get_si(exponent);
  fmpz_one(power);
  fmpz_mul_2exp(power, power, static_cast<ulong>(e < 0 ? -e : e));
  if (e < 0) return Rational::quotient(mantissa, power);
  fmpz_mul(mantissa, mantissa, power);
  fmpz_one(power);
  return Rational::quotient(mantissa, power);
}

ComplexRational to_rational(const ComplexDyadic& z) { return {z.re.to_rational(), z.im.to_rational()}; }

ComplexRational operator+(const ComplexRational& a, const ComplexRational& b) { return {a.re + b.re, a.im + b.im}; }

ComplexRational operator-(const ComplexRational& a, const ComplexRational& b) { return {a.re - b.re, a.im - b.im}; }

ComplexRational square(const ComplexRational& z) { return {z.re * z.re - z.im * z.im, Rational(2) * z.re * z.im}; }

Rational norm(const ComplexRational& z) { return z.re * z.re + z.im * z.im; }

}  // namespace merestone
