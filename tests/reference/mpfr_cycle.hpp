#pragma once
#include <cstdint>
#include <optional>
#include <vector>

#include "reference/mpfr_real.hpp"

namespace reference {

/// A cycle of z² + c as MPFR finds it: right to about three quarters of the working precision, not enclosed.
struct Cycle {
  std::vector<Complex> points;  // in the order of the dynamics, as many as the least period
  Complex multiplier;
  bool attracting = false;  // |multiplier| < 1 at working precision

  std::uint64_t period() const { return points.size(); }
};

/// Follows z for `settle` returns of f^period, then Newton's method on f^period(z) - z at `bits` bits, then the least
/// period. Nothing when Newton's method does not settle.
std::optional<Cycle> find_cycle(const Complex& c, const Complex& z, std::uint64_t period, mpfr_prec_t bits = 1024,
                                std::uint64_t settle = 100);

}  // namespace reference
