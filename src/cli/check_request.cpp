#include "cli/check_request.hpp"

#include "kernel/shape.hpp"
#include "kernel/typed_region.hpp"

namespace merestone {

RequestRelation relation_of_request(const Claim& claim) {
  const Shape typed = *parse_region(*claim.request), region = shape_of(claim.region);
  const bool in_region = is_within(typed, region), around_region = is_within(region, typed);
  const bool is_point = !is_typed_region(*claim.request);
  if (in_region && around_region) return is_point ? RequestRelation::same_point : RequestRelation::same_region;
  if (around_region) return RequestRelation::around_region;
  return is_point ? RequestRelation::point_in_region : RequestRelation::part_of_region;
}

}  // namespace merestone
