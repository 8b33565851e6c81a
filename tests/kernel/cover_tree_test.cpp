// Trees of marked cells: what cover.hpp says of their bytes, by hand; and what goes in comes out, with a writer of the
// test's own.

#include "kernel/cover_tree.hpp"

#include <algorithm>

#include "catch.hpp"
#include "kernel/cover_trees.hpp"
#include "reference/point_source.hpp"

using merestone::CoverTree;
using merestone::read_cover_tree;
using merestone::TreeCell;
using reference::PointSource;

namespace {

std::string fault_of(const CoverTree& tree, std::uint32_t grade) {
  const auto read = read_cover_tree(tree, grade);
  return read ? "none" : read.failure().message;
}

}  // namespace

TEST_CASE("trees by hand") {
  CHECK(read_cover_tree({}, 3)->empty());
  CHECK(*read_cover_tree({1}, 0) == std::vector<TreeCell>{{0, 0, 0}});
  // the square and its upper left quarter
  CHECK(*read_cover_tree({3, 0x10}, 1) == std::vector<TreeCell>{{0, 0, 0}, {0, 1, 1}});
  // lower right quarter split; its four quarters: marked, not, not, marked
  CHECK(*read_cover_tree({2, 0x08, 0x41}, 2) == std::vector<TreeCell>{{2, 0, 2}, {3, 1, 2}});
  // two quarters split: bytes in the order of the cells
  CHECK(*read_cover_tree({2, 0x8a, 0x01, 0x04, 0x40}, 2) == std::vector<TreeCell>{{0, 0, 2}, {3, 0, 2}, {3, 3, 2}});
}

TEST_CASE("malformed trees are refused with the byte") {
  CHECK_THAT(fault_of({0}, 3), Catch::Matchers::StartsWith("byte 0 of the tree is 0"));
  CHECK_THAT(fault_of({4}, 3), Catch::Matchers::StartsWith("byte 0 of the tree has more than the code"));
  CHECK_THAT(fault_of({0x81}, 3), Catch::Matchers::StartsWith("byte 0 of the tree has more than the code"));
  CHECK_THAT(fault_of({2}, 3), Catch::Matchers::StartsWith("byte 1 of the tree is missing"));
  CHECK_THAT(fault_of({2, 0x0a, 1}, 3), Catch::Matchers::StartsWith("byte 3 of the tree is missing"));
  CHECK_THAT(fault_of({2, 0x0a, 1, 0}, 3), Catch::Matchers::StartsWith("byte 3 of the tree is 0"));
  CHECK_THAT(fault_of({1, 1}, 3), Catch::Matchers::StartsWith("byte 1 of the tree is surplus"));
  CHECK_THAT(fault_of({2, 0x04, 0x01}, 3), Catch::Matchers::StartsWith("byte 2 of the tree is surplus"));
  CHECK_THAT(fault_of({2}, 0), Catch::Matchers::StartsWith("byte 0 of the tree splits a fine cell, of depth 0"));
  CHECK_THAT(fault_of({2, 0x20, 1}, 1),
             Catch::Matchers::StartsWith("byte 1 of the tree splits a fine cell, of depth 1"));
  CHECK(read_cover_tree({2, 0x20, 1}, 2));
}

TEST_CASE("what is marked is read, and every shortened or lengthened tree is refused") {
  PointSource source(7101);
  for (std::uint64_t k = 0; k < reference::repeats(200); ++k) {
    const auto grade = static_cast<std::uint32_t>(source.between(0, 6));
    trees::Marks marked;
    for (std::uint64_t n = source.below(40); n > 0; --n) {
      const auto depth = static_cast<std::uint32_t>(source.below(grade + 1));
      marked.insert({depth, static_cast<std::uint32_t>(source.below(1u << depth)),
                     static_cast<std::uint32_t>(source.below(1u << depth))});
    }
    const CoverTree tree = trees::tree_of(marked, grade);
    const auto read = read_cover_tree(tree, grade);
    REQUIRE(read);
    REQUIRE(read->size() == marked.size());
    REQUIRE(merestone::marks_of(tree) == marked.size());
    for (const TreeCell& cell : *read) REQUIRE(marked.count({cell.depth, cell.column, cell.row}) == 1);
    REQUIRE(std::is_sorted(read->begin(), read->end(),
                           [](const TreeCell& a, const TreeCell& b) { return a.depth < b.depth; }));
    if (tree.empty()) continue;
    CoverTree shorter = tree, longer = tree;
    shorter.pop_back(), longer.push_back(1);
    if (!shorter.empty()) REQUIRE_FALSE(read_cover_tree(shorter, grade));
    REQUIRE_FALSE(read_cover_tree(longer, grade));
  }
}
