#include "kernel/component.hpp"

namespace merestone {

Disc nucleus_disc(const Component& component) {
  Integer one;
  fmpz_one(one);
  return {{Dyadic(component.re), Dyadic(component.im)}, Dyadic::scaled(one, component.radius_exponent)};
}

std::uint64_t work_of(const Component& component) {
  const std::uint64_t terms = std::uint64_t{component.coefficients} + 1;
  const std::uint64_t words = 1 + component.bits / 64U;
  // the orbits of Lemma P2 are about 4 units a point; then 3/4 n^2 products for n coefficients, and their reversion
  return words * (component.period * (4 + terms * terms) + terms * terms * terms / 8);
}

}  // namespace merestone
