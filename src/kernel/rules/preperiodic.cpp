#include "kernel/rules/rules.hpp"

namespace merestone::rules {

namespace {

ComplexRational next(const ComplexRational& z, const ComplexRational& c) { return square(z) + c; }

}  // namespace

Outcome preperiodic(const Region& region, const Preperiodic& by) {
  const Point* point = std::get_if<Point>(&region);
  if (point == nullptr) return NotEstablished{"the region is not a point"};
  const ComplexRational& c = point->at;
  // z_{k+p} - z_k is a monic polynomial in c with integer coefficients: a rational root is an integer.
  if (!c.re.is_integer() || !c.im.is_integer())
    return NotEstablished{"the parameter is not a Gaussian integer, so its critical orbit cannot be preperiodic"};
  ComplexRational z, at_preperiod;
  const std::uint64_t last = std::uint64_t{by.preperiod} + by.period;
  for (std::uint64_t n = 0; n <= last; ++n) {
    if (n > 0) z = next(z, c);
    if (norm(z) > Rational(4)) return NotEstablished{"the orbit leaves the disc |z| <= 2"};
    if (n == by.preperiod) at_preperiod = z;
  }
  if (!(z == at_preperiod))
    return NotEstablished{"z_" + std::to_string(last) + " and z_" + std::to_string(by.preperiod) + " differ"};
  return Established{{}, {"P1"}};
}

}  // namespace merestone::rules
