#pragma once
#include <optional>
#include <vector>

#include "kernel/cell_area.hpp"
#include "kernel/cover_check.hpp"

namespace merestone {

/// Whether the root reaches as far as what is covered: the box, or all of M, or its upper half if conjugation doubles
/// it. On failure: what it does not contain, or that a box is not doubled.
std::optional<Failure> check_reach(const CoverSquare& root, bool mirrored, const std::optional<RationalBox>& within);

/// What the blocks of a cover leave of an area, and what they show to be inside (Lemma A1); exact. Blocks may come in
/// any order.
class CoverSum {
 public:
  /// Requires check_reach() and that the trunk is established.
  CoverSum(const CoverPlan& plan, bool mirrored, const std::optional<RationalBox>& within, const CoverProof& trunk);

  CoverSquare square(const CoverBlock& block) const { return square_of(plan_, block.column, block.row, block.grade); }
  CoverWindow window(const CoverSquare& square) const {
    return within_ ? window_of(square, *within_) : whole_window(square);
  }

  /// A block with these cells, which is established, or whose figures are taken as they are claimed.
  /// Nothing is added where the trunk decides already. On failure: its place is none of the trunk's, or has a block
  /// already, or these are more cells than its window has.
  std::optional<Failure> add(const CoverBlock& block, std::uint64_t outside_cells, std::uint64_t inside_cells);
  /// On failure: a fine cell of the trunk that is not decided and has no block.
  std::optional<Failure> finish() const;

  // Of the whole area, the mirror image included, once all blocks were added.
  Dyadic at_most() const { return counted(kept_.total()); }
  Dyadic inside() const { return counted(inside_.total()); }

 private:
  Dyadic counted(const Dyadic& area) const { return mirrored_ ? area.shifted(1) : area; }
  std::size_t place(std::uint32_t column, std::uint32_t row) const {
    return (std::size_t{row} << plan_.root.grade) + column;
  }

  CoverPlan plan_;
  bool mirrored_;
  std::optional<RationalBox> within_;
  CoverWindow trunk_window_;
  CellArea kept_, inside_;
  std::vector<bool> decided_, has_block_;  // fine cells of the trunk
};

}  // namespace merestone
