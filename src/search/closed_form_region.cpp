#include "search/closed_form_region.hpp"

#include <array>
#include <utility>

#include "kernel/rules/rules.hpp"
#include "lanes/closed_form_filter.hpp"
#include "search/region_bounds.hpp"

namespace merestone {

namespace {

// Points of a box's rim, in units of its half sides; those of a disc are nearer by 2^-1/2 at the corners.
constexpr std::array<std::pair<double, double>, 8> kRim = {
    {{-1, -1}, {0, -1}, {1, -1}, {-1, 0}, {1, 0}, {-1, 1}, {0, 1}, {1, 1}}};
constexpr double kCornerOfDisc = 0.7071;

// The period of the component that has all of these points, as rounded; 0 when there is none.
std::uint32_t approx_period(const DoubleBox& box, bool is_disc) {
  const ClosedFormSide side = closed_form_side({box.x, box.y, 0});
  if (side != ClosedFormSide::inside_period_1 && side != ClosedFormSide::inside_period_2) return 0;
  for (const auto& [across, up] : kRim) {
    const double scale = is_disc && across != 0 && up != 0 ? kCornerOfDisc : 1;
    if (closed_form_side({box.x + scale * across * box.half_width, box.y + scale * up * box.half_height, 0}) != side) return 0;
  }
  return side == ClosedFormSide::inside_period_1 ? 1 : 2;
}

}  // namespace

std::optional<ClosedForm> closed_form_of(const Region& region) {
  const auto lane = enclose_in_double(bounding_box(region));
  if (!lane) return std::nullopt;
  const ClosedForm form{approx_period(*lane, std::holds_alternative<Disc>(region))};
  if (form.period == 0) return std::nullopt;
  if (!std::holds_alternative<Established>(rules::closed_form_inside(region, form))) return std::nullopt;
  return form;
}

}  // namespace merestone
