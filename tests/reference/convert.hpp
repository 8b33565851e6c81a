#pragma once
#include "kernel/disc_enclosure.hpp"
#include "reference/exact_complex.hpp"

/// From the kernel's exact numbers to GMP's and back, without rounding.
namespace reference {

mpq_class exact(const merestone::Rational& x);
mpq_class exact(const merestone::Dyadic& x);
mpq_class exact(const merestone::Arf& x);
mpq_class exact(const merestone::Mag& x);
Complex exact(const merestone::ComplexRational& z);
Complex exact(const merestone::ComplexDyadic& z);
/// The midpoint.
Complex midpoint(const merestone::DiscEnclosure& z);

merestone::Rational to_rational(const mpq_class& x);
merestone::ComplexRational to_rational(const Complex& z);
/// Requires a denominator that is a power of two.
merestone::Dyadic to_dyadic(const mpq_class& x);
merestone::ComplexDyadic to_dyadic(const Complex& z);
/// Exactly. Requires a dyadic x >= 0 of at most 30 bits.
merestone::Mag to_mag(const mpq_class& x);

/// Is z an element of the closed disc?
bool holds(const merestone::DiscEnclosure& disc, const Complex& z);

}  // namespace reference
