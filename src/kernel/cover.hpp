#pragma once
#include <cmath>
#include <cstdint>
#include <vector>

#include "kernel/canvas.hpp"

namespace merestone {

/// The closed square from the corner x + iy to the right and upward, of side 2^side_exponent, cut into 2^grade x
/// 2^grade fine cells. A cell of depth d is one of its 2^d x 2^d equal parts, so a fine cell is a cell of depth
/// `grade`.
struct CoverSquare {
  double x = 0, y = 0;
  std::int32_t side_exponent = 0;
  std::uint32_t grade = 0;
};

/// Cells of a square that are marked, as a quadtree in level order. A code is 1 (marked) plus 2 (split into four
/// quarters). The first byte is the code of the square; then, for each split cell in the order in which the cells
/// themselves are named, a byte with the codes of its quarters, two bits each from the lowest: lower left, lower right,
/// upper left, upper right. No byte is 0, and every tree has exactly the bytes that it calls for: none at all when no
/// cell is marked.
using CoverTree = std::vector<std::uint8_t>;

/// How the parameters of a marked cell of an inside tree are shown to be inside.
struct CoverInside {
  std::uint32_t period = 0;         // 0: the whole cell by a closed form (Lemma I3), and the disc is not used
  double x = 0, y = 0, radius = 0;  // otherwise: an attracting disc at the cell's centre (Lemmas I1, I2)
};

/// The rules by which marked cells of an outside tree are shown to be outside.
enum class CoverRules : std::uint8_t {
  all,         // the exterior disc of the cell's centre (Lemmas E3, U1)
  elementary,  // the whole cell escapes (Lemmas E1, E2)
};

/// What is proved of a square: marks, and how many of its fine cells they leave.
struct CoverBlock {
  std::uint32_t column = 0, row = 0;  // where its square lies among the trunk's fine cells; 0 for the trunk
  std::uint32_t grade = 0;
  CoverTree outside, inside;
  std::vector<CoverInside> inside_by;  // one for each marked cell of `inside`, in order
  // Claimed: at least so many fine cells are outside, inside. Where the plan is of a box, only those count that touch
  // the box, or lie in it (CoverWindow).
  std::uint64_t outside_cells = 0, inside_cells = 0;

  friend bool operator==(const CoverBlock&, const CoverBlock&) = default;
};

inline bool operator==(const CoverInside& a, const CoverInside& b) {
  return a.period == b.period && a.x == b.x && a.y == b.y && a.radius == b.radius;
}

/// A square of the plane and how it is cut. The trunk is a block of its own, on the root with the root's grade: each of
/// its fine cells that it leaves undecided is the square of a further block.
struct CoverPlan {
  CoverSquare root;  // its grade is the trunk's
  CoverRules rules = CoverRules::all;
};

/// The square of one of the trunk's fine cells, cut to that grade.
inline CoverSquare square_of(const CoverPlan& plan, std::uint32_t column, std::uint32_t row, std::uint32_t grade) {
  const std::int32_t side_exponent = plan.root.side_exponent - static_cast<std::int32_t>(plan.root.grade);
  const double side = std::ldexp(1.0, side_exponent);
  return {plan.root.x + side * column, plan.root.y + side * row, side_exponent, grade};
}

}  // namespace merestone
