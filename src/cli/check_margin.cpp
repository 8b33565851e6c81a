#include "cli/check_margin.hpp"

#include <algorithm>

#include "kernel/shape.hpp"

namespace merestone {

namespace {

constexpr slong kBits = 64;

Dyadic root_upper(const Rational& square) {
  Arf upper;
  arf_fmpz_div_fmpz(upper, square.numerator(), square.denominator(), kBits, ARF_RND_CEIL);
  arf_sqrt(upper, upper, kBits, ARF_RND_CEIL);
  return Dyadic(upper.raw());
}

// The larger of the squares of lo - x and hi - x.
Rational larger_square(const Rational& lo, const Rational& hi, const Rational& x) {
  const Rational below = lo - x, above = hi - x;
  return std::max(below * below, above * above);
}

}  // namespace

const Figure* figure_of(const Established& established, const std::string& name) {
  const auto found = std::find_if(established.figures.begin(), established.figures.end(),
                                  [&](const Figure& f) { return f.name == name; });
  return found == established.figures.end() ? nullptr : &*found;
}

std::optional<Dyadic> room(const std::optional<Dyadic>& lesser, const std::optional<Dyadic>& greater) {
  if (!lesser || !greater) return std::nullopt;
  Arf difference;
  arf_sub(difference, greater->raw(), lesser->raw(), kBits, ARF_RND_FLOOR);
  if (arf_sgn(difference) <= 0) return std::nullopt;
  return Dyadic(difference.raw());
}

Dyadic farthest_upper(const Region& region, const ComplexDyadic& from) {
  const ComplexRational at = to_rational(from);
  if (const Disc* disc = std::get_if<Disc>(&region)) {
    Arf sum;
    arf_add(sum, root_upper(norm(to_rational(disc->centre) - at)).raw(), disc->radius.raw(), kBits, ARF_RND_CEIL);
    return Dyadic(sum.raw());
  }
  const Rectangle r = bounding_rectangle(region);
  return root_upper(larger_square(r.x_lo, r.x_hi, at.re) + larger_square(r.y_lo, r.y_hi, at.im));
}

}  // namespace merestone
