#pragma once
#include "kernel/claim.hpp"

namespace merestone {

/// How what was typed lies to the region of an established claim.
enum class RequestRelation { same_point, same_region, point_in_region, part_of_region, around_region };

/// Decided exactly (Lemma N1). Requires that the claim has a request and was established: the kernel has found that the
/// region contains the request or, where something is said to be in the region, the request the region.
RequestRelation relation_of_request(const Claim& claim);

}  // namespace merestone
