#include "reference/mpfr_jet.hpp"

#include "reference/mpfr_cycle.hpp"

namespace reference {

namespace {

constexpr unsigned long kCut = 1200;  // binary places that are kept of what exact arithmetic goes on with

// z, z' and z'' side by side.
class JetOrbit {
 public:
  JetOrbit(const Complex& c, mpfr_prec_t bits) : c_(c, bits), z_(bits), first_(bits), second_(bits), bits_(bits) {
    for (RealPair* part : {&z_, &first_, &second_}) *part = RealPair(Complex{0, 0}, bits);
  }

  void step() {
    // z'' <- 2 (z'² + z z''), z' <- 2 z z' + 1, z <- z² + c, with old values on the right
    RealPair a = product(first_, first_), b = product(z_, second_);
    mpfr_add(a.re, a.re, b.re, MPFR_RNDN);
    mpfr_add(a.im, a.im, b.im, MPFR_RNDN);
    second_ = doubled(a);
    first_ = doubled(product(z_, first_));
    mpfr_add_ui(first_.re, first_.re, 1, MPFR_RNDN);
    z_ = product(z_, z_);
    mpfr_add(z_.re, z_.re, c_.re, MPFR_RNDN);
    mpfr_add(z_.im, z_.im, c_.im, MPFR_RNDN);
    ++index_;
  }

  bool is_beyond(long exponent) const { return size(z_.re) > exponent || size(z_.im) > exponent; }
  std::uint64_t index() const { return index_; }
  Jet jet() const { return {index_, z_.exact(), first_.exact(), second_.exact()}; }

 private:
  static long size(const Real& x) {
    return mpfr_zero_p(static_cast<mpfr_srcptr>(x)) ? -1'000'000 : static_cast<long>(mpfr_get_exp(x)) - 1;
  }
  RealPair product(const RealPair& a, const RealPair& b) const {
    RealPair out(bits_);
    mpfr_fmms(out.re, a.re, b.re, a.im, b.im, MPFR_RNDN);
    mpfr_fmma(out.im, a.re, b.im, a.im, b.re, MPFR_RNDN);
    return out;
  }
  static RealPair doubled(RealPair a) {
    mpfr_mul_2ui(a.re, a.re, 1, MPFR_RNDN);
    mpfr_mul_2ui(a.im, a.im, 1, MPFR_RNDN);
    return a;
  }

  RealPair c_, z_, first_, second_;
  mpfr_prec_t bits_;
  std::uint64_t index_ = 0;
};

// log|z| from |z|²
Real log_modulus(const Complex& z, mpfr_prec_t bits) {
  Real out(bits);
  const mpq_class squared = norm(z);
  mpfr_set_q(out, squared.get_mpq_t(), MPFR_RNDN);
  mpfr_log(out, out, MPFR_RNDN);
  mpfr_div_2ui(out, out, 1, MPFR_RNDN);
  return out;
}

}  // namespace

Complex quotient(const Complex& a, const Complex& b) {
  const mpq_class scale = 1 / norm(b);
  return scale * (a * Complex{b.re, -b.im});
}

Jet jet(const Complex& c, std::uint64_t n, mpfr_prec_t bits) {
  JetOrbit orbit(c, bits);
  while (orbit.index() < n) orbit.step();
  return orbit.jet();
}

std::optional<Jet> jet_beyond(const Complex& c, long exponent, std::uint64_t limit, mpfr_prec_t bits) {
  JetOrbit orbit(c, bits);
  while (orbit.index() < limit) {
    orbit.step();
    if (orbit.is_beyond(exponent)) return orbit.jet();
  }
  return std::nullopt;
}

bool covers(const Germ& germ, const Complex& offset, const mpq_class& radius) {
  const mpq_class delta = 4 - norm(germ.a2), scale = 1 / delta;
  const Complex centre = scale * (germ.f1 * Complex{germ.a2.re, -germ.a2.im});
  const mpq_class room = 2 * scale * sqrt_down(norm(germ.f1), 1100) - radius;
  return delta > 0 && room > 0 && norm(offset - centre) < room * room;
}

std::optional<Germ> exterior_germ(const Complex& c, std::uint64_t limit, mpfr_prec_t bits) {
  const auto at = jet_beyond(c, 700, limit, bits);
  if (!at) return std::nullopt;
  Real half_potential = log_modulus(at->z, bits);
  mpfr_div_2ui(half_potential, half_potential, at->index, MPFR_RNDN);
  mpfr_tanh(half_potential, half_potential, MPFR_RNDN);
  const mpq_class T = half_potential.exact(), scale = power_of_two(1 - static_cast<long>(at->index));
  const Complex A = truncated(quotient(at->first, at->z), kCut),
                B = truncated(quotient(at->second, at->z) - A * A, kCut), L1 = scale * A, L2 = scale * B;
  const mpq_class twice_T = 2 * T, rest = 1 - T * T;
  const Complex bend = twice_T * quotient(L2, L1 * L1);
  return Germ{truncated(quotient(Complex{2 * twice_T, 0}, L1), kCut), truncated(Complex{rest, 0} - bend, kCut)};
}

std::optional<Germ> interior_germ(const Complex& c, std::uint64_t period) {
  constexpr long kStep = 200;  // of 2000 bits: errors of about 2^-400 of the truncation, far less of rounding
  const mpq_class h = power_of_two(-kStep);
  const auto middle = find_cycle(c, {0, 0}, period, 2000, 400);
  if (!middle || middle->period() != period) return std::nullopt;
  const Complex at = truncated(middle->points.front(), kCut);
  const auto right = find_cycle(c + Complex{h, 0}, at, period, 2000, 0),
             left = find_cycle(c - Complex{h, 0}, at, period, 2000, 0);
  if (!right || !left) return std::nullopt;
  const Complex l = middle->multiplier, r = right->multiplier, s = left->multiplier;
  const mpq_class per_step = 1 / (2 * h), per_square = 1 / (h * h), room = 1 - norm(l);
  const Complex l1 = per_step * (r - s), l2 = per_square * (r + s - mpq_class(2) * l);
  const Complex second = quotient(l2, mpq_class(2) * (l1 * l1));
  return Germ{truncated(quotient({room, 0}, l1), kCut), truncated(Complex{-l.re, l.im} - room * second, kCut)};
}

std::optional<Complex> root_near(const Complex& start, std::uint64_t preperiod, std::uint64_t period,
                                 mpfr_prec_t bits) {
  Complex c = start;
  for (int step = 0; step < 60; ++step) {
    const std::uint64_t last = preperiod == 0 ? period : preperiod - 1 + period;
    Jet g = jet(c, last, 2 * bits);
    if (preperiod != 0) {
      const Jet before = jet(c, preperiod - 1, 2 * bits);
      g.z = g.z + before.z;
      g.first = g.first + before.first;
    }
    if (norm(g.first) == 0) return std::nullopt;
    const Complex correction = quotient(g.z, g.first);
    c = truncated(c - correction, static_cast<unsigned long>(bits) + 100);
    if (norm(correction) < power_of_two(-2 * bits)) return c;
  }
  return std::nullopt;
}

}  // namespace reference
