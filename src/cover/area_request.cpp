#include "cover/area_request.hpp"

#include <algorithm>
#include <cmath>

#include "cover/trunk.hpp"
#include "format/digest.hpp"
#include "search/catalogue/catalogue.hpp"

namespace merestone {

namespace {

// Changes whenever the same request would give other blocks.
constexpr int kSearchVersion = 1;

}  // namespace

unsigned depth_for_seconds(double seconds) {
  const double depth = 17 + std::log(seconds / 60) / std::log(3.3);
  return static_cast<unsigned>(std::clamp(std::lround(depth), long{kSmallestDepth}, long{kLargestDepth}));
}

int resolution_for_depth(unsigned depth) { return std::clamp(static_cast<int>(depth) - 2, 4, kFinestResolution); }

Result<AreaCover> cover_of(const AreaRequest& request) {
  if (!request.within) return cover_of_all(request.rules, request.depth);
  return cover_of_box(*request.within, request.rules, request.depth);
}

std::string description_of(const AreaRequest& request, const AreaCover& cover) {
  nlohmann::json json = to_json(AreaHeader{std::nullopt, std::nullopt, cover});
  json["depth"] = request.depth;
  json["search"] = kSearchVersion;
  if (request.seconds) json["seconds"] = *request.seconds;
  if (request.resolution) json["resolution"] = *request.resolution;
  return canonical_json(json);
}

}  // namespace merestone
