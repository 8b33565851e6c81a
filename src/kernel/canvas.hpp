#pragma once
#include <cstdint>
#include <vector>

namespace merestone {

/// The fine cells with first_column <= column < end_column and first_row <= row < end_row; none where an end is not
/// above.
struct CellRange {
  std::uint32_t first_column = 0, end_column = 0, first_row = 0, end_row = 0;

  std::uint64_t cells() const { return std::uint64_t{end_column - first_column} * (end_row - first_row); }
  /// Whether the range has a cell of the square of size x size cells from (column, row).
  bool meets(std::uint32_t column, std::uint32_t row, std::uint32_t size) const {
    return column < end_column && column + size > first_column && row < end_row && row + size > first_row;
  }
};

/// A square of 2^grade x 2^grade fine cells, each painted or not. Coordinates are in fine cells, from the lower left
/// corner; cell (column, row) is the closed square [column, column + 1] x [row, row + 1].
class Canvas {
 public:
  static constexpr unsigned kLargestGrade = 13;

  /// Nothing painted. Requires grade <= kLargestGrade.
  explicit Canvas(unsigned grade);

  unsigned grade() const { return grade_; }
  std::uint32_t side() const { return std::uint32_t{1} << grade_; }
  std::uint64_t cells() const { return std::uint64_t{1} << (2 * grade_); }

  /// Paints cells that lie in the closed disc about x + iy, and none that does not (Lemma N2); whether any of them is
  /// new. Nothing for a radius below 2^-20, numbers that are none, and a centre more than 4 sides away.
  bool paint_disc(double x, double y, double radius);

  /// Paints the square of size x size cells from (column, row); whether any of them is new. Requires that it lies in
  /// the canvas.
  bool paint_square(std::uint32_t column, std::uint32_t row, std::uint32_t size);

  bool is_painted(std::uint32_t column, std::uint32_t row) const;
  std::uint64_t painted() const;
  /// How many cells of the range are painted. Requires that it lies in the canvas, and that its ends are not below its
  /// firsts.
  std::uint64_t painted_in(const CellRange& range) const;
  /// Whether every cell of a square is painted here or on the other canvas, which has the same grade. Requires that the
  /// square lies in the canvas, and that `column` is a multiple of `size`, a power of two.
  bool is_full_with(const Canvas& other, std::uint32_t column, std::uint32_t row, std::uint32_t size) const;
  /// Whether a cell is painted here and on the other canvas, which has the same grade.
  bool overlaps(const Canvas& other) const;

 private:
  std::uint64_t* row_words(std::uint32_t row) { return words_.data() + std::size_t{row} * stride_; }
  const std::uint64_t* row_words(std::uint32_t row) const { return words_.data() + std::size_t{row} * stride_; }
  bool paint_run(std::uint32_t row, std::uint32_t first, std::uint32_t end);

  unsigned grade_;
  std::size_t stride_;  // words of a row, with a pad against cache conflicts
  std::vector<std::uint64_t> words_;
};

}  // namespace merestone
