#pragma once
#include <cstdint>

#include "lanes/double_parameter.hpp"

namespace merestone {

/// Lemma I1 in tracked double precision: f_c^period maps the closed disc of the given radius about x + iy into its
/// interior, and the attracting cycle has exactly that period, for every c within c.error of the double.
/// True is a proof, false says nothing. Requires period >= 1 and radius >= 2^-200.
bool proves_attraction(const DoubleParameter& c, double x, double y, double radius, std::uint64_t period);

}  // namespace merestone
