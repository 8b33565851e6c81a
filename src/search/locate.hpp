#pragma once
#include <cstdint>
#include <functional>
#include <vector>

#include "search/isolate_roots.hpp"

namespace merestone {

struct LocateOptions {
  bool nuclei = true, misiurewicz = true;
  std::uint64_t most = 10;            // no further period is begun when so many of a kind have been found
  std::uint64_t max_period = 20'000;  // of nuclei; for Misiurewicz points preperiod + period
  IsolationLimits isolation;
  double seconds = 60;
};

/// The roots of one type in the region.
struct LocatedType {
  Statement type;
  IsolatedRoots roots;
};

/// Up to which period the list is exhaustive, apart from types that say otherwise.
struct LocatedExtent {
  std::uint64_t nuclei = 0;       // period
  std::uint64_t misiurewicz = 2;  // preperiod + period, which is 3 at least
};

/// Finds the nuclei and Misiurewicz points that the region contains, in the order of the period, and of preperiod plus
/// period. `take` is given each type that has roots in the region, or may have as far as is proved, and says whether to go
/// on. In a small region, whose first roots have long periods, those beyond the extent that is returned are found by
/// Newton's method alone.
LocatedExtent locate(const Shape& region, const LocateOptions& options,
                     const std::function<bool(const LocatedType&)>& take);

}  // namespace merestone
