#include "kernel/orbit_enclosure.hpp"
#include "kernel/rules/rules.hpp"
#include "kernel/safe_disc.hpp"
#include "kernel/univalent_disc.hpp"

namespace merestone {

namespace {

// The recurrences of Lemma I2 along the cycle, at one exact parameter c0. Each pass follows the cycle anew, so that
// memory does not grow with the period.
class CycleJet {
 public:
  explicit CycleJet(const InteriorDisc& by) : by_(by), bits_(by.cycle.bits) {}

  // On failure (false): the orbit of the disc is lost.
  bool run() { return first_derivative() && second_derivative() && multiplier_derivatives(); }

  DiscEnclosure multiplier, multiplier_first, multiplier_second;

 private:
  using Value = DiscEnclosure;

  template <class Take>
  bool along_cycle(Take&& take) const {
    OrbitEnclosure orbit(Point{to_rational(by_.centre)}, by_.cycle.disc, bits_);
    while (orbit.index() < by_.cycle.period) {
      take(orbit.at_centre());
      if (!orbit.step()) return false;
    }
    return true;
  }

  Value product(const Value& a, const Value& b) const {
    Value ab;
    multiply(ab, a, b, bits_);
    return ab;
  }
  Value sum(const Value& a, const Value& b) const {
    Value out;
    add(out, a, b, bits_);
    return out;
  }
  static Value doubled(Value a) {
    twice(a, a);
    return a;
  }

  // a / (1 - lambda)
  Value by_one_minus_multiplier(const Value& a) const {
    Acb divisor = ball_around(multiplier), quotient;
    acb_sub_ui(divisor, divisor, 1, bits_);
    acb_neg(divisor, divisor);
    acb_div(quotient, ball_around(a), divisor, bits_);
    return DiscEnclosure::of(quotient);
  }

  bool first_derivative() {
    arf_one(multiplier.re);
    Value a;
    const bool done = along_cycle([&](const Value& z) {
      advance_derivative(a, z, bits_);
      multiplier = product(multiplier, doubled(z));
    });
    if (!done || !certainly_inside(multiplier, Dyadic(1.0))) return false;
    x_ = by_one_minus_multiplier(a);
    return true;
  }

  bool second_derivative() {
    Value x = x_, b;
    const bool done = along_cycle([&](const Value& z) {
      b = doubled(sum(product(x, x), product(z, b)));
      advance_derivative(x, z, bits_);
    });
    if (done) y_ = by_one_minus_multiplier(b);
    return done;
  }

  bool multiplier_derivatives() {
    Value x = x_, y = y_, p, p1, p2;
    arf_one(p.re);
    const bool done = along_cycle([&](const Value& z) {
      p2 = doubled(sum(sum(product(y, p), doubled(product(x, p1))), product(z, p2)));
      p1 = doubled(sum(product(x, p), product(z, p1)));
      p = doubled(product(z, p));
      y = doubled(sum(product(x, x), product(z, y)));
      advance_derivative(x, z, bits_);
    });
    multiplier_first = p1;
    multiplier_second = p2;
    return done;
  }

  const InteriorDisc& by_;
  slong bits_;
  Value x_, y_;  // derivatives of the cycle's first point with respect to c
};

// f'(0) = (1 - |l|²) / l',  f''(0) / (2 f'(0)) = -conj(l) - l'' (1 - |l|²) / (2 l'²)
struct Germ {
  Acb f1, a2;

  Germ(const CycleJet& jet, slong bits) {
    const Acb l = ball_around(jet.multiplier), l1 = ball_around(jet.multiplier_first);
    Arb room;
    acb_abs(room, l, bits);
    arb_mul(room, room, room, bits);
    arb_sub_ui(room, room, 1, bits);
    arb_neg(room, room);
    acb_set_arb(f1, room);
    acb_div(f1, f1, l1, bits);
    acb_mul(a2, f1, ball_around(jet.multiplier_second), bits);
    acb_div(a2, a2, l1, bits);
    acb_mul_2exp_si(a2, a2, -1);
    Acb conjugate;
    acb_conj(conjugate, l);
    acb_add(a2, a2, conjugate, bits);
    acb_neg(a2, a2);
  }
};

}  // namespace

Result<Disc> enclose_interior_disc(const InteriorDisc& by) {
  const Outcome cycle = rules::attracting_disc(Point{to_rational(by.centre)}, by.cycle);
  if (const auto* refused = std::get_if<NotEstablished>(&cycle)) return Failure{"at the centre: " + refused->reason};
  CycleJet jet(by);
  if (!jet.run()) return Failure{"the cycle at the centre, or its multiplier, is enclosed too widely"};
  const Germ germ(jet, by.cycle.bits);
  const std::optional<Disc> disc = univalent_disc(by.centre, germ.f1, germ.a2, by.cycle.bits);
  if (!disc) return Failure{"the enclosures of the multiplier's derivatives are too wide for a disc"};
  return *disc;
}

}  // namespace merestone
