#include "kernel/cell_area.hpp"

#include <cmath>

namespace merestone {

Dyadic CellArea::total() const {
  Dyadic sum;
  for (const auto& [side_exponent, cells] : cells_) {
    Arf count;  // in halves, since an unsigned integer of the library has 32 bits on some machines
    arf_set_ui(count, static_cast<std::uint32_t>(cells >> 32));
    arf_mul_2exp_si(count, count, 32);
    arf_add_ui(count, count, static_cast<std::uint32_t>(cells), ARF_PREC_EXACT, ARF_RND_DOWN);
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
