#pragma once
#include <cstdint>

#include "kernel/canvas.hpp"
#include "kernel/cover.hpp"
#include "kernel/region.hpp"

namespace merestone {

/// The closed box of the c with lo.re <= Re c <= hi.re and lo.im <= Im c <= hi.im; lo < hi in both parts.
struct RationalBox {
  ComplexRational lo, hi;
  friend bool operator==(const RationalBox&, const RationalBox&) = default;
};

/// Which fine cells of a square belong to a box that is cut out of the plane.
struct CoverWindow {
  CellRange touching;  // together these cover what the box has of the square
  CellRange within;    // these lie in the box
};

/// All cells of the square.
CoverWindow whole_window(const CoverSquare& square);
/// The cells that meet the box in more than a line, and those that lie in it; decided exactly.
CoverWindow window_of(const CoverSquare& square, const RationalBox& box);

}  // namespace merestone
