#include "kernel/cell_rules.hpp"

#include <cmath>

#include "kernel/near_complex.hpp"

namespace merestone {

namespace {

constexpr double u = detail::kNearUnit, kInflation = detail::kNearInflation, kGuard = detail::kNearGuard;

// z_n(c) lies within R of z + d (c - c0) for every c within r of c0; z and d as rounded (Lemma E8, cells)
struct CellModel {
  NearComplex z, d;
  double R = 0;

  void step(double x, double y, double r) {
    const double p = z.modulus_upper(), q = d.modulus_upper(), spread = q * r + R;
    const NearComplex next_z{z.x * z.x - z.y * z.y + x, 2 * z.x * z.y + y, 0};
    const NearComplex next_d{2 * (z.x * d.x - z.y * d.y) + 1, 2 * (z.x * d.y + z.y * d.x), 0};
    const double rounding = u * (2 * p * p + next_z.modulus_upper()) + r * (u * (4.5 * p * q + next_d.modulus_upper()));
    R = (2 * p * R + spread * spread + rounding) * kInflation + kGuard;
    z = next_z, d = next_d;
  }
  double reach(double r) const { return (d.modulus_upper() * r + R) * kInflation; }
};

// q (q + v) < y²/4 over the cell, v = x - 1/4: at the centre, with the largest slope there and the largest curvature
bool is_cell_in_cardioid(const ParameterCell& cell) {
  const double h = cell.half_side, v = cell.x - 0.25, y = cell.y;
  if (!(std::abs(v) + h <= 1 && std::abs(y) + h <= 0.75)) return false;
  const double q = v * v + y * y, yy = 0.25 * (y * y);
  const double value = q * (q + v) - yy, rounding = 0x1p-46 * (q * (q + std::abs(v)) + yy) + 0x1p-1000;
  const double slope_x = std::abs(2 * v * (2 * q + v) + q), slope_y = std::abs(2 * y * (2 * q + v) - 0.5 * y);
  return value + rounding + h * (slope_x + slope_y + 0x1p-40) + 27 * (h * h) < 0;
}

bool is_cell_in_period_two_disc(const ParameterCell& cell) {
  const double x = std::abs(cell.x + 1) + cell.half_side, y = std::abs(cell.y) + cell.half_side;
  return (x * x + y * y) * (1 + 0x1p-48) < 0.0625;
}

}  // namespace

CellEscape cell_escape(const ParameterCell& cell, std::uint64_t steps) {
  const double r = cell.half_side * 0x1.6a09e667f3bcep+0;  // above sqrt(2)
  CellModel model;
  CellEscape found;
  double closest = 0;
  for (std::uint64_t n = 1; n <= steps; ++n) {
    model.step(cell.x, cell.y, r);
    const double least = (model.z.modulus_lower() - model.reach(r)) * (1 - 0x1p-48);
    if (least > 2) return {true, n};
    if (least > closest) closest = least, found.index = n;
    if (!(model.R <= 2)) break;
  }
  return found;
}

bool is_cell_in_closed_form(const ParameterCell& cell) {
  return is_cell_in_cardioid(cell) || is_cell_in_period_two_disc(cell);
}

}  // namespace merestone
