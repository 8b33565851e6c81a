#pragma once
#include <cstdint>
#include <random>
#include <vector>

#include "reference/exact_complex.hpp"

namespace reference {

/// n, or 25 n when the environment variable MERESTONE_THOROUGH is set.
std::uint64_t repeats(std::uint64_t n);

/// A seeded source of exact numbers, biased to where rules are most easily wrong. The same on every machine.
class PointSource {
 public:
  explicit PointSource(std::uint64_t seed) : engine_(seed) {}

  std::uint64_t bits() { return engine_(); }
  std::uint64_t below(std::uint64_t n) { return engine_() % n; }
  long between(long lo, long hi) { return lo + static_cast<long>(below(static_cast<std::uint64_t>(hi - lo + 1))); }
  bool one_in(std::uint64_t n) { return below(n) == 0; }
  template <class T>
  const T& pick(const std::vector<T>& from) {
    return from[below(from.size())];
  }

  /// A dyadic number in [lo, hi) with the given number of places behind the point.
  mpq_class uniform(const mpq_class& lo, const mpq_class& hi, unsigned places);
  /// m 2^e with an odd m of exactly `mantissa_bits` bits, scaled so that it lies in [2^exponent, 2^(exponent+1)).
  mpq_class dyadic(unsigned mantissa_bits, long exponent);
  /// A dyadic of either sign or zero, with few bits or many, huge, tiny or near 1.
  mpq_class any_dyadic();
  /// A point of the unit circle, exact.
  Complex direction();
  /// A point of the closed unit disc, exact: the rim more often than not.
  Complex in_unit_disc();

  /// A parameter in [-2, 0.6] x [-1.2, 1.2] with `places` binary places.
  Complex in_window(unsigned places);
  /// A parameter at or near the cusp, a bifurcation point, the axis, a tip, a nucleus, a tie |z_n| = 2 or anywhere.
  Complex biased();

 private:
  std::mt19937_64 engine_;
};

/// The exact places that biased() is drawn to.
const std::vector<Complex>& special_parameters();

}  // namespace reference
