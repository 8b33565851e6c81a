#include "kernel/component_area.hpp"

#include <cmath>

#include "kernel/component_series.hpp"
#include "kernel/isolated_nucleus.hpp"
#include "kernel/orbit_enclosure.hpp"
#include "kernel/univalent_series.hpp"

namespace merestone {

namespace {

std::optional<Failure> out_of_range(const Component& c) {
  const auto minus_zero = [](double x) { return x == 0 && std::signbit(x); };
  if (!std::isfinite(c.re) || !std::isfinite(c.im) || minus_zero(c.re) || minus_zero(c.im))
    return Failure{"the centre's coordinates must be finite, and zero without a sign"};
  if (c.period < 1 || c.period > kLongestComponentPeriod) return Failure{"the period must be 1 to 20000"};
  if (c.coefficients < 1 || c.coefficients > kMostComponentCoefficients)
    return Failure{"the number of coefficients must be 1 to 512"};
  if (c.bits < kFewestComponentBits || c.bits > kMostComponentBits)
    return Failure{"the precision must be 53 to 4096 bits"};
  if (c.radius_exponent < kLeastRadiusExponent || c.radius_exponent > 0)
    return Failure{"the radius must be 2^-1000 to 1"};
  if (std::uint64_t{c.period} * c.coefficients > kMostSeriesTerms)
    return Failure{"period times coefficients must be at most 2^20"};
  if (!c.is_real() && !(c.im > std::ldexp(1.0, c.radius_exponent)))
    return Failure{"the centre is neither real nor above the real axis by more than the radius"};
  return std::nullopt;
}

Acb midpoint_ball(const DiscEnclosure& z) {
  Acb ball;
  arb_set_arf(acb_realref(ball.raw()), z.re);
  arb_set_arf(acb_imagref(ball.raw()), z.im);
  return ball;
}

// One step of Newton's method from the centre a, rounded to a point. It proves nothing.
ComplexDyadic approx_newton_step(const ComplexDyadic& a, const IsolatedBy& root, slong bits) {
  Acb step, from;
  acb_div(step, midpoint_ball(root.value), midpoint_ball(root.slope), bits);
  arb_set_arf(acb_realref(from.raw()), a.re.raw());
  arb_set_arf(acb_imagref(from.raw()), a.im.raw());
  acb_sub(step, from, step, bits);
  return {Dyadic(arb_midref(acb_realref(step.raw()))), Dyadic(arb_midref(acb_imagref(step.raw())))};
}

bool is_in(const ComplexDyadic& c, const Disc& disc) {
  DiscEnclosure from_centre;
  arf_set(from_centre.re, (c.re - disc.centre.re).raw());
  arf_set(from_centre.im, (c.im - disc.centre.im).raw());
  return certainly_within(from_centre, disc.radius);
}

// The disc about c, a point of the proved disc, in which the root lies: of radius |z_period(c)| / kappa (Lemma P2 (a)).
std::optional<DiscEnclosure> enclosure_about(const ComplexDyadic& c, const IsolatedBy& root, std::uint32_t period,
                                             slong bits) {
  const Disc point{c, Dyadic()};
  DiscEnclosure at = DiscEnclosure::of(point, bits), z = at;
  for (std::uint32_t n = 1; n < period; ++n) {
    square(z, z, bits);
    add(z, z, at, bits);
    if (is_lost(z)) return std::nullopt;
  }
  Arf distance;
  arf_div(distance, modulus_upper_bound(z).raw(), root.steepness.raw(), 64, ARF_RND_CEIL);
  return DiscEnclosure::of(Disc{c, Dyadic(distance.raw())}, bits);
}

// The nucleus as narrowly as the precision allows.
DiscEnclosure narrowed(const Disc& disc, const IsolatedBy& root, const Component& component) {
  const slong bits = component.bits;
  ComplexDyadic c = approx_newton_step(disc.centre, root, bits);
  if (component.is_real()) c.im = Dyadic();
  if (is_in(c, disc))
    if (auto narrow = enclosure_about(c, root, component.period, bits)) return *narrow;
  return DiscEnclosure::of(Disc{disc.centre, root.distance}, bits);
}

}  // namespace

Result<ComponentArea> establish_component(const Component& component) {
  if (auto fault = out_of_range(component)) return *fault;
  const Disc disc = nucleus_disc(component);
  const auto isolated = isolate_nucleus(disc, component.period, component.bits);
  if (const auto* problem = std::get_if<NotEstablished>(&isolated)) return Failure{problem->reason};
  ComponentArea area;
  area.nucleus = narrowed(disc, std::get<IsolatedBy>(isolated), component);
  const auto multiplier = multiplier_series(area.nucleus, component.period, component.coefficients, component.bits);
  if (!multiplier) return Failure{"the enclosure of the cycle at the nucleus is wider than 1 or beyond 2^64"};
  const UnivalentSeries map = reverted(*multiplier, component.bits);
  area.conformal_radius_lower = map.modulus_lower(1);
  area.lower = map.image_area_lower();
  return area;
}

Dyadic counted_area(const Component& component, const Dyadic& lower) {
  return component.is_real() ? lower : lower.shifted(1);
}

}  // namespace merestone
