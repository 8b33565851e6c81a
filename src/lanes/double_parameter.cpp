#include "lanes/double_parameter.hpp"

#include <cmath>

namespace merestone {

namespace {

struct Rounded {
  double value, error;
};

// For numerator and denominator of one word: three roundings of at most 2^-53 in proportion, none where all is exact.
std::optional<Rounded> quickly_rounded(const Rational& r) {
  if (COEFF_IS_MPZ(*r.numerator()) || COEFF_IS_MPZ(*r.denominator())) return std::nullopt;
  const slong numerator = *r.numerator(), denominator = *r.denominator();
  constexpr slong kExact = slong{1} << 53;
  const bool is_exact = -kExact <= numerator && numerator <= kExact && (denominator & (denominator - 1)) == 0;
  const double value = static_cast<double>(numerator) / static_cast<double>(denominator);
  return Rounded{value, is_exact ? 0 : 0x1p-51 * std::abs(value)};
}

// A double near r and an upper bound of the distance to it.
Rounded rounded(const Rational& r) {
  if (const auto quick = quickly_rounded(r)) return *quick;
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
  out.error = mag_get_d(distance);  // rounds up, never to 0
  return out;
}

}  // namespace

std::optional<DoubleParameter> enclose_in_double(const ComplexRational& c) {
  const Rounded re = rounded(c.re), im = rounded(c.im);
  if (!(std::abs(re.value) <= 4 && std::abs(im.value) <= 4)) return std::nullopt;
  const double sum = re.error + im.error;
  return DoubleParameter{re.value, im.value, sum > 0 ? std::nextafter(sum, 1.0) : 0};
}

}  // namespace merestone
