#include "search/double_cycle.hpp"

#include <cmath>

#include "lanes/attraction.hpp"
#include "search/plain_complex.hpp"

namespace merestone {

namespace {

using Complex = PlainComplex;

struct Return {
  Complex image, multiplier;
};

// f^period(z) and its derivative
Return approx_return(Complex c, Complex z, std::uint64_t period) {
  Complex multiplier{1, 0};
  for (std::uint64_t k = 0; k < period; ++k) {
    multiplier = multiplier * Complex{2 * z.x, 2 * z.y};
    const Complex square = z * z;
    z = {square.x + c.x, square.y + c.y};
  }
  return {z, multiplier};
}

// Newton's method on f^period(z) - z; nothing when it does not settle, which shows after a few steps.
std::optional<Complex> approx_fixed_point(Complex c, Complex z, std::uint64_t period) {
  constexpr int kMostSteps = 24, kPatientSteps = 6;
  constexpr double kHopeless = 0x1p-8;
  for (int step = 0; step < kMostSteps; ++step) {
    const Return r = approx_return(c, z, period);
    const Complex correction = (r.image - z) / (r.multiplier - Complex{1, 0});
    const double size = approx_modulus(correction);
    if (!(size < 1) || (step == kPatientSteps && size > kHopeless)) return std::nullopt;
    z = z - correction;
    if (size < 0x1p-44) return z;
  }
  return std::nullopt;
}

// The smallest divisor of `period` after which the orbit of z is back at z, as far as double precision can tell.
std::uint64_t approx_least_period(Complex c, Complex z, std::uint64_t period) {
  Complex w = z;
  for (std::uint64_t k = 1; k < period; ++k) {
    const Complex square = w * w;
    w = {square.x + c.x, square.y + c.y};
    if (period % k == 0 && approx_modulus(w - z) < 0x1p-30) return k;
  }
  return period;
}

}  // namespace

std::optional<DoubleDisc> find_attracting_disc(const DoubleParameter& parameter, double x, double y,
                                               std::uint64_t approx_period) {
  const Complex c{parameter.x, parameter.y};
  const std::optional<Complex> centre = approx_fixed_point(c, {x, y}, approx_period);
  if (!centre) return std::nullopt;
  const std::uint64_t period = approx_least_period(c, *centre, approx_period);
  if (!(approx_modulus(approx_return(c, *centre, period).multiplier) < 1)) return std::nullopt;
  for (const int exponent : {-40, -34, -28, -22, -16, -10}) {
    const double radius = std::ldexp(1.0, exponent);
    if (proves_attraction(parameter, centre->x, centre->y, radius, period))
      return DoubleDisc{centre->x, centre->y, radius, period};
  }
  return std::nullopt;
}

}  // namespace merestone
