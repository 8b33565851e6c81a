#pragma once
#include "kernel/cell_rules.hpp"
#include "kernel/cover.hpp"
#include "kernel/cover_tree.hpp"
#include "kernel/offset_disc.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// A square whose cells' centres, to the last fine cell, are doubles; all of its numbers are exact.
class MarkedSquare {
 public:
  /// On failure: the corner, the side or the grade is out of range, or the centre of a fine cell is no double.
  static Result<MarkedSquare> of(const CoverSquare& square);

  ParameterCell cell(const TreeCell& at) const;
  /// Paints fine cells that lie in the disc about the centre of the cell (Lemma N2): of a disc too far to be painted,
  /// those in the widest about the cell's centre itself.
  void paint(Canvas& canvas, const TreeCell& centre, const OffsetDisc& disc) const;
  void paint_cell(Canvas& canvas, const TreeCell& cell) const;

 private:
  explicit MarkedSquare(const CoverSquare& square);

  CoverSquare square_;
  double fine_cells_;  // in a unit of length
};

}  // namespace merestone
