#pragma once
#include <algorithm>
#include <complex>
#include <vector>

#include "reference/mpfr_cycle.hpp"
#include "reference/mpfr_orbit.hpp"
#include "reference/point_source.hpp"

/// Parameters with an attracting cycle, found in double precision and confirmed by MPFR.
namespace stable {

using reference::Complex;

struct StableParameter {
  Complex c;
  std::uint64_t period;
  Complex centre;  // a dyadic within 2^-100 of a point of the cycle
};

/// The least p up to 96 with which a long orbit repeats, as far as double precision can tell; 0 for none.
inline std::uint64_t approx_period(std::complex<double> c) {
  std::complex<double> z = 0;
  for (int n = 0; n < 20000; ++n) {
    z = z * z + c;
    if (!(std::norm(z) < 16)) return 0;
  }
  const std::complex<double> anchor = z;
  for (std::uint64_t p = 1; p <= 96; ++p) {
    z = z * z + c;
    if (std::abs(z - anchor) < 1e-9) return p;
  }
  return 0;
}

inline std::vector<StableParameter> stable_parameters(reference::PointSource& source, std::uint64_t how_many) {
  std::vector<StableParameter> found;
  while (found.size() < how_many) {
    const Complex c = source.one_in(2) ? source.biased() : source.in_window(40);
    const std::uint64_t period = approx_period({c.re.get_d(), c.im.get_d()});
    // periods 1 and 2 fill most of M: keep a few of them only
    if (period == 0 || (period <= 2 && !source.one_in(8))) continue;
    const auto cycle = reference::find_cycle(c, {0, 0}, period, 1024, 1000);
    if (!cycle || !cycle->attracting) continue;
    found.push_back({c, cycle->period(), reference::truncated(cycle->points[source.below(cycle->period())], 100)});
  }
  return found;
}

}  // namespace stable
