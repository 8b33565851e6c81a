#pragma once
#include <vector>

#include "search/catalogue/approx_component.hpp"

namespace merestone {

/// The nuclei of the satellites of a component, of at least a size and at most a period: at the internal angle r/q,
/// where the multiplier is exp(2 pi i r/q), sits one of q times the period, whose size is about |f'| / q^2 there; f is
/// the component's map. Newton's method starts where f is at (1 + 1/q^2) exp(2 pi i r/q). Those below the real axis are
/// left out.
std::vector<ApproxNucleus> approx_satellites(const ApproxComponent& parent, double least_size,
                                             std::uint32_t max_period);

}  // namespace merestone
