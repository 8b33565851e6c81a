#pragma once
#include <cstdint>

namespace merestone {

/// A closed square of parameters about a centre that is a double exactly.
struct ParameterCell {
  double x = 0, y = 0, half_side = 0;
};

/// Lemmas E1, E2, E8: what was found of |z_n| over the cell.
struct CellEscape {
  bool is_proved = false;   // |z_index| > 2 for every parameter of the cell
  std::uint64_t index = 0;  // else where that came closest, 0 for nowhere
};
/// In double precision, for at most so many steps. Requires |x|, |y|, half_side <= 4.
CellEscape cell_escape(const ParameterCell& cell, std::uint64_t steps);

/// Lemmas I3, E8: every parameter of the cell satisfies strictly the inequality of period 1, or that of period 2. False
/// says nothing.
bool is_cell_in_closed_form(const ParameterCell& cell);

}  // namespace merestone
