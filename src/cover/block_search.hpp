#pragma once
#include "cover/cover_effort.hpp"
#include "kernel/canvas.hpp"
#include "kernel/cover_window.hpp"

namespace merestone {

/// What a search found of a square: the marks, and the canvases that they paint.
struct BlockFindings {
  CoverBlock block;  // column and row are left 0
  Canvas outside, inside;
};

/// Marks cells of the square that touch the window, of the largest first: for each cell that no mark covers yet, what
/// its centre shows. A pure function of its arguments. Requires square.grade == effort.depth + effort.cut <=
/// Canvas::kLargestGrade, and that the middles of cells are doubles.
BlockFindings search_block(const CoverSquare& square, const CoverWindow& window, const CoverEffort& effort);

}  // namespace merestone
