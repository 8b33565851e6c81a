#pragma once
#include <cmath>

namespace merestone {

/// A complex number in double precision for searching: nothing about infinities, nothing proved.
struct PlainComplex {
  double x = 0, y = 0;
};

inline PlainComplex operator+(PlainComplex a, PlainComplex b) { return {a.x + b.x, a.y + b.y}; }
inline PlainComplex operator-(PlainComplex a, PlainComplex b) { return {a.x - b.x, a.y - b.y}; }
inline PlainComplex operator*(PlainComplex a, PlainComplex b) { return {a.x * b.x - a.y * b.y, a.x * b.y + a.y * b.x}; }
inline PlainComplex operator*(double a, PlainComplex b) { return {a * b.x, a * b.y}; }
inline double approx_norm(PlainComplex a) { return a.x * a.x + a.y * a.y; }
inline double approx_modulus(PlainComplex a) { return std::sqrt(approx_norm(a)); }
inline PlainComplex operator/(PlainComplex a, PlainComplex b) {
  const double n = approx_norm(b);
  return {(a.x * b.x + a.y * b.y) / n, (a.y * b.x - a.x * b.y) / n};
}

}  // namespace merestone
