#include "search/region_cells.hpp"

namespace merestone {

std::size_t RegionCells::cut(std::size_t cell) {
  const std::size_t first = cells_.size();
  cells_[cell].first_part = first;
  cells_.resize(first + 4);
  return first;
}

Rule RegionCells::rule(std::size_t cell) const {
  if (cells_[cell].by) return *cells_[cell].by;
  Quarters quarters;
  for (std::size_t i = 0; i < 4; ++i) quarters.rules.push_back(rule(cells_[cell].first_part + i));
  return quarters;
}

}  // namespace merestone
