#include "kernel/cover_tree.hpp"

#include <bit>
#include <string>

namespace merestone {

namespace {

constexpr unsigned kMarked = 1, kSplit = 2;

Failure malformed(std::size_t byte, const std::string& why) {
  return Failure{"byte " + std::to_string(byte) + " of the tree " + why};
}

class TreeReader {
 public:
  TreeReader(const CoverTree& tree, std::uint32_t grade) : tree_(tree), grade_(grade) {}

  Result<std::vector<TreeCell>> read() {
    if (tree_.empty()) return std::move(marked_);
    if (tree_[0] > (kMarked | kSplit)) return malformed(0, "has more than the code of the square");
    if (tree_[0] == 0) return malformed(0, "is 0, and marks and splits nothing");
    if (!take({}, tree_[0])) return too_deep();
    while (!split_.empty()) {
      std::vector<TreeCell> level;
      level.swap(split_);
      for (const TreeCell& cell : level) {
        if (++at_ == tree_.size())
          return malformed(at_, "is missing: a cell of depth " + std::to_string(cell.depth) + " is split");
        if (tree_[at_] == 0) return malformed(at_, "is 0, and marks and splits nothing");
        if (!take_quarters(cell, tree_[at_])) return too_deep();
      }
    }
    if (at_ + 1 != tree_.size()) return malformed(at_ + 1, "is surplus: no further cell is split");
    return std::move(marked_);
  }

 private:
  bool take(const TreeCell& cell, unsigned code) {
    if ((code & kMarked) != 0) marked_.push_back(cell);
    if ((code & kSplit) == 0) return true;
    split_.push_back(cell);
    return cell.depth < grade_;
  }

  bool take_quarters(const TreeCell& cell, unsigned byte) {
    for (unsigned quarter = 0; quarter < 4; ++quarter)
      if (!take({2 * cell.column + (quarter & 1), 2 * cell.row + (quarter >> 1), cell.depth + 1},
                byte >> (2 * quarter) & 3))
        return false;
    return true;
  }

  Failure too_deep() const { return malformed(at_, "splits a fine cell, of depth " + std::to_string(grade_)); }

  const CoverTree& tree_;
  std::uint32_t grade_;
  std::size_t at_ = 0;
  std::vector<TreeCell> marked_, split_;
};

}  // namespace

Result<std::vector<TreeCell>> read_cover_tree(const CoverTree& tree, std::uint32_t grade) {
  return TreeReader(tree, grade).read();
}

std::uint64_t marks_of(const CoverTree& tree) {
  std::uint64_t marks = 0;
  for (const std::uint8_t byte : tree)
    marks += static_cast<std::uint64_t>(std::popcount(static_cast<unsigned>(byte) & 0x55u));
  return marks;
}

}  // namespace merestone
