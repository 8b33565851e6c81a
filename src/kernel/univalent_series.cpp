#include "kernel/univalent_series.hpp"

namespace merestone {

namespace {

using Polynomial = Handle<acb_poly_struct, acb_poly_init, acb_poly_clear, acb_poly_set>;

constexpr slong kFigureBits = 64;

}  // namespace

Dyadic UnivalentSeries::modulus_lower(std::size_t n) const {
  const Acb& a = coefficients[n - 1];
  Arf modulus;
  if (acb_is_finite(a)) acb_get_abs_lbound_arf(modulus, a, kFigureBits);
  return Dyadic(modulus.raw());
}

Dyadic UnivalentSeries::image_area_lower() const {
  Arf sum, term;
  for (std::size_t n = 1; n <= coefficients.size(); ++n) {
    const Dyadic modulus = modulus_lower(n);
    arf_mul(term, modulus.raw(), modulus.raw(), kFigureBits, ARF_RND_FLOOR);
    arf_mul_ui(term, term, n, kFigureBits, ARF_RND_FLOOR);
    arf_add(sum, sum, term, kFigureBits, ARF_RND_FLOOR);
  }
  Arb pi;
  arb_const_pi(pi, kFigureBits);
  arb_get_lbound_arf(term, pi, kFigureBits);
  arf_mul(sum, sum, term, kFigureBits, ARF_RND_FLOOR);
  return Dyadic(sum.raw());
}

UnivalentSeries reverted(const std::vector<DiscEnclosure>& series, slong bits) {
  UnivalentSeries map;
  map.coefficients.resize(series.size());
  for (Acb& unknown : map.coefficients) acb_indeterminate(unknown);
  Polynomial given, inverse;
  for (std::size_t n = 0; n < series.size(); ++n)
    acb_poly_set_coeff_acb(given, static_cast<slong>(n) + 1, ball_around(series[n]));
  // the library ends the program where the first coefficient may be 0
  if (acb_contains_zero(ball_around(series[0]))) return map;
  acb_poly_revert_series(inverse, given, static_cast<slong>(series.size()) + 1, bits);
  for (std::size_t n = 0; n < series.size(); ++n)
    acb_poly_get_coeff_acb(map.coefficients[n], inverse, static_cast<slong>(n) + 1);
  return map;
}

}  // namespace merestone
