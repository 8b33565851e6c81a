#include "cover/cover_cells.hpp"

#include <algorithm>
#include <cmath>

namespace merestone {

namespace {

constexpr unsigned kMarked = 1, kSplit = 2;

// The cells of each depth that are marked or have marked cells within; ascending.
MarkedCells needed_cells(const MarkedCells& marked) {
  MarkedCells needed = marked;
  for (std::size_t d = needed.size(); d-- > 1;) {
    std::vector<std::uint32_t> parents;
    for (const std::uint32_t order : needed[d])
      if (parents.empty() || parents.back() != order / 4) parents.push_back(order / 4);
    std::vector<std::uint32_t> both;
    std::set_union(parents.begin(), parents.end(), needed[d - 1].begin(), needed[d - 1].end(),
                   std::back_inserter(both));
    needed[d - 1] = std::move(both);
  }
  return needed;
}

// Walks along ascending orders.
class Cursor {
 public:
  explicit Cursor(const std::vector<std::uint32_t>& orders) : at_(orders.begin()), end_(orders.end()) {}

  /// Whether the order is among them. Calls must ascend.
  bool has(std::uint32_t order) {
    at_ = std::find_if(at_, end_, [order](std::uint32_t other) { return other >= order; });
    return at_ != end_ && *at_ == order;
  }

 private:
  std::vector<std::uint32_t>::const_iterator at_, end_;
};

}  // namespace

CoverGeometry::CoverGeometry(const CoverSquare& square)
    : square_(square), fine_scale_(std::ldexp(1.0, static_cast<int>(square.grade) - square.side_exponent)) {}

double CoverGeometry::side(unsigned depth) const {
  return std::ldexp(1.0, square_.side_exponent - static_cast<int>(depth));
}

CoverTree tree_of(const MarkedCells& marked) {
  static const std::vector<std::uint32_t> kNone;
  const MarkedCells needed = needed_cells(marked);
  const auto at_depth = [](const auto& lists, std::size_t d) -> const std::vector<std::uint32_t>& {
    return d < lists.size() ? lists[d] : kNone;
  };
  const bool root_split = !at_depth(needed, 1).empty(), root_marked = !at_depth(marked, 0).empty();
  CoverTree tree;
  if (!root_split && !root_marked) return tree;
  tree.push_back(static_cast<std::uint8_t>(root_marked * kMarked + root_split * kSplit));
  for (std::size_t d = 1; d < needed.size(); ++d) {
    Cursor marks(marked[d]), inner(at_depth(needed, d + 1));
    for (std::size_t k = 0; k < needed[d].size();) {
      const std::uint32_t parent = needed[d][k] / 4;
      unsigned byte = 0;
      for (; k < needed[d].size() && needed[d][k] / 4 == parent; ++k) {
        const std::uint32_t order = needed[d][k];
        bool is_split = false;
        for (std::uint32_t q = 0; q < 4; ++q) is_split |= inner.has(4 * order + q);
        byte |= (marks.has(order) * kMarked + is_split * kSplit) << (2 * (order % 4));
      }
      tree.push_back(static_cast<std::uint8_t>(byte));
    }
  }
  return tree;
}

}  // namespace merestone
