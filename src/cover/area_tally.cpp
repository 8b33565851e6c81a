#include "cover/area_tally.hpp"

#include <cmath>

namespace merestone {

AreaTally::AreaTally(const AreaCover& cover, const Trunk& trunk) : cover_(cover), all_blocks_(trunk.places.size()) {
  kept_.add(trunk.inside);
  inside_.add(trunk.inside);
}

void AreaTally::add(const CoverBlock& block) {
  const CoverSquare square = square_of(cover_.plan, block.column, block.row, block.grade);
  const std::int32_t cell = square.side_exponent - static_cast<std::int32_t>(square.grade);
  kept_.add(window_of(cover_, square).touching.cells() - block.outside_cells, cell);
  inside_.add(block.inside_cells, cell);
  ++blocks_;
}

double AreaTally::approx_at_most() const {
  const CoverSquare& root = cover_.plan.root;
  const double block = std::ldexp(1.0, 2 * (root.side_exponent - static_cast<int>(root.grade)));
  return factor() * (kept_.approx_total() + static_cast<double>(all_blocks_ - blocks_) * block);
}

}  // namespace merestone
