#include "search/approx_escape.hpp"

namespace merestone {

namespace {

constexpr int kColumns = 5;  // and rows

// The index of the escape; more than `most` when there is none up to there.
std::uint64_t approx_index(double c_x, double c_y, std::uint64_t most) {
  double x = 0, y = 0;
  for (std::uint64_t n = 1; n <= most; ++n) {
    const double x_next = x * x - y * y + c_x;
    y = 2 * x * y + c_y;
    x = x_next;
    if (!(x * x + y * y <= 4)) return n;
  }
  return most + 1;
}

}  // namespace

std::optional<ApproxEscape> approx_escape(const DoubleBox& box, std::uint64_t iterations) {
  ApproxEscape best{0, 0, iterations + 1};
  for (int row = 0; row < kColumns; ++row)
    for (int column = 0; column < kColumns; ++column) {
      const double across = (2 * column + 1.0) / kColumns - 1, up = (2 * row + 1.0) / kColumns - 1;
      const double x = box.x + across * box.half_width, y = box.y + up * box.half_height;
      const std::uint64_t index = approx_index(x, y, best.index - 1);
      if (index < best.index) best = {x, y, index};
    }
  if (best.index > iterations) return std::nullopt;
  return best;
}

}  // namespace merestone
