#pragma once
#include "kernel/region.hpp"

namespace merestone {

/// A closed disc that encloses a complex number or a set of them: an arbitrary-precision midpoint and one radius.
/// Unlike a rectangle it does not grow by a factor up to sqrt(2) at each complex multiplication.
struct DiscEnclosure {
  Arf re, im;
  Mag radius;

  /// Encloses z, with a midpoint of `bits` bits. Radius 0 where that is exact.
  static DiscEnclosure of(const ComplexRational& z, slong bits);
  /// Encloses the rectangular ball.
  static DiscEnclosure of(const Acb& ball);
  /// Encloses the closed disc.
  static DiscEnclosure of(const Disc& disc, slong bits);

  bool is_exact() const { return mag_is_zero(radius) != 0; }
};

/// A rectangular ball that encloses z, for what discs have no arithmetic for.
Acb ball_around(const ComplexRational& z, slong bits);

/// A rectangular ball that encloses the disc.
Acb ball_around(const DiscEnclosure& z);

/// |midpoint|, rounded up.
void midpoint_modulus_upper(Mag& out, const DiscEnclosure& z);
/// max |z| over the disc, rounded up.
void modulus_upper(Mag& out, const DiscEnclosure& z);

// Arithmetic. Each encloses the result for every choice of elements; midpoints are rounded to `bits` bits and the
// rounding is added to the radius. Aliasing is allowed.

void multiply(DiscEnclosure& out, const DiscEnclosure& a, const DiscEnclosure& b, slong bits);
void square(DiscEnclosure& out, const DiscEnclosure& a, slong bits);
void add(DiscEnclosure& out, const DiscEnclosure& a, const DiscEnclosure& b, slong bits);
/// out = 2 a, exactly.
void twice(DiscEnclosure& out, const DiscEnclosure& a);

/// Encloses a - b.
DiscEnclosure difference(const DiscEnclosure& a, const DiscEnclosure& b, slong bits);

// Comparisons and bounds (Lemma B2): true is a proof, false says nothing.

/// |z| > bound for every z of the disc. Requires bound >= 0.
bool certainly_beyond(const DiscEnclosure& z, const Dyadic& bound);
/// |z| <= bound for every z of the disc.
bool certainly_within(const DiscEnclosure& z, const Dyadic& bound);
/// |z| < bound for every z of the disc.
bool certainly_inside(const DiscEnclosure& z, const Dyadic& bound);

/// A real interval with exact ends.
struct Bounds {
  Dyadic lower, upper;
};

/// The real and the imaginary part over the disc, rounded outward far below the last place of the midpoint.
Bounds re_bounds(const DiscEnclosure& z);
Bounds im_bounds(const DiscEnclosure& z);

/// Lower and upper bounds of |z| over the disc, rounded outward to 64 bits.
Dyadic modulus_lower_bound(const DiscEnclosure& z);
Dyadic modulus_upper_bound(const DiscEnclosure& z);

}  // namespace merestone
