#pragma once
#include <gmpxx.h>

#include <cstdint>
#include <vector>

namespace reference {

/// An exact complex number, with GMP's rationals: nothing of the kernel computes here.
struct Complex {
  mpq_class re, im;
};

Complex operator+(const Complex& a, const Complex& b);
Complex operator-(const Complex& a, const Complex& b);
Complex operator*(const Complex& a, const Complex& b);
Complex operator*(const mpq_class& a, const Complex& b);
bool operator==(const Complex& a, const Complex& b);
/// |z|², exactly.
mpq_class norm(const Complex& z);

/// n / d in lowest terms.
mpq_class ratio(long n, unsigned long d);
/// 2^e.
mpq_class power_of_two(long e);

/// z_n(c) by exact iteration from z; the number of digits doubles with every step.
Complex iterate(Complex z, const Complex& c, std::uint64_t n);

/// The point of the unit circle at angle 2 atan(t), exactly.
Complex on_unit_circle(const mpq_class& t);
/// 1, i, -1, -i and eight exact points of the unit circle between them.
const std::vector<Complex>& unit_directions();

/// z with the binary places of both parts beyond `places` cut off.
Complex truncated(const Complex& z, unsigned long places);

/// floor(sqrt(x) 2^bits) / 2^bits. Requires x >= 0.
mpq_class sqrt_down(const mpq_class& x, unsigned long bits);

}  // namespace reference
