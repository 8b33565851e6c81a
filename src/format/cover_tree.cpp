#include "format/cover_tree.hpp"

#include <bit>
#include <cstddef>
#include <string>

namespace merestone {

namespace {

constexpr unsigned kMarks = 0x55, kSplits = 0xaa;  // of four codes

std::uint64_t count_bits(unsigned bits) { return static_cast<std::uint64_t>(std::popcount(bits)); }

}  // namespace

Result<std::uint64_t> marked_cells(const CoverTree& tree, std::uint32_t grade) {
  if (tree.empty()) return std::uint64_t{0};
  if (tree[0] < 1 || tree[0] > 3) return Failure{"its first byte is " + std::to_string(tree[0]) + ", not 1, 2 or 3"};
  std::uint64_t marks = tree[0] & 1U, splits = tree[0] >> 1;
  std::size_t at = 1;
  for (std::uint32_t depth = 0; splits > 0; ++depth) {
    if (depth == grade) return Failure{"it splits a cell of depth " + std::to_string(grade) + ", which is a fine cell"};
    if (tree.size() - at < splits) return Failure{"it ends before all cells of depth " + std::to_string(depth + 1)};
    std::uint64_t deeper = 0;
    for (const std::size_t end = at + splits; at < end; ++at) {
      if (tree[at] == 0)
        return Failure{"its byte " + std::to_string(at) + " is 0: a split cell of which nothing is marked"};
      marks += count_bits(tree[at] & kMarks);
      deeper += count_bits(tree[at] & kSplits);
    }
    splits = deeper;
  }
  if (at != tree.size()) return Failure{std::to_string(tree.size() - at) + " bytes follow its last cell"};
  return marks;
}

}  // namespace merestone
