#include "kernel/rules/rules.hpp"
#include "kernel/shape.hpp"

namespace merestone::rules {

namespace {

bool is_real(const Rectangle& r) { return r.y_lo.sign() == 0 && r.y_hi.sign() == 0; }

const Rational& left_end() {
  static const Rational end(-2);
  return end;
}

const Rational& right_end() {
  static const Rational end(1, 4);
  return end;
}

}  // namespace

Outcome real_segment_member(const Region& region) {
  const Rectangle r = bounding_rectangle(region);
  if (!is_real(r)) return NotEstablished{"the region is not real"};
  if (r.x_lo < left_end() || r.x_hi > right_end()) return NotEstablished{"the region does not lie in [-2, 1/4]"};
  return Established{{}, {"I4"}};
}

Outcome real_segment_outside(const Region& region) {
  const Rectangle r = bounding_rectangle(region);
  if (!is_real(r)) return NotEstablished{"the region is not real"};
  if (!(r.x_hi < left_end()) && !(r.x_lo > right_end())) return NotEstablished{"the region meets [-2, 1/4]"};
  return Established{{}, {"I4"}};
}

}  // namespace merestone::rules
