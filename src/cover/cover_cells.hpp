#pragma once
#include <cstdint>
#include <vector>

#include "kernel/cover.hpp"

namespace merestone {

/// A cell of some depth of a square: the place of the cell among all of its depth, in the order in which trees name
/// them (Morton order), and its column and row.
struct CoverCell {
  std::uint32_t order = 0, column = 0, row = 0;

  CoverCell quarter(std::uint32_t which) const {
    return {4 * order + which, 2 * column + (which & 1), 2 * row + (which >> 1)};
  }
};

/// A square with the numbers that its cells and fine cells need. All of them are exact.
class CoverGeometry {
 public:
  explicit CoverGeometry(const CoverSquare& square);

  double side(unsigned depth) const;
  /// The middle of a cell of this depth.
  double x(const CoverCell& cell, unsigned depth) const { return square_.x + side(depth) * (cell.column + 0.5); }
  double y(const CoverCell& cell, unsigned depth) const { return square_.y + side(depth) * (cell.row + 0.5); }

  std::uint32_t fine_side(unsigned depth) const { return std::uint32_t{1} << (square_.grade - depth); }
  /// A length of the plane, in fine cells.
  double in_fine_cells(double length) const { return length * fine_scale_; }
  double fine_x(double x) const { return in_fine_cells(x - square_.x); }
  double fine_y(double y) const { return in_fine_cells(y - square_.y); }

 private:
  CoverSquare square_;
  double fine_scale_;
};

/// For each depth, the orders of cells.
using MarkedCells = std::vector<std::vector<std::uint32_t>>;

/// The tree in which exactly these cells are marked, given in ascending order at each depth.
CoverTree tree_of(const MarkedCells& marked);

}  // namespace merestone
