#include "kernel/marked_square.hpp"

#include <algorithm>
#include <bit>
#include <cmath>

namespace merestone {

namespace {

constexpr double kFarthestCorner = 4;
constexpr std::int32_t kLeastSide = -60, kLargestSide = 3;

// The largest power of two of which the number, not 0, is a multiple.
double lowest_bit(double number) {
  int exponent = 0;
  const auto mantissa = static_cast<std::int64_t>(std::ldexp(std::frexp(number, &exponent), 53));
  return std::ldexp(1.0, exponent - 53 + std::countr_zero(static_cast<std::uint64_t>(mantissa)));
}

// Is every number corner + k·unit, 0 <= k <= 2^(grade + 1), a double? All are multiples of one power of two.
bool is_on_grid(double corner, double side, double unit) {
  const double step = corner == 0 ? unit : std::min(unit, lowest_bit(corner));
  return std::abs(corner) + side <= 0x1p+53 * step;
}

}  // namespace

MarkedSquare::MarkedSquare(const CoverSquare& square)
    : square_(square), fine_cells_(std::ldexp(1.0, static_cast<int>(square.grade) - square.side_exponent)) {}

Result<MarkedSquare> MarkedSquare::of(const CoverSquare& square) {
  if (square.grade > Canvas::kLargestGrade)
    return Failure{"the square is cut to grade " + std::to_string(square.grade) + ", and the finest is " +
                   std::to_string(Canvas::kLargestGrade)};
  if (square.side_exponent < kLeastSide || square.side_exponent > kLargestSide)
    return Failure{"the side of the square is 2^" + std::to_string(square.side_exponent) + ", not from 2^-60 to 2^3"};
  if (!(std::abs(square.x) <= kFarthestCorner && std::abs(square.y) <= kFarthestCorner))
    return Failure{"the corner of the square is farther than 4 from an axis"};
  const double side = std::ldexp(1.0, square.side_exponent);
  const double unit = std::ldexp(side, -static_cast<int>(square.grade) - 1);
  if (!is_on_grid(square.x, side, unit) || !is_on_grid(square.y, side, unit))
    return Failure{"the centres of the square's fine cells are not all numbers in double precision"};
  return MarkedSquare(square);
}

ParameterCell MarkedSquare::cell(const TreeCell& at) const {
  const double half = std::ldexp(1.0, square_.side_exponent - static_cast<int>(at.depth) - 1);
  return {square_.x + (2.0 * at.column + 1) * half, square_.y + (2.0 * at.row + 1) * half, half};
}

void MarkedSquare::paint(Canvas& canvas, const TreeCell& centre, const OffsetDisc& disc) const {
  const double half = 0.5 * (std::uint32_t{1} << (square_.grade - centre.depth));
  const double x = (2.0 * centre.column + 1) * half, y = (2.0 * centre.row + 1) * half;
  const double dx = disc.x * fine_cells_, dy = disc.y * fine_cells_, radius = disc.radius * fine_cells_;
  const double farthest = 4.0 * canvas.side();  // for paint_disc
  if (std::abs(x + dx) <= farthest && std::abs(y + dy) <= farthest)
    canvas.paint_disc(x + dx, y + dy, radius);
  else
    canvas.paint_disc(x, y, radius * (1 - 0x1p-48) - std::sqrt(dx * dx + dy * dy));
}

void MarkedSquare::paint_cell(Canvas& canvas, const TreeCell& cell) const {
  const std::uint32_t size = std::uint32_t{1} << (square_.grade - cell.depth);
  canvas.paint_square(cell.column * size, cell.row * size, size);
}

}  // namespace merestone
