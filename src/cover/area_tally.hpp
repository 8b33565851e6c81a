#pragma once
#include "cover/trunk.hpp"
#include "kernel/cell_area.hpp"

namespace merestone {

/// Adds up what the blocks of a cover leave and what they show to be inside.
class AreaTally {
 public:
  AreaTally(const AreaCover& cover, const Trunk& trunk);

  void add(const CoverBlock& block);

  // Each of the whole area, the mirror image included; exact where it is not called approximate.
  /// Provided that every block was added: an upper bound of the area.
  Dyadic at_most() const { return counted(kept_.total()); }
  /// A lower bound, by cells inside.
  Dyadic inside() const { return counted(inside_.total()); }
  /// An upper bound now, blocks that were not added being left as they are.
  double approx_at_most() const;
  double approx_inside() const { return factor() * inside_.approx_total(); }
  std::size_t blocks() const { return blocks_; }

 private:
  double factor() const { return cover_.mirrored ? 2 : 1; }
  Dyadic counted(const Dyadic& area) const { return cover_.mirrored ? area.shifted(1) : area; }

  AreaCover cover_;
  CellArea kept_, inside_;
  std::size_t blocks_ = 0, all_blocks_;
};

}  // namespace merestone
