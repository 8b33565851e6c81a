#pragma once
#include <cstdint>
#include <optional>

#include "reference/mpfr_orbit.hpp"

namespace reference {

Complex quotient(const Complex& a, const Complex& b);

/// z_n(c) and its first two derivatives with respect to c, in MPFR's floating point, no enclosure.
struct Jet {
  std::uint64_t index;
  Complex z, first, second;
};
Jet jet(const Complex& c, std::uint64_t n, mpfr_prec_t bits);
/// At the first index with |z_n| > 2^exponent; nothing when there is none up to the limit.
std::optional<Jet> jet_beyond(const Complex& c, long exponent, std::uint64_t limit, mpfr_prec_t bits);

/// A univalent map f of the unit disc at its centre: f'(0) and f''(0) / (2 f'(0)).
struct Germ {
  Complex f1, a2;
};
/// Does f take every value in the closed disc about f(0) + offset, as far as Bieberbach's bound tells? A value
/// f(0) + v that f omits makes |f1 + a2 v| <= 2 |v|, since f / (1 - f/v) is univalent (textbook); where |a2| < 2 the
/// other v form an open disc. Exact but for the root of |f1|², taken to 2^-1100. Requires |a2| < 2.
bool covers(const Germ& germ, const Complex& offset, const mpq_class& radius);

/// Of the map into the complement of M that sends 0 to c, from the derivatives of log(z_n) / 2^(n-1) where |z_n| is
/// beyond 2^700. Nothing when c does not escape up to the limit.
std::optional<Germ> exterior_germ(const Complex& c, std::uint64_t limit, mpfr_prec_t bits = 2048);
/// Of the inverse of the multiplier map, moved to send 0 to c, from difference quotients of the multiplier.
/// Nothing when the cycle is not found.
std::optional<Germ> interior_germ(const Complex& c, std::uint64_t period);

/// The root near `start` of z_period (preperiod 0) or of z_{preperiod-1+period} + z_{preperiod-1}, by Newton's method,
/// with about `bits` binary places. Nothing when the method does not settle.
std::optional<Complex> root_near(const Complex& start, std::uint64_t preperiod, std::uint64_t period,
                                 mpfr_prec_t bits = 600);

}  // namespace reference
