#include "reference/convert.hpp"

#include <stdexcept>

namespace reference {

namespace {

mpz_class to_mpz(const fmpz* x) {
  mpz_class out;
  fmpz_get_mpz(out.get_mpz_t(), x);
  return out;
}

merestone::Integer to_integer(const mpz_class& x) {
  merestone::Integer out;
  fmpz_set_mpz(out, x.get_mpz_t());
  return out;
}

mpq_class scaled(const mpz_class& mantissa, long exponent) { return mpq_class(mantissa) * power_of_two(exponent); }

mpq_class exact_arf(const arf_struct* x) {
  merestone::Integer mantissa, exponent;
  arf_get_fmpz_2exp(mantissa, exponent, x);
  return scaled(to_mpz(mantissa), fmpz_get_si(exponent));
}

}  // namespace

mpq_class exact(const merestone::Rational& x) { return mpq_class(to_mpz(x.numerator()), to_mpz(x.denominator())); }
mpq_class exact(const merestone::Dyadic& x) { return exact_arf(x.raw()); }
mpq_class exact(const merestone::Arf& x) { return exact_arf(x.raw()); }
mpq_class exact(const merestone::Mag& x) {
  merestone::Arf value;
  arf_set_mag(value, x);
  return exact(value);
}
Complex exact(const merestone::ComplexRational& z) { return {exact(z.re), exact(z.im)}; }
Complex exact(const merestone::ComplexDyadic& z) { return {exact(z.re), exact(z.im)}; }
Complex midpoint(const merestone::DiscEnclosure& z) { return {exact(z.re), exact(z.im)}; }

merestone::Rational to_rational(const mpq_class& x) {
  return merestone::Rational::quotient(to_integer(x.get_num()), to_integer(x.get_den()));
}
merestone::ComplexRational to_rational(const Complex& z) { return {to_rational(z.re), to_rational(z.im)}; }

merestone::Dyadic to_dyadic(const mpq_class& x) {
  const mpz_class& denominator = x.get_den();
  const mp_bitcnt_t zeros = mpz_scan1(denominator.get_mpz_t(), 0);
  if (denominator != mpz_class(1) << zeros) throw std::invalid_argument("not a dyadic number: " + x.get_str());
  return merestone::Dyadic::scaled(to_integer(x.get_num()), -static_cast<long>(zeros));
}
merestone::ComplexDyadic to_dyadic(const Complex& z) { return {to_dyadic(z.re), to_dyadic(z.im)}; }

merestone::Mag to_mag(const mpq_class& x) {
  const merestone::Dyadic dyadic = to_dyadic(x);
  if (x < 0 || dyadic.bits() > 30) throw std::invalid_argument("no upper bound of 30 bits: " + x.get_str());
  merestone::Integer mantissa, exponent;
  arf_get_fmpz_2exp(mantissa, exponent, dyadic.raw());
  merestone::Mag out;
  mag_set_fmpz_2exp_fmpz(out, mantissa, exponent);
  return out;
}

bool holds(const merestone::DiscEnclosure& disc, const Complex& z) {
  const mpq_class radius = exact(disc.radius);
  return norm(z - midpoint(disc)) <= radius * radius;
}

}  // namespace reference
