#pragma once
#include <cstdint>
#include <vector>

#include "cover/cover_effort.hpp"
#include "cover/depth_policy.hpp"
#include "format/area_header.hpp"
#include "kernel/cell_area.hpp"

namespace merestone {

/// A fine cell of the trunk that is the square of a block.
struct BlockPlace {
  std::uint32_t column = 0, row = 0;
  /// Unique in its cover, and ascending in the order of blocks.
  std::uint64_t key() const { return std::uint64_t{row} << 32 | column; }
};

/// The trunk of a cover: what is decided on its fine cells, and the places of the blocks that are to decide the rest.
struct Trunk {
  CoverBlock block;
  std::vector<BlockPlace> places;  // in the order of blocks
  CellArea inside;                 // of its fine cells that are inside
};

/// All of M by its upper half, or a box.
AreaCover cover_of_all(CoverRules rules, unsigned depth);
/// On failure: the box is too small, or too far out, for doubles to cut it so deep.
Result<AreaCover> cover_of_box(const RationalBox& box, CoverRules rules, unsigned depth);

/// The largest depth that a cover may have: cells are then the 2^-depth-th part of the root.
inline constexpr unsigned kLargestDepth = 22;
inline constexpr unsigned kSmallestDepth = 4;
/// A fine cell is a cell of the last depth halved so many times more.
inline constexpr unsigned kCut = 4;

/// The depths that blocks of the cover may have.
DepthRange block_depths(const AreaCover& cover);

/// What the search on a block is to try so that its cells have this depth below the root.
CoverEffort block_effort(const AreaCover& cover, unsigned depth, bool with_inside);

/// The window of a block's square in what the cover is of.
CoverWindow window_of(const AreaCover& cover, const CoverSquare& square);

Trunk search_trunk(const AreaCover& cover);

}  // namespace merestone
