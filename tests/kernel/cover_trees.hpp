#pragma once
#include <algorithm>
#include <set>
#include <tuple>

#include "kernel/cover_tree.hpp"

/// Trees of a cover, written from the text of cover.hpp alone.
namespace trees {

using merestone::CoverTree;
using merestone::TreeCell;

using Key = std::tuple<std::uint32_t, std::uint32_t, std::uint32_t>;  // depth, column, row
using Marks = std::set<Key>;

/// The tree in level order, cell by cell from the text of cover.hpp.
inline CoverTree tree_of(const Marks& marked, std::uint32_t grade) {
  const auto has_within = [&](const TreeCell& cell) {
    return std::any_of(marked.begin(), marked.end(), [&](const Key& key) {
      const auto& [depth, column, row] = key;
      return depth > cell.depth && column >> (depth - cell.depth) == cell.column &&
             row >> (depth - cell.depth) == cell.row;
    });
  };
  const auto code = [&](const TreeCell& cell) {
    return static_cast<unsigned>(marked.count({cell.depth, cell.column, cell.row})) + (has_within(cell) ? 2u : 0u);
  };
  CoverTree tree;
  if (marked.empty()) return tree;
  tree.push_back(static_cast<std::uint8_t>(code({0, 0, 0})));
  std::vector<TreeCell> level = {{0, 0, 0}};
  for (std::uint32_t depth = 0; depth < grade; ++depth) {
    std::vector<TreeCell> next;
    for (const TreeCell& cell : level) {
      if (!has_within(cell)) continue;
      unsigned byte = 0;
      for (unsigned q = 0; q < 4; ++q) {
        const TreeCell quarter{2 * cell.column + q % 2, 2 * cell.row + q / 2, depth + 1};
        byte |= code(quarter) << (2 * q);
        next.push_back(quarter);
      }
      tree.push_back(static_cast<std::uint8_t>(byte));
    }
    level = next;
  }
  return tree;
}

}  // namespace trees
