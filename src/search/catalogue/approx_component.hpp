#pragma once
#include <array>
#include <cstdint>

#include "search/catalogue/approx_nucleus.hpp"

namespace merestone {

/// A hyperbolic component as double precision sees it: zeta -> nucleus + a_1 zeta + a_2 zeta^2 + ... maps the unit disc
/// onto it, the inverse of the multiplier (Lemma A2).
struct ApproxComponent {
  static constexpr std::size_t kMost = 16;

  ApproxNucleus nucleus;
  std::size_t terms = 0;                  // how many coefficients are here
  std::array<PlainComplex, kMost> map{};  // a_1 first

  double approx_area() const;
  /// How many coefficients leave less than `rest` of the area out, as far as those that are here tell.
  std::uint16_t coefficients_for(double rest) const;
  PlainComplex value(PlainComplex zeta) const;
  PlainComplex slope(PlainComplex zeta) const;
  /// At least |slope| on the unit disc.
  double greatest_slope() const;
  /// Is there no cusp at the root, the image of 1? A cusp is where the slope vanishes.
  bool appears_satellite() const;
};

/// The component of the nucleus, with 1 <= terms <= ApproxComponent::kMost coefficients.
ApproxComponent approx_component(const ApproxNucleus& nucleus, std::size_t terms);

}  // namespace merestone
