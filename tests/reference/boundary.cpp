#include "reference/boundary.hpp"

#include "reference/convert.hpp"
#include "reference/mpfr_orbit.hpp"

namespace reference {

namespace {

bool leaves(const Complex& c) {
  MpfrOrbit orbit(c, 128);
  for (int n = 0; n < 200; ++n) {
    orbit.step();
    if (mpfr_cmp_ui(static_cast<mpfr_srcptr>(orbit.norm()), 4) > 0) return true;
  }
  return false;
}

}  // namespace

Complex beside_boundary(PointSource& source, long exponent, const mpq_class& from) {
  static const std::vector<Complex> members = {{0, 0}, {-1, 0}, {ratio(-1, 8), ratio(3, 4)}, {ratio(-7, 4), 0}};
  Complex in = source.pick(members), out = from * source.direction();
  while (norm(out - in) > power_of_two(2 * exponent)) {
    const Complex middle = truncated(ratio(1, 2) * (in + out), 60);
    (leaves(middle) ? out : in) = middle;
  }
  return out;
}

}  // namespace reference
