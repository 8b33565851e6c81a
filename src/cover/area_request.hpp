#pragma once
#include <optional>
#include <string>

#include "format/area_header.hpp"

namespace merestone {

/// What area is to be bounded, and with how much effort.
struct AreaRequest {
  std::optional<RationalBox> within;  // nothing: all of M
  CoverRules rules = CoverRules::all;
  unsigned depth = 17;            // cells have the 2^-depth-th part of the root's side
  std::optional<double> seconds;  // then the depth is what they allow, block by block
  std::optional<int> resolution;  // of the catalogue of components; nothing: cells inside bound the area from below
  bool with_inside() const { return !resolution.has_value(); }
};

/// The depth to begin with when so many seconds are given: about what two processors of 2025 reach.
unsigned depth_for_seconds(double seconds);
/// The resolution of the catalogue whose components cost about a tenth of a cover of that depth.
int resolution_for_depth(unsigned depth);

/// The plane's part that is cut up, and how.
/// On failure: the box cannot be cut so deep.
Result<AreaCover> cover_of(const AreaRequest& request);

/// The request in canonical JSON: two runs of the same description search the same blocks.
std::string description_of(const AreaRequest& request, const AreaCover& cover);

}  // namespace merestone
