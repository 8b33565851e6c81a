#pragma once
#include <cstddef>
#include <optional>
#include <vector>

#include "kernel/claim.hpp"

namespace merestone {

/// A box cut into quarters again and again, and the rules that settle its parts.
class RegionCells {
 public:
  static constexpr std::size_t kWhole = 0;

  RegionCells() : cells_(1) {}

  void settle(std::size_t cell, Rule by) { cells_[cell].by = std::move(by); }
  /// The first of four new cells, in the order of quarters_of.
  std::size_t cut(std::size_t cell);
  std::size_t count() const { return cells_.size(); }

  /// The rule that settles the cell: its own, or Quarters of those of its parts. Requires that all parts are settled.
  Rule rule(std::size_t cell = kWhole) const;

 private:
  struct Cell {
    std::optional<Rule> by;
    std::size_t first_part = 0;
  };
  std::vector<Cell> cells_;
};

}  // namespace merestone
