#pragma once
#include <cstdint>
#include <optional>
#include <vector>

#include "search/catalogue/approx_nucleus.hpp"

namespace merestone {

/// How many nuclei of exact period n there are in the plane: sum over d | n of mu(n/d) 2^(d-1) (Lemma A2).
/// Requires 1 <= n <= 63.
std::uint64_t number_of_nuclei(std::uint32_t period);

/// Looks for all nuclei of exact period `period` on or above the real axis: each solution of z_n(c) = w is followed
/// from |w| > 2, where the solutions are known one by one, to w = 0. None may be missing: count them. None occurs
/// twice. Work is about 2^period. Requires 1 <= period <= 24.
std::vector<ApproxNucleus> approx_nuclei_of_period(std::uint32_t period);

}  // namespace merestone
