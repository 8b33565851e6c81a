#pragma once
#include <cstdint>
#include <optional>

#include "reference/mpfr_real.hpp"

namespace reference {

/// The orbit of z² + c in MPFR's floating point, rounded to nearest, no enclosure.
class MpfrOrbit {
 public:
  /// The critical orbit.
  MpfrOrbit(const Complex& c, mpfr_prec_t bits);
  /// The orbit of `start`.
  MpfrOrbit(const Complex& c, const Complex& start, mpfr_prec_t bits);

  void step();
  const RealPair& z() const { return z_; }
  /// |z|²
  const Real& norm();

 private:
  RealPair c_, z_;
  Real x_squared_, y_squared_, norm_;
};

/// The first n in [1, limit] with |z_n(c)| > bailout by exact iteration, 0 when there is none: for limits up to a
/// dozen.
std::uint64_t exact_escape_index(const Complex& c, const mpq_class& bailout, std::uint64_t limit);

/// The first n in [1, limit] with |z_n(c)| > bailout, nothing when there is none. Two precisions (448 and 640 bits
/// beyond the digits of c, and twice as many until they agree) must give the same index, with no |z_n| nearer to the
/// bailout than a quarter of the digits can tell. Throws std::runtime_error where that cannot be reached: |z_n| =
/// bailout is a matter for exact iteration.
std::optional<std::uint64_t> escape_index(const Complex& c, const mpq_class& bailout, std::uint64_t limit);

}  // namespace reference
