#pragma once
#include "reference/convert.hpp"
#include "reference/point_source.hpp"

/// Discs for the tests of disc arithmetic, and exact elements of them.
namespace samples {

using merestone::DiscEnclosure;
using reference::Complex;
using reference::PointSource;

inline void set_arf(merestone::Arf& out, const mpq_class& value) { arf_set(out, reference::to_dyadic(value).raw()); }

/// Real, imaginary or general midpoints with few bits or many; radius zero, tiny, huge or near the midpoint's size.
inline DiscEnclosure any_disc(PointSource& source) {
  DiscEnclosure disc;
  const std::uint64_t shape = source.below(4);
  if (shape != 0) set_arf(disc.re, source.any_dyadic());
  if (shape != 1) set_arf(disc.im, source.any_dyadic());
  if (source.one_in(4)) return disc;
  if (source.one_in(3)) {
    midpoint_modulus_upper(disc.radius, disc);
    mag_mul_2exp_si(disc.radius, disc.radius, source.between(-3, 3));
  } else {
    disc.radius = reference::to_mag(
        source.dyadic(static_cast<unsigned>(source.between(1, 30)), source.between(source.one_in(2) ? -300 : -8, 4)));
  }
  return disc;
}

/// The element at the given place of the unit disc.
inline Complex element(const DiscEnclosure& disc, const Complex& in_unit_disc) {
  return reference::midpoint(disc) + reference::exact(disc.radius) * in_unit_disc;
}

inline slong any_bits(PointSource& source) {
  static const std::vector<slong> all = {2, 3, 8, 30, 53, 64, 65, 128, 500};
  return source.pick(all);
}

}  // namespace samples
