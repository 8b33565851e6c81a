#pragma once
#include <optional>

#include "cover/area_request.hpp"
#include "image/picture.hpp"

namespace merestone {

/// Draws what is proved of a box, or of the part of the plane in which M lies: outside, inside, undecided; `pixels`
/// wide or a little wider, each pixel a cell that is decided for itself, a colour by the shares of its fine cells. Uses
/// the threads of oneTBB. On failure: the box cannot be cut so deep.
Result<Picture> draw_area(const std::optional<RationalBox>& within, CoverRules rules, unsigned pixels);

}  // namespace merestone
