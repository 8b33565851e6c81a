#include "lanes/double_parameter.hpp"

#include <cmath>

namespace merestone {

namespace {

struct Rounded {
  double value, error;
};

// The nearest double and an upper bound of the distance to it.
Rounded rounded(const Rational& r) {
  constexpr slong kBits = 64;
  Acb ball;
  arb_struct* x = acb_realref(ball.raw());
  arb_set_fmpq(x, r.raw(), kBits);
  Rounded out;
  out.value = arf_get_d(arb_midref(x), ARF_RND_NEAR);
  Arf nearest;
  arf_set_d(nearest, out.value);
  arb_sub_arf(x, x, nearest, kBits);
  Mag distance;
  arb_get_mag(distance, x);
  out.error = mag_get_d(distance);
  // mag_get_d rounds up but for underflow
  if (out.error == 0 && !mag_is_zero(distance)) out.error = 0x1p-1074;
  return out;
}

}  // namespace

std::optional<DoubleParameter> enclose_in_double(const ComplexRational& c) {
  static const Rational kMost(4);
  for (const Rational* part : {&c.re, &c.im})
    if (*part > kMost || -*part > kMost) return std::nullopt;
  const Rounded re = rounded(c.re), im = rounded(c.im);
  const double sum = re.error + im.error;
  return DoubleParameter{re.value, im.value, sum > 0 ? std::nextafter(sum, 1.0) : 0};
}

}  // namespace merestone
