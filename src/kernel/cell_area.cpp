#include "kernel/cell_area.hpp"

#include <cmath>

namespace merestone {

Dyadic CellArea::total() const {
  Dyadic sum;
  for (const auto& [side_exponent, cells] : cells_) {
    Arf count;
    arf_set_ui(count, cells);
    sum = sum + Dyadic(count).shifted(2L * side_exponent);
  }
  return sum;
}

double CellArea::approx_total() const {
  double sum = 0;
  for (const auto& [side_exponent, cells] : cells_) sum += std::ldexp(static_cast<double>(cells), 2 * side_exponent);
  return sum;
}

}  // namespace merestone
