#include "kernel/cover_window.hpp"

#include <algorithm>

namespace merestone {

namespace {

// floor of a rational, held to [0, most]
std::uint32_t clamped_floor(const Rational& value, std::uint32_t most) {
  if (value.sign() <= 0) return 0;
  if (value >= Rational(static_cast<long>(most))) return most;
  Integer quotient;
  fmpz_fdiv_q(quotient, value.numerator(), value.denominator());
  return static_cast<std::uint32_t>(fmpz_get_ui(quotient));
}

std::uint32_t clamped_ceil(const Rational& value, std::uint32_t most) {
  const std::uint32_t below = clamped_floor(value, most);
  return below < most && value > Rational(static_cast<long>(below)) ? below + 1 : below;
}

struct Interval {
  std::uint32_t touching_first, touching_end, within_first, within_end;
};

Interval cells_between(const Rational& lo, const Rational& hi, double corner, const Dyadic& cell, std::uint32_t side) {
  const auto in_cells = [&](const Rational& end) { return (end - Dyadic(corner).to_rational()) / cell.to_rational(); };
  const Rational first = in_cells(lo), end = in_cells(hi);
  return {clamped_floor(first, side), clamped_ceil(end, side), clamped_ceil(first, side), clamped_floor(end, side)};
}

CellRange range_of(std::uint32_t first_column, std::uint32_t end_column, std::uint32_t first_row,
                   std::uint32_t end_row) {
  return {first_column, std::max(first_column, end_column), first_row, std::max(first_row, end_row)};
}

}  // namespace

CoverWindow whole_window(const CoverSquare& square) {
  const std::uint32_t side = std::uint32_t{1} << square.grade;
  const CellRange all{0, side, 0, side};
  return {all, all};
}

CoverWindow window_of(const CoverSquare& square, const RationalBox& box) {
  const std::uint32_t side = std::uint32_t{1} << square.grade;
  const Dyadic cell = Dyadic(1.0).shifted(square.side_exponent - static_cast<long>(square.grade));
  const Interval re = cells_between(box.lo.re, box.hi.re, square.x, cell, side);
  const Interval im = cells_between(box.lo.im, box.hi.im, square.y, cell, side);
  return {range_of(re.touching_first, re.touching_end, im.touching_first, im.touching_end),
          range_of(re.within_first, re.within_end, im.within_first, im.within_end)};
}

}  // namespace merestone
