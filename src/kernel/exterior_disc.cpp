#include "kernel/orbit_jet.hpp"
#include "kernel/safe_disc.hpp"
#include "kernel/univalent_disc.hpp"

namespace merestone {

namespace {

constexpr double kFarEnough = 0x1p10;              // |z_n| for the bounds of the tail
constexpr double kLargestParameter = 0x1.0cp+1;    // |c|, at most 2.1

Mag upper(double bound) {
  Mag m;
  mag_set_d(m, bound);
  return m;
}

Mag times(const Mag& a, const Mag& b) {
  Mag product;
  mag_mul(product, a, b);
  return product;
}

Mag plus(const Mag& a, const Mag& b) {
  Mag sum;
  mag_add(sum, a, b);
  return sum;
}

Mag over(const Mag& a, const Mag& lower) {
  Mag quotient;
  mag_div(quotient, a, lower);
  return quotient;
}

Mag modulus_of(const Acb& z) {
  Mag modulus;
  acb_get_mag(modulus, z);
  return modulus;
}

// Lemma E3, tail: upper bounds of |tau|, |tau'|, |tau''|.
struct Tail {
  Mag value, first, second;

  Tail(const Mag& c, const Mag& A, const Mag& B, const Mag& z_lower) {
    Mag squared;
    mag_mul_lower(squared, z_lower, z_lower);
    const Mag cA = times(c, A), w = plus(upper(1), times(upper(2), cA));
    value = over(times(upper(0.505), c), squared);
    first = over(times(upper(1.01), plus(upper(0.5), cA)), squared);
    const Mag linear = plus(times(upper(2), plus(A, times(cA, A))), times(c, B));
    second = plus(over(times(upper(1.01), linear), squared), over(over(times(w, w), squared), squared));
  }
};

void widen(Acb& z, const Mag& by) {
  acb_add_error_mag(z, by);
}

// T = tanh(2^-n g) and Lambda = 2^n T, with g = log|z_n| + Re tau.
struct Potential {
  Arb T, Lambda;

  Potential(const Acb& z, const Mag& tail, std::uint64_t n, slong bits) {
    Integer exponent;
    fmpz_set_ui(exponent, n);
    acb_abs(T, z, bits);
    arb_log(T, T, bits);
    arb_add_error_mag(T, tail);
    fmpz_neg(exponent, exponent);
    arb_mul_2exp_fmpz(T, T, exponent);
    arb_tanh(T, T, bits);
    fmpz_neg(exponent, exponent);
    arb_mul_2exp_fmpz(Lambda, T, exponent);
  }
};

// f'(0) = 2 Lambda / a and f''(0) / (2 f'(0)) = 1 - T² - Lambda b / a²,  a = A + tau', b = B + tau''
struct Germ {
  Acb f1, a2;

  Germ(const Potential& p, const Acb& a, const Acb& b, slong bits) {
    acb_set_arb(f1, p.Lambda);
    acb_mul_2exp_si(f1, f1, 1);
    acb_div(f1, f1, a, bits);
    Acb quotient, squared;
    acb_mul(squared, a, a, bits);
    acb_div(quotient, b, squared, bits);
    acb_mul_arb(quotient, quotient, p.Lambda, bits);
    Arb rest;
    arb_mul(rest, p.T, p.T, bits);
    arb_sub_ui(rest, rest, 1, bits);
    arb_neg(rest, rest);
    acb_set_arb(a2, rest);
    acb_sub(a2, a2, quotient, bits);
  }
};

Germ germ_of(const OrbitJet& jet, slong bits) {
  const Acb z = ball_around(jet.z());
  Acb a, b, squared;
  acb_div(a, ball_around(jet.first()), z, bits);
  acb_div(b, ball_around(jet.second()), z, bits);
  acb_mul(squared, a, a, bits);
  acb_sub(b, b, squared, bits);
  Mag c, z_lower;
  modulus_upper(c, jet.parameter());
  acb_get_mag_lower(z_lower, z);
  const Tail tail(c, modulus_of(a), modulus_of(b), z_lower);
  widen(a, tail.first);
  widen(b, tail.second);
  return Germ(Potential(z, tail.value, jet.index(), bits), a, b, bits);
}

}  // namespace

Result<Disc> enclose_exterior_disc(const ExteriorDisc& by) {
  OrbitJet jet(by.centre, by.bits);
  if (!certainly_within(jet.parameter(), Dyadic(kLargestParameter)))
    return Failure{"the centre is farther than 2.09 from 0"};
  while (jet.index() < by.index)
    if (!jet.step())
      return Failure{"the enclosure of z_" + std::to_string(jet.index()) +
                     " at the centre is wider than 1 or beyond 2^64, before index " + std::to_string(by.index)};
  if (!certainly_beyond(jet.z(), Dyadic(kFarEnough)))
    return Failure{"|z_" + std::to_string(by.index) + "| > 1024 does not hold at the centre at this precision"};
  const Germ germ = germ_of(jet, by.bits);
  const std::optional<Disc> disc = univalent_disc(by.centre, germ.f1, germ.a2, by.bits);
  if (!disc) return Failure{"the enclosures of the derivatives are too wide for a disc at this precision"};
  return *disc;
}

}  // namespace merestone
