#include "format/cover_payload.hpp"

#include <optional>

#include "format/container_layout.hpp"
#include "format/cover_tree.hpp"
#include "format/shown.hpp"

namespace merestone {

namespace {

constexpr std::size_t kShortestInside = 4;

Failure ends_early() { return {"the payload ends too early"}; }

void put_tree(std::string& out, const CoverTree& tree) {
  put_integer(out, tree.size(), 4);
  out.append(tree.begin(), tree.end());
}

CoverTree take_tree(ByteCursor& bytes) {
  const std::string_view tree = bytes.bytes(bytes.u32());
  return {tree.begin(), tree.end()};
}

Result<std::uint64_t> marks_of(const char* name, const CoverTree& tree, std::uint32_t grade) {
  Result<std::uint64_t> marks = marked_cells(tree, grade);
  if (!marks) return Failure{"the " + std::string(name) + " tree: " + marks.failure().message};
  return marks;
}

void put_inside(std::string& out, const CoverInside& inside) {
  put_integer(out, inside.period, 4);
  if (inside.period == 0) return;
  for (const double x : {inside.x, inside.y, inside.radius}) put_number(out, x);
}

Result<CoverInside> take_inside(ByteCursor& bytes) {
  CoverInside inside;
  inside.period = bytes.u32();
  if (inside.period != 0) {
    inside.x = bytes.number();
    inside.y = bytes.number();
    inside.radius = bytes.number();
  }
  if (!bytes.ok()) return Failure{"a disc of an inside cell is cut short, or has a number that is not finite or is -0"};
  if (inside.period != 0 && !(inside.radius > 0)) return Failure{"the radius of an inside cell's disc is not above 0"};
  return inside;
}

std::optional<Failure> take_insides(ByteCursor& bytes, std::uint64_t marked, CoverBlock& block) {
  const std::uint32_t count = bytes.u32();
  if (!bytes.ok() || count > bytes.left() / kShortestInside) return ends_early();
  if (count != marked)
    return Failure{"it shows " + grouped(count) + " cells to be inside, and the inside tree marks " + grouped(marked)};
  block.inside_by.reserve(count);
  for (std::uint32_t i = 0; i < count; ++i) {
    const Result<CoverInside> inside = take_inside(bytes);
    if (!inside) return inside.failure();
    block.inside_by.push_back(*inside);
  }
  return std::nullopt;
}

}  // namespace

void put_cover_summary(std::string& out, const CoverBlock& block) {
  put_integer(out, block.column, 4);
  put_integer(out, block.row, 4);
  put_integer(out, block.grade, 1);
  put_integer(out, block.outside_cells, 8);
  put_integer(out, block.inside_cells, 8);
}

Result<CoverBlock> take_cover_summary(ByteCursor& bytes) {
  CoverBlock block;
  block.column = bytes.u32();
  block.row = bytes.u32();
  block.grade = bytes.u8();
  block.outside_cells = bytes.u64();
  block.inside_cells = bytes.u64();
  if (!bytes.ok()) return ends_early();
  if (block.grade > Canvas::kLargestGrade)
    return Failure{"its grade is " + std::to_string(block.grade) + "; the largest is " +
                   std::to_string(Canvas::kLargestGrade)};
  const std::uint64_t cells = std::uint64_t{1} << (2 * block.grade);
  if (block.outside_cells > cells || block.inside_cells > cells - block.outside_cells)
    return Failure{"it claims more cells outside and inside than the " + grouped(cells) + " that it has"};
  return block;
}

void put_cover(std::string& out, const CoverBlock& block) {
  put_cover_summary(out, block);
  put_tree(out, block.outside);
  put_tree(out, block.inside);
  put_integer(out, block.inside_by.size(), 4);
  for (const CoverInside& inside : block.inside_by) put_inside(out, inside);
}

Result<CoverBlock> take_cover(ByteCursor& bytes, std::uint64_t& marked) {
  Result<CoverBlock> block = take_cover_summary(bytes);
  if (!block) return block;
  block.value().outside = take_tree(bytes);
  block.value().inside = take_tree(bytes);
  if (!bytes.ok()) return ends_early();
  const Result<std::uint64_t> outside = marks_of("outside", block->outside, block->grade);
  if (!outside) return outside.failure();
  const Result<std::uint64_t> inside = marks_of("inside", block->inside, block->grade);
  if (!inside) return inside.failure();
  if (auto problem = take_insides(bytes, *inside, block.value())) return *problem;
  if (bytes.left() != 0) return Failure{std::to_string(bytes.left()) + " bytes follow the last of its fields"};
  marked = *outside + *inside;
  return block;
}

}  // namespace merestone
