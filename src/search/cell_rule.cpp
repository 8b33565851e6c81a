#include "search/cell_rule.hpp"

#include "kernel/dispatch.hpp"
#include "kernel/shape.hpp"
#include "lanes/region_escape.hpp"
#include "search/double_cycle.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kStepsBeyondPoint = 64;  // a region may take longer to escape than one parameter of it

DoubleParameter as_parameter(const DoubleBox& box) { return {box.x, box.y, box.reach_upper()}; }

std::optional<Rule> in_double(const Probe& probe, const DoubleBox& box) {
  if (const auto* escape = std::get_if<Escape>(&probe.point->by)) {
    const RegionEscape whole = region_escape(as_parameter(box), escape->index + kStepsBeyondPoint);
    if (whole.index == 0) return std::nullopt;
    return Escape{whole.index, kDoubleBits};
  }
  const auto& cycle = std::get<AttractingDisc>(probe.point->by);
  const auto found = find_attracting_disc(as_parameter(box), arf_get_d(cycle.disc.centre.re.raw(), ARF_RND_NEAR),
                                          arf_get_d(cycle.disc.centre.im.raw(), ARF_RND_NEAR), cycle.period);
  if (!found) return std::nullopt;
  return AttractingDisc{found->period, {{Dyadic(found->x), Dyadic(found->y)}, Dyadic(found->radius)}, kDoubleBits};
}

std::optional<Rule> in_balls(const Probe& probe, const Box& box, std::uint32_t bits) {
  const auto holds = [&](const Rule& rule) {
    return std::holds_alternative<Established>(establish_by(probe.point->statement, box, rule));
  };
  if (const auto* escape = std::get_if<Escape>(&probe.point->by)) {
    for (std::uint64_t index = escape->index; index <= escape->index + 2; ++index)
      if (const Rule rule = Escape{index, bits}; holds(rule)) return rule;
    return std::nullopt;
  }
  AttractingDisc cycle = std::get<AttractingDisc>(probe.point->by);
  cycle.bits = bits;
  for (int widening = 0; widening < 64; widening += 4) {
    if (const Rule rule = cycle; holds(rule)) return rule;
    cycle.disc.radius = cycle.disc.radius.shifted(4);
  }
  return std::nullopt;
}

}  // namespace

bool certainly_covers(const Probe& probe, const RegionCell& cell) {
  if (probe.circle) return cell.lane && probe.circle->certainly_contains(*cell.lane);
  return probe.disc && is_within(shape_of(Region(cell.box)), shape_of(Region(*probe.disc)));
}

std::optional<Rule> elementary_rule(const Probe& probe, const RegionCell& cell, std::uint32_t bits) {
  return cell.lane ? in_double(probe, *cell.lane) : in_balls(probe, cell.box, bits);
}

}  // namespace merestone
