#pragma once
#include <cstdint>
#include <vector>

#include "kernel/cover.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// One of the 2^depth x 2^depth equal parts of a square, counted from its lower left corner.
struct TreeCell {
  std::uint32_t column = 0, row = 0, depth = 0;
  friend bool operator==(const TreeCell&, const TreeCell&) = default;
};

/// The marked cells of a tree, in its order: by depth first. No byte at all is the tree that marks nothing.
/// On failure: the byte that is malformed, missing or surplus, counted from 0.
Result<std::vector<TreeCell>> read_cover_tree(const CoverTree& tree, std::uint32_t grade);

/// How many cells are marked if the tree is well formed.
std::uint64_t marks_of(const CoverTree& tree);

}  // namespace merestone
