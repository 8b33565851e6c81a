#include "format/area_sequence.hpp"

#include "format/component_payload.hpp"
#include "format/container_layout.hpp"

namespace merestone {

namespace {

std::string square_name(std::uint32_t column, std::uint32_t row) {
  return "its square in column " + std::to_string(column) + ", row " + std::to_string(row);
}

std::optional<ReadFault> named(std::uint64_t ordinal, const std::optional<Failure>& problem) {
  if (!problem) return std::nullopt;
  return damaged(block_name(ordinal), problem->message);
}

}  // namespace

AreaSequence::AreaSequence(const AreaHeader& header)
    : has_cover_(header.cover.has_value()), has_at_least_(header.at_least.has_value()) {
  if (header.cover) trunk_grade_ = header.cover->plan.root.grade;
}

std::optional<Failure> AreaSequence::check_ordinal(std::uint64_t ordinal) const {
  if (ordinal == blocks_) return std::nullopt;
  return Failure{"block " + std::to_string(blocks_) + " should come before it"};
}

std::optional<Failure> AreaSequence::admit_trunk(const CoverBlock& block) {
  if (!has_cover_) return Failure{"it is a trunk, and the header has no cover"};
  if (blocks_ != 0) return Failure{"it is a trunk; a container has one trunk at most, as its block 0"};
  if (block.column != 0 || block.row != 0) return Failure{"the trunk's column and row are 0"};
  if (block.grade != trunk_grade_)
    return Failure{"the trunk's grade is " + std::to_string(block.grade) + "; the header says " +
                   std::to_string(trunk_grade_)};
  has_trunk_ = true;
  has_inside_ |= block.inside_cells > 0;
  return std::nullopt;
}

std::optional<Failure> AreaSequence::admit_square(std::uint32_t column, std::uint32_t row, std::uint64_t inside_cells) {
  if (!has_cover_) return Failure{"it is a block of a cover, and the header has none"};
  if (!has_trunk_) return Failure{"the trunk should come before it, as block 0"};
  if (component_)
    return Failure{"it is a block of the cover and comes after components; blocks of the cover come first"};
  if (std::uint64_t{column} >> trunk_grade_ != 0 || std::uint64_t{row} >> trunk_grade_ != 0)
    return Failure{square_name(column, row) + " is outside the root"};
  if (square_ && !(*square_ < std::pair(row, column)))
    return Failure{square_name(column, row) +
                   " does not come after that of the block before it, by row, then by column"};
  square_ = {row, column};
  has_inside_ |= inside_cells > 0;
  return std::nullopt;
}

std::optional<Failure> AreaSequence::admit_components(const std::vector<Component>& components) {
  if (has_cover_ && !has_trunk_) return Failure{"the trunk should come before it, as block 0"};
  if (components_ % kComponentsOfBlock != 0)
    return Failure{
        "it has components and follows a block of them that is not full; every such block but the last has 4,096"};
  if (component_ && !stands_before(*component_, components.front()))
    return Failure{"its first component does not come after the last one of the block before it, by re, then by im"};
  component_ = components.back();
  components_ += components.size();
  return std::nullopt;
}

std::optional<Failure> AreaSequence::admit_content(const AreaBlock& block) {
  if (auto problem = check_ordinal(block.ordinal)) return problem;
  switch (block.kind) {
    case AreaKind::trunk:
      return admit_trunk(block.cover());
    case AreaKind::cover:
      return admit_square(block.cover().column, block.cover().row, block.cover().inside_cells);
    case AreaKind::components:
      break;
  }
  return admit_components(block.components());
}

std::optional<ReadFault> AreaSequence::admit(const AreaBlock& block) {
  if (auto fault = named(block.ordinal, admit_content(block))) return fault;
  ++blocks_;
  return std::nullopt;
}

std::optional<ReadFault> AreaSequence::admit(const AbsentCover& block) {
  if (auto fault = named(block.ordinal, check_ordinal(block.ordinal))) return fault;
  if (auto fault = named(block.ordinal, admit_square(block.column, block.row, block.inside_cells))) return fault;
  ++blocks_;
  ++absent_;
  return std::nullopt;
}

std::optional<ReadFault> AreaSequence::finish() const {
  if (has_cover_ && !has_trunk_)
    return damaged("index", "the header has a cover, and there is no trunk before the index");
  if (blocks_ == 0) return damaged("index", "there is no block before it; an area rests on a cover or on components");
  if (!has_at_least_ && (components_ > 0 || has_inside_))
    return damaged("header", "the key 'at-least' is missing, and blocks show parts of the area");
  return std::nullopt;
}

}  // namespace merestone
