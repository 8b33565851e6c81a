// Trees of marked cells: the kernel reads back what was marked, and a writer that follows the text of cover.hpp alone
// gives the same bytes. Middles of cells against GMP (computed).

#include "cover/cover_cells.hpp"

#include <cmath>
#include <set>

#include "catch.hpp"
#include "kernel/cover_tree.hpp"
#include "kernel/cover_trees.hpp"
#include "reference/exact_complex.hpp"
#include "reference/point_source.hpp"

using namespace merestone;
using reference::PointSource;

namespace {

// Column and row have every second bit of the order, the column the lowest.
TreeCell cell_of(std::uint32_t depth, std::uint32_t order) {
  TreeCell cell{0, 0, depth};
  for (std::uint32_t k = 0; k < depth; ++k) {
    cell.column |= (order >> (2 * k) & 1) << k;
    cell.row |= (order >> (2 * k + 1) & 1) << k;
  }
  return cell;
}

// Each depth with its orders, ascending.
std::vector<TreeCell> cells_of(const MarkedCells& marked) {
  std::vector<TreeCell> cells;
  for (std::size_t depth = 0; depth < marked.size(); ++depth)
    for (const std::uint32_t order : marked[depth]) cells.push_back(cell_of(static_cast<std::uint32_t>(depth), order));
  return cells;
}

MarkedCells any_marks(PointSource& source) {
  MarkedCells marked(source.below(8));
  for (std::size_t depth = 0; depth < marked.size(); ++depth) {
    std::set<std::uint32_t> orders;
    const std::uint64_t count = source.one_in(3) ? 0 : source.below(source.one_in(4) ? 300 : 6);
    for (std::uint64_t n = 0; n < count; ++n)
      orders.insert(static_cast<std::uint32_t>(source.below(1u << (2 * depth))));
    marked[depth].assign(orders.begin(), orders.end());
  }
  return marked;
}

CoverTree tree_by_the_text(const MarkedCells& marked, std::uint32_t grade) {
  trees::Marks marks;
  for (const TreeCell& cell : cells_of(marked)) marks.insert({cell.depth, cell.column, cell.row});
  return trees::tree_of(marks, grade);
}

}  // namespace

TEST_CASE("the kernel reads the cells that were marked, in their order") {
  PointSource source(9301);
  std::uint64_t marks = 0;
  for (std::uint64_t k = 0; k < reference::repeats(1'500); ++k) {
    const MarkedCells marked = any_marks(source);
    const CoverTree tree = tree_of(marked);
    const auto read = read_cover_tree(tree, 9);
    REQUIRE(read);
    REQUIRE(*read == cells_of(marked));
    REQUIRE(tree.empty() == read->empty());
    if (k % 5 == 0) REQUIRE(tree == tree_by_the_text(marked, 9));
    marks += read->size();
  }
  CHECK(marks > reference::repeats(1'500) * 5);
}

TEST_CASE("trees by hand: nothing, the square alone, the deepest cell alone, all cells") {
  CHECK(tree_of({}).empty());
  CHECK(tree_of({{}}).empty());
  CHECK(tree_of({{}, {}, {}}).empty());
  CHECK(tree_of({{0}}) == CoverTree{1});
  CHECK(tree_of({{0}, {}, {}}) == CoverTree{1});
  CHECK(tree_of({{0}, {2}}) == CoverTree{3, 0x10});
  CHECK(tree_of({{}, {}, {4, 7}}) == CoverTree{2, 0x08, 0x41});
  CHECK(tree_of({{}, {}, {15}}) == CoverTree{2, 0x80, 0x40});
  CHECK(tree_of({{}, {0, 1, 2, 3}}) == CoverTree{2, 0x55});
}

TEST_CASE("quarters have the places and orders that trees name them by") {
  CoverCell cell;
  PointSource source(9302);
  for (std::uint32_t depth = 1; depth <= 16; ++depth) {
    cell = cell.quarter(static_cast<std::uint32_t>(source.below(4)));
    CHECK(cell_of(depth, cell.order) == TreeCell{cell.column, cell.row, depth});
  }
}

TEST_CASE("middles of cells and lengths in fine cells are exact") {
  PointSource source(9303);
  for (std::uint64_t k = 0; k < reference::repeats(500); ++k) {
    const auto side = static_cast<std::int32_t>(source.between(-30, 3));
    const auto grade = static_cast<std::uint32_t>(source.between(0, 13));
    const double unit = std::ldexp(1.0, side), x = unit * static_cast<double>(source.between(-50, 50)) / 16,
                 y = unit * static_cast<double>(source.between(-50, 50)) / 16;
    const CoverGeometry geometry({x, y, side, grade});
    const auto depth = static_cast<std::uint32_t>(source.below(grade + 1));
    const CoverCell cell{0, static_cast<std::uint32_t>(source.below(1u << depth)),
                         static_cast<std::uint32_t>(source.below(1u << depth))};
    const mpq_class half = reference::power_of_two(side - static_cast<long>(depth) - 1),
                    fine = reference::power_of_two(side - static_cast<long>(grade));
    REQUIRE(mpq_class(geometry.x(cell, depth)) == mpq_class(x) + (2 * cell.column + 1) * half);
    REQUIRE(mpq_class(geometry.y(cell, depth)) == mpq_class(y) + (2 * cell.row + 1) * half);
    REQUIRE(mpq_class(geometry.side(depth)) == 2 * half);
    REQUIRE(mpq_class(geometry.fine_side(depth)) * fine == 2 * half);
    REQUIRE(mpq_class(geometry.fine_x(geometry.x(cell, depth))) * fine == (2 * cell.column + 1) * half);
    REQUIRE(mpq_class(geometry.fine_y(geometry.y(cell, depth))) * fine == (2 * cell.row + 1) * half);
  }
}
