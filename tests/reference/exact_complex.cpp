#include "reference/exact_complex.hpp"

namespace reference {

Complex operator+(const Complex& a, const Complex& b) { return {a.re + b.re, a.im + b.im}; }
Complex operator-(const Complex& a, const Complex& b) { return {a.re - b.re, a.im - b.im}; }
Complex operator*(const Complex& a, const Complex& b) { return {a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re}; }
Complex operator*(const mpq_class& a, const Complex& b) { return {a * b.re, a * b.im}; }
bool operator==(const Complex& a, const Complex& b) { return a.re == b.re && a.im == b.im; }
mpq_class norm(const Complex& z) { return z.re * z.re + z.im * z.im; }

mpq_class ratio(long n, unsigned long d) {
  mpq_class q(n, d);
  q.canonicalize();
  return q;
}

mpq_class power_of_two(long e) {
  const mpz_class power = mpz_class(1) << static_cast<unsigned long>(e < 0 ? -e : e);
  return e < 0 ? mpq_class(mpz_class(1), power) : mpq_class(power);
}

Complex iterate(Complex z, const Complex& c, std::uint64_t n) {
  for (std::uint64_t k = 0; k < n; ++k) z = z * z + c;
  return z;
}

Complex on_unit_circle(const mpq_class& t) {
  const mpq_class square = t * t;
  return {(1 - square) / (1 + square), 2 * t / (1 + square)};
}

const std::vector<Complex>& unit_directions() {
  static const std::vector<Complex> directions = [] {
    std::vector<Complex> all;
    for (const Complex& first :
         {Complex{1, 0}, Complex{ratio(3, 5), ratio(4, 5)}, Complex{ratio(12, 13), ratio(5, 13)}}) {
      Complex turned = first;
      for (int quarter = 0; quarter < 4; ++quarter) {
        all.push_back(turned);
        turned = turned * Complex{0, 1};
      }
    }
    return all;
  }();
  return directions;
}

Complex truncated(const Complex& z, unsigned long places) {
  const auto cut = [places](const mpq_class& x) -> mpq_class {
    return mpq_class(mpz_class((x.get_num() << places) / x.get_den())) * power_of_two(-static_cast<long>(places));
  };
  return {cut(z.re), cut(z.im)};
}

mpq_class sqrt_down(const mpq_class& x, unsigned long bits) {
  const mpz_class scaled = (x.get_num() << (2 * bits)) / x.get_den();
  mpq_class root(mpz_class(sqrt(scaled)), mpz_class(1) << bits);
  root.canonicalize();
  return root;
}

}  // namespace reference
