#include "cli/enclosure_text.hpp"

#include <algorithm>

#include "format/literal.hpp"

namespace merestone {

namespace {

constexpr int kFewestDigits = 3, kMostDigits = 60;

// Decimal digits of x that the radius leaves meaningful, and two more.
int worthwhile_digits(const Arf& x, const Mag& radius) {
  if (mag_is_zero(radius) || arf_is_zero(x)) return mag_is_zero(radius) ? kMostDigits : kFewestDigits;
  Integer exponent;
  fmpz_sub(exponent, ARF_EXPREF(x.raw()), MAG_EXPREF(radius.raw()));
  const slong bits = fmpz_fits_si(exponent) ? fmpz_get_si(exponent) : 0;
  return static_cast<int>(std::clamp<slong>(bits * 30103 / 100000 + 2, kFewestDigits, kMostDigits));
}

std::string literal(const Bounds& bounds, int digits) { return interval_literal(bounds.lower, bounds.upper, digits); }

}  // namespace

PartLiterals part_literals(const DiscEnclosure& z) {
  return {literal(re_bounds(z), worthwhile_digits(z.re, z.radius)),
          literal(im_bounds(z), worthwhile_digits(z.im, z.radius))};
}

std::string complex_literal(const DiscEnclosure& z) {
  const PartLiterals parts = part_literals(z);
  return parts.re + " + " + parts.im + " i";
}

}  // namespace merestone
