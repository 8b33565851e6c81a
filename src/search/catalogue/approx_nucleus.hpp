#pragma once
#include <cstdint>
#include <optional>
#include <vector>

#include "search/plain_complex.hpp"

namespace merestone {

/// A nucleus as double precision sees it.
struct ApproxNucleus {
  std::uint32_t period = 0;
  PlainComplex at;  // at.y >= 0, and 0 if it appears to be real
  double size = 0;  // the conformal radius of its component there
};

/// z_n(c) and its derivative with respect to c.
struct PlainJet {
  PlainComplex z, slope;
};

/// From n to n + 1.
inline PlainJet next(const PlainJet& at, PlainComplex c) {
  const PlainComplex turned = 2.0 * (at.z * at.slope);
  return {at.z * at.z + c, {turned.x + 1, turned.y}};
}

/// Newton's method for a nucleus whose period divides `period`, or for its mirror image if that is in the lower half
/// plane; with its least period as far as double precision tells. Nothing when it does not settle quickly within the
/// distance `reach` of the start.
std::optional<ApproxNucleus> approx_nucleus(std::uint32_t period, PlainComplex start, double reach);

/// Is it one of these, as far as double precision tells? Requires that they are in canonical order.
bool is_one_of(const ApproxNucleus& nucleus, const std::vector<ApproxNucleus>& nuclei);

/// Brings nuclei into canonical order, by (x, y), and drops those that double precision does not tell from one before.
void keep_one_of_each(std::vector<ApproxNucleus>& nuclei);

}  // namespace merestone
