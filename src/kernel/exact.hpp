#pragma once
#include <compare>
#include <string>

#include "kernel/handles.hpp"

namespace merestone {

/// An exact rational number, always in lowest terms.
class Rational {
 public:
  Rational() = default;
  Rational(long numerator, unsigned long denominator = 1) { fmpq_set_si(held_, numerator, denominator); }

  /// Requires a non-zero denominator.
  static Rational quotient(const Integer& numerator, const Integer& denominator);

  Rational operator-() const;
  friend Rational operator+(const Rational& a, const Rational& b);
  friend Rational operator-(const Rational& a, const Rational& b);
  friend Rational operator*(const Rational& a, const Rational& b);
  /// Requires b != 0.
  friend Rational operator/(const Rational& a, const Rational& b);
  friend bool operator==(const Rational& a, const Rational& b) { return fmpq_equal(a.held_, b.held_) != 0; }
  friend std::strong_ordering operator<=>(const Rational& a, const Rational& b) {
    return fmpq_cmp(a.held_, b.held_) <=> 0;
  }

  int sign() const { return fmpq_sgn(held_); }
  bool is_integer() const { return fmpz_is_one(fmpq_denref(held_.raw())) != 0; }
  const fmpz* numerator() const { return fmpq_numref(held_.raw()); }
  const fmpz* denominator() const { return fmpq_denref(held_.raw()); }
  const fmpq* raw() const { return held_; }

 private:
  RationalHandle held_;
};

/// An exact dyadic rational m·2^e, always finite.
class Dyadic {
 public:
  Dyadic() = default;
  /// Requires a finite value.
  explicit Dyadic(double value) { arf_set_d(held_, value); }
  /// Requires a finite value.
  explicit Dyadic(const arf_struct* value) { arf_set(held_, value); }
  static Dyadic scaled(const Integer& mantissa, long exponent);

  friend bool operator==(const Dyadic& a, const Dyadic& b) { return arf_equal(a.held_, b.held_) != 0; }
  friend std::strong_ordering operator<=>(const Dyadic& a, const Dyadic& b) { return arf_cmp(a.held_, b.held_) <=> 0; }

  // exact
  friend Dyadic operator+(const Dyadic& a, const Dyadic& b);
  friend Dyadic operator-(const Dyadic& a, const Dyadic& b);
  /// this·2^exponent, exactly.
  Dyadic shifted(long exponent) const;

  int sign() const { return arf_sgn(held_); }
  /// Bits of the odd mantissa; 0 for zero.
  slong bits() const { return arf_bits(held_); }
  /// Finite, with an exponent and a mantissa of at most 400,000 bits in size: more than certificates admit.
  bool is_moderate() const;
  /// Requires is_moderate().
  Rational to_rational() const;
  const arf_struct* raw() const { return held_; }

 private:
  Arf held_;
};

struct ComplexRational {
  Rational re, im;
  friend bool operator==(const ComplexRational&, const ComplexRational&) = default;
};

struct ComplexDyadic {
  Dyadic re, im;
  friend bool operator==(const ComplexDyadic&, const ComplexDyadic&) = default;
};

ComplexRational to_rational(const ComplexDyadic& z);
ComplexRational operator+(const ComplexRational& a, const ComplexRational& b);
ComplexRational operator-(const ComplexRational& a, const ComplexRational& b);
ComplexRational square(const ComplexRational& z);
/// |z|², exactly.
Rational norm(const ComplexRational& z);

}  // namespace merestone
