#pragma once
#include <complex>
#include <limits>

#include "lanes/doubles.hpp"
#include "lanes/exterior_batch.hpp"

/// Parameters for the tests of many exterior discs, found by plain double precision: where they lie is no matter of
/// proof.
namespace near_boundary {

using merestone::DoublePoint;
using reference::PointSource;

/// The first n with |z_n| > 2^20 in plain double precision, 0 when there is none up to the limit.
inline std::uint64_t plain_index(double c_x, double c_y, std::uint64_t limit) {
  double x = 0, y = 0;
  for (std::uint64_t n = 1; n <= limit; ++n) {
    const double next = x * x - y * y + c_x;
    y = 2 * x * y + c_y, x = next;
    if (x * x + y * y >= 0x1p+40) return n;
  }
  return 0;
}

/// Leaves within 1,000 steps, and is within 2^exponent of one that does not.
inline DoublePoint beside(PointSource& source, long exponent) {
  static const std::vector<std::complex<double>> members = {{0, 0}, {-1, 0}, {-0.125, 0.75}, {-1.75, 0}, {0.28, 0.53}};
  std::complex<double> in = source.pick(members),
                       out = {2 * source.direction().re.get_d(), 2 * source.direction().im.get_d()};
  if (plain_index(out.real(), out.imag(), 1'000) == 0) out = {0, 2};
  while (std::abs(out - in) > std::ldexp(1.0, static_cast<int>(exponent))) {
    const std::complex<double> middle = 0.5 * (in + out);
    (plain_index(middle.real(), middle.imag(), 1'000) != 0 ? out : in) = middle;
  }
  return {out.real(), out.imag()};
}

/// At or near a special parameter, or anywhere.
inline DoublePoint biased(PointSource& source) {
  const reference::Complex c = source.biased();
  return {c.re.get_d(), c.im.get_d()};
}

}  // namespace near_boundary
