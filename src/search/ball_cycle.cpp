#include "search/ball_cycle.hpp"

#include "kernel/rules/rules.hpp"
#include "search/approx_ball.hpp"

namespace merestone {

namespace {

// Complex arithmetic on midpoints at a fixed precision; nothing here is enclosed.
class ApproxReturn {
 public:
  ApproxReturn(const ComplexRational& c, slong bits) : bits_(bits) {
    const DiscEnclosure centre = DiscEnclosure::of(c, bits);
    arb_set_arf(acb_realref(c_.raw()), centre.re);
    arb_set_arf(acb_imagref(c_.raw()), centre.im);
  }

  // z <- f(z)
  void step(Acb& z) const {
    acb_mul(z, z, z, bits_);
    acb_add(z, z, c_, bits_);
    acb_get_mid(z, z);
  }

  // image <- f^period(z), multiplier <- its derivative
  bool run(Acb& image, Acb& multiplier, const Acb& z, std::uint64_t period, Deadline& deadline) const {
    image = z;
    acb_one(multiplier);
    for (std::uint64_t k = 0; k < period; ++k) {
      acb_mul(multiplier, multiplier, image, bits_);
      acb_mul_2exp_si(multiplier, multiplier, 1);
      acb_get_mid(multiplier, multiplier);
      step(image);
      if (arf_cmpabs_2exp_si(arb_midref(acb_realref(image.raw())), 4) > 0 || deadline.passed()) return false;
    }
    return true;
  }

  slong bits() const { return bits_; }

 private:
  slong bits_;
  Acb c_;
};

// Newton's method on f^period(z) - z; false when it does not settle.
bool approx_fixed_point(const ApproxReturn& f, Acb& z, std::uint64_t period, Deadline& deadline) {
  constexpr int kMostSteps = 64;
  Acb image, multiplier, correction;
  for (int step = 0; step < kMostSteps; ++step) {
    if (!f.run(image, multiplier, z, period, deadline)) return false;
    acb_sub(correction, image, z, f.bits());
    acb_sub_ui(multiplier, multiplier, 1, f.bits());
    acb_div(correction, correction, multiplier, f.bits());
    acb_get_mid(correction, correction);
    if (!acb_is_finite(correction)) return false;
    const slong size = approx_exponent(correction);
    if (size > 0) return false;
    acb_sub(z, z, correction, f.bits());
    acb_get_mid(z, z);
    if (size < -f.bits() * 7 / 8) return true;
  }
  return false;
}

std::uint64_t approx_least_period(const ApproxReturn& f, const Acb& z, std::uint64_t period, Deadline& deadline) {
  Acb w = z, offset;
  for (std::uint64_t k = 1; k < period && !deadline.passed(); ++k) {
    f.step(w);
    if (period % k != 0) continue;
    acb_sub(offset, w, z, f.bits());
    if (approx_exponent(offset) < -f.bits() / 2) return k;
  }
  return period;
}

bool is_contracting(const ApproxReturn& f, const Acb& z, std::uint64_t period, Deadline& deadline) {
  Acb image, multiplier;
  Mag size;
  if (!f.run(image, multiplier, z, period, deadline)) return false;
  acb_get_mag_lower(size, multiplier);
  return mag_cmp_2exp_si(size, 0) < 0;
}

}  // namespace

std::optional<AttractingDisc> find_attracting_disc(const ComplexRational& c, const DiscEnclosure& start,
                                                   std::uint64_t approx_period, std::uint32_t bits,
                                                   Deadline& deadline) {
  const ApproxReturn f(c, bits);
  Acb z;
  arb_set_arf(acb_realref(z.raw()), start.re);
  arb_set_arf(acb_imagref(z.raw()), start.im);
  if (!approx_fixed_point(f, z, approx_period, deadline)) return std::nullopt;
  const std::uint64_t period = approx_least_period(f, z, approx_period, deadline);
  if (!is_contracting(f, z, period, deadline)) return std::nullopt;
  Integer one;
  fmpz_one(one);
  // from a tight enclosure of the cycle to a wide one: rounding needs room, the quadratic term forbids too much of it
  for (const int eighths : {6, 5, 4, 3, 2, 1}) {
    if (deadline.passed_now()) return std::nullopt;
    const long exponent = -static_cast<long>(bits) * eighths / 8;
    const AttractingDisc candidate{period, {midpoint_of(z), Dyadic::scaled(one, exponent)}, bits};
    if (std::holds_alternative<Established>(rules::attracting_disc(Point{c}, candidate))) return candidate;
  }
  return std::nullopt;
}

}  // namespace merestone
