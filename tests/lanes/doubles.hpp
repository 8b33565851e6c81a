#pragma once
#include <cmath>

#include "lanes/double_parameter.hpp"
#include "reference/exact_complex.hpp"
#include "reference/point_source.hpp"

/// Doubles for the tests of tracked arithmetic.
namespace doubles {

using reference::Complex;
using reference::PointSource;

inline mpq_class exact(double x) { return mpq_class(x); }
inline Complex exact(double x, double y) { return {mpq_class(x), mpq_class(y)}; }
inline Complex exact(const merestone::DoubleParameter& c) { return exact(c.x, c.y); }

/// A double of any of 53 bits in [2^exponent, 2^(exponent+1)), of either sign.
inline double any_double(PointSource& source, long exponent) {
  const double mantissa = 1.0 + std::ldexp(static_cast<double>(source.bits() >> 12), -52);
  return std::ldexp(source.one_in(2) ? mantissa : -mantissa, static_cast<int>(exponent));
}

/// 0, a size at which squares underflow, or most often one near 1.
inline double coordinate(PointSource& source) {
  if (source.one_in(12)) return 0;
  if (source.one_in(8)) return any_double(source, source.between(-600, -200));
  if (source.one_in(3)) return any_double(source, source.between(-60, 0));
  return any_double(source, source.between(-2, 0));
}

}  // namespace doubles
