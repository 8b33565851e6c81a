#include "search/region_bounds.hpp"

#include <cmath>

#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

constexpr slong kGridBits = 64;  // the grid is finer than the region by these

// x on the grid of the multiples of 2^exponent, rounded down or up; x itself where it is dyadic.
Dyadic on_grid(const Rational& x, slong exponent, bool up) {
  Integer scaled, rest, denominator;
  fmpz_set(scaled, x.numerator());
  fmpz_set(denominator, x.denominator());
  Arf exact;
  if (arf_fmpz_div_fmpz(exact, scaled, denominator, fmpz_bits(scaled) + 2, ARF_RND_DOWN) == 0) return Dyadic(exact.raw());
  if (exponent <= 0)
    fmpz_mul_2exp(scaled, scaled, static_cast<ulong>(-exponent));
  else
    fmpz_mul_2exp(denominator, denominator, static_cast<ulong>(exponent));
  if (up)
    fmpz_cdiv_q(scaled, scaled, denominator);
  else
    fmpz_fdiv_q(scaled, scaled, denominator);
  return Dyadic::scaled(scaled, exponent);
}

slong exponent_of(const Rational& positive) {
  return static_cast<slong>(fmpz_bits(positive.numerator())) - static_cast<slong>(fmpz_bits(positive.denominator())) + 1;
}

RegionBounds bound(const Rectangle& r) {
  const slong e = std::min(exponent_of(r.x_hi - r.x_lo), exponent_of(r.y_hi - r.y_lo)) - kGridBits;
  const auto down = [&](const Rational& x) { return on_grid(x, e, false); };
  const auto up = [&](const Rational& x) { return on_grid(x, e, true); };
  return {Box{{down(r.x_lo), down(r.y_lo)}, {up(r.x_hi), up(r.y_hi)}},
          Box{{up(r.x_lo), up(r.y_lo)}, {down(r.x_hi), down(r.y_hi)}}};
}

RegionBounds bound(const Round& r) {
  const slong e = exponent_of(r.radius) - kGridBits;
  const ComplexDyadic centre{on_grid(r.centre.re, e, false), on_grid(r.centre.im, e, false)};
  const bool is_exact = to_rational(centre) == r.centre;
  Integer one;
  fmpz_one(one);
  const Dyadic shift = is_exact ? Dyadic() : Dyadic::scaled(one, e + 1);  // |centre - typed centre| < 2^e sqrt 2
  return {Disc{centre, on_grid(r.radius, e, true) + shift}, Disc{centre, on_grid(r.radius, e, false) - shift}};
}

}  // namespace

RegionBounds bound_region(const Shape& typed) {
  return std::visit([](const auto& shape) { return bound(shape); }, typed);
}

slong size_exponent(const Region& region) {
  const Rectangle r = bounding_rectangle(region);
  return exponent_of(std::max(r.x_hi - r.x_lo, r.y_hi - r.y_lo));
}

std::optional<DoubleBox> enclose_in_double(const Box& box) {
  const ComplexDyadic centre = centre_of(box);
  DoubleBox out;
  out.x = arf_get_d(centre.re.raw(), ARF_RND_NEAR);
  out.y = arf_get_d(centre.im.raw(), ARF_RND_NEAR);
  if (!(std::abs(out.x) <= 4 && std::abs(out.y) <= 4)) return std::nullopt;
  const auto reach = [](const Dyadic& lo, const Dyadic& hi, double middle) {
    const Dyadic exact(middle);
    return arf_get_d(std::max(hi - exact, exact - lo).raw(), ARF_RND_UP);
  };
  out.half_width = reach(box.lo.re, box.hi.re, out.x);
  out.half_height = reach(box.lo.im, box.hi.im, out.y);
  if (!(out.half_width <= 8 && out.half_height <= 8)) return std::nullopt;
  return out;
}

}  // namespace merestone
