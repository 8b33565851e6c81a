#pragma once
#include <functional>
#include <optional>
#include <vector>

#include "cover/area_request.hpp"
#include "cover/area_tally.hpp"
#include "cover/block_store.hpp"
#include "search/catalogue/catalogue.hpp"

namespace merestone {

/// How far a run has got; approximate.
struct AreaProgress {
  enum class Phase { components, trunk, blocks, done } phase = Phase::components;
  CatalogueProgress catalogue;
  std::size_t blocks = 0, all_blocks = 0;
  double at_least = 0, at_most = 0;
};

/// What a run proved.
struct AreaResult {
  AreaHeader header;  // the bounds, and of what
  Trunk trunk;        // its places are the blocks
  std::vector<Component> components;
  std::size_t resumed_blocks = 0;               // that were in the store already
  unsigned least_depth = 0, largest_depth = 0;  // of cells
};

struct AreaRunOptions {
  unsigned threads = 1;
  BlockStore* store = nullptr;                      // keeps finished blocks, and has those of an earlier run
  std::function<void(const AreaProgress&)> report;  // by several threads at once
  std::function<bool()> go_on;                      // asked often, by any thread; false ends the run
};

/// Bounds the area from both sides: components first (Lemma A2), then the cover (Lemma A1).
/// On failure: the store cannot be written, or the box cannot be cut so deep. Nothing in it: the run was ended; what
/// was finished is in the store.
Result<std::optional<AreaResult>> run_area(const AreaRequest& request, const AreaRunOptions& options);

}  // namespace merestone
