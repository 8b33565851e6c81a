#pragma once
#include <cstdint>
#include <map>

#include "kernel/exact.hpp"

namespace merestone {

/// Adds up the areas of square cells of several sizes, exactly.
class CellArea {
 public:
  /// So many cells of side 2^side_exponent.
  void add(std::uint64_t cells, std::int32_t side_exponent) { cells_[side_exponent] += cells; }
  void add(const CellArea& other) {
    for (const auto& [side_exponent, cells] : other.cells_) cells_[side_exponent] += cells;
  }

  Dyadic total() const;
  double approx_total() const;

 private:
  std::map<std::int32_t, std::uint64_t> cells_;  // fewer than 2^64 of a size: more blocks than a run could ever do
};

}  // namespace merestone
