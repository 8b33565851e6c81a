#pragma once
#include "kernel/shape.hpp"
#include "search/region_bounds.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// A verdict about a typed region, and the dyadic region that the proof is about: one that contains the typed region, or,
/// for a proof that it straddles the boundary of M, one that lies in it.
struct RegionVerdict {
  Verdict verdict;
  Region region;
};

/// Decides whether the typed region, which has an interior, lies outside M, inside, or straddles its boundary.
/// Every proof has been found in tracked double precision or in disc enclosures, and can be established by the kernel.
RegionVerdict decide_region(const Shape& typed, const DecideOptions& options);

}  // namespace merestone
