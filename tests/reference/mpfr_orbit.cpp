#include "reference/mpfr_orbit.hpp"

#include <algorithm>
#include <stdexcept>

namespace reference {

namespace {

enum class Ending { escaped, stayed, too_close };
struct Run {
  Ending ending;
  std::uint64_t index;
};

Run run(const Complex& c, const mpq_class& bailout, std::uint64_t limit, mpfr_prec_t bits) {
  MpfrOrbit orbit(c, bits);
  Real edge(bits), gap(bits);
  const mpq_class bailout_squared = bailout * bailout;
  mpfr_set_q(edge, bailout_squared.get_mpq_t(), MPFR_RNDN);
  const mpfr_exp_t closest = mpfr_get_exp(edge) - bits / 4;
  for (std::uint64_t n = 1; n <= limit; ++n) {
    orbit.step();
    mpfr_sub(gap, orbit.norm(), edge, MPFR_RNDN);
    if (mpfr_zero_p(static_cast<mpfr_srcptr>(gap)) || mpfr_get_exp(gap) < closest) return {Ending::too_close, n};
    if (mpfr_sgn(static_cast<mpfr_srcptr>(gap)) > 0) return {Ending::escaped, n};
  }
  return {Ending::stayed, limit};
}

}  // namespace

MpfrOrbit::MpfrOrbit(const Complex& c, mpfr_prec_t bits) : MpfrOrbit(c, Complex{0, 0}, bits) {}

MpfrOrbit::MpfrOrbit(const Complex& c, const Complex& start, mpfr_prec_t bits)
    : c_(c, bits), z_(start, bits), x_squared_(bits), y_squared_(bits), norm_(bits) {}

void MpfrOrbit::step() {
  mpfr_sqr(x_squared_, z_.re, MPFR_RNDN);
  mpfr_sqr(y_squared_, z_.im, MPFR_RNDN);
  mpfr_mul(z_.im, z_.re, z_.im, MPFR_RNDN);
  mpfr_mul_2ui(z_.im, z_.im, 1, MPFR_RNDN);
  mpfr_add(z_.im, z_.im, c_.im, MPFR_RNDN);
  mpfr_sub(z_.re, x_squared_, y_squared_, MPFR_RNDN);
  mpfr_add(z_.re, z_.re, c_.re, MPFR_RNDN);
}

const Real& MpfrOrbit::norm() {
  mpfr_sqr(x_squared_, z_.re, MPFR_RNDN);
  mpfr_sqr(y_squared_, z_.im, MPFR_RNDN);
  mpfr_add(norm_, x_squared_, y_squared_, MPFR_RNDN);
  return norm_;
}

std::uint64_t exact_escape_index(const Complex& c, const mpq_class& bailout, std::uint64_t limit) {
  const mpq_class edge = bailout * bailout;
  Complex z{0, 0};
  for (std::uint64_t n = 1; n <= limit; ++n) {
    z = z * z + c;
    if (reference::norm(z) > edge) return n;
  }
  return 0;
}

std::optional<std::uint64_t> escape_index(const Complex& c, const mpq_class& bailout, std::uint64_t limit) {
  // c itself must be held to its last digit: i + 10^-200 in 448 bits has the orbit of i
  const auto digits = static_cast<mpfr_prec_t>(
      std::max(mpz_sizeinbase(c.re.get_den_mpz_t(), 2), mpz_sizeinbase(c.im.get_den_mpz_t(), 2)));
  for (mpfr_prec_t bits = 448 + digits; bits <= 32 * (448 + digits); bits *= 2) {
    const Run first = run(c, bailout, limit, bits), second = run(c, bailout, limit, bits * 10 / 7);
    if (first.ending == Ending::too_close || second.ending == Ending::too_close) continue;
    if (first.ending != second.ending || first.index != second.index) continue;
    if (first.ending == Ending::stayed) return std::nullopt;
    return first.index;
  }
  throw std::runtime_error("MPFR cannot tell the escape index of " + c.re.get_str() + " + " + c.im.get_str() + " i");
}

}  // namespace reference
