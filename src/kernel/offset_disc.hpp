#pragma once

namespace merestone {

/// A closed disc about c + x + iy, where c is a parameter that is a double exactly. Of radius 0: nothing is proved.
struct OffsetDisc {
  double x = 0, y = 0, radius = 0;
  double loss =
      1;  // what errors may have cost, in proportion to the radius: that and the shift of the centre are not above it
};

/// Up to this loss a disc has in it every other that rests on the same theorem and is smaller by 2^-19 than it could
/// be.
inline constexpr double kSharpLoss = 0x1p-20;

inline bool is_sharp(const OffsetDisc& disc) { return disc.radius > 0 && disc.loss <= kSharpLoss; }

}  // namespace merestone
