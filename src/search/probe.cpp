#include "search/probe.hpp"

#include "kernel/orbit_enclosure.hpp"
#include "kernel/safe_disc.hpp"
#include "lanes/exterior_lane.hpp"
#include "lanes/interior_lane.hpp"
#include "search/ball_stage.hpp"
#include "search/double_stage.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kFirstSteps = 64;   // most exterior parameters that are met have escaped by then
constexpr std::uint64_t kStepsToReadOff = 32;  // from radius 2, where that is no matter of chance

Proof escapes(std::uint64_t index, std::uint32_t bits) { return {Outside{}, Escape{index, bits}}; }

void take_exterior(Probe& probe, const ExteriorLane& lane) {
  if (!lane.circle) return;
  probe.point = escapes(lane.index, kDoubleBits);
  probe.circle = lane.circle;
  probe.by = ExteriorDisc{probe.at, lane.index, kDoubleBits};
}

void take_interior(Probe& probe, double x, double y, const DoubleDisc& found, bool discs) {
  const AttractingDisc cycle{found.period, {{Dyadic(found.x), Dyadic(found.y)}, Dyadic(found.radius)}, kDoubleBits};
  probe.point = Proof{Inside{}, cycle};
  if (!discs) return;
  probe.circle = interior_disc(x, y, {found.x, found.y, found.radius}, found.period);
  if (probe.circle) probe.by = InteriorDisc{probe.at, cycle};
}

// The first index at which z is far enough out for Lemma E3; 0 when the enclosure is lost before.
std::uint64_t index_to_read_off(const ComplexDyadic& at, std::uint32_t bits, std::uint64_t most) {
  OrbitEnclosure orbit(Point{to_rational(at)}, bits);
  const Dyadic far_out(kReadOff);
  while (orbit.index() < most && orbit.step())
    if (certainly_beyond(orbit.at_centre(), far_out)) return orbit.index();
  return 0;
}

}  // namespace

Probe probe_in_double(double x, double y, const ProbeEffort& effort, Deadline& deadline) {
  Probe probe;
  probe.at = {Dyadic(x), Dyadic(y)};
  if (effort.discs) {
    const ExteriorLane lane = exterior_disc(x, y, std::min(kFirstSteps, effort.iterations));
    take_exterior(probe, lane);
    if (lane.circle) return probe;
  }
  const DoubleResult fate = decide_in_double({x, y, 0}, 2, effort.iterations, deadline);
  if (const auto* escape = std::get_if<DoubleEscape>(&fate)) {
    probe.point = escapes(escape->index, kDoubleBits);
    if (effort.discs) take_exterior(probe, exterior_disc(x, y, escape->index + kStepsToReadOff));
  } else if (const auto* found = std::get_if<DoubleDisc>(&fate)) {
    take_interior(probe, x, y, *found, effort.discs);
  }
  return probe;
}

Probe probe_in_balls(const ComplexDyadic& at, const ProbeEffort& effort, Deadline& deadline) {
  Probe probe;
  probe.at = at;
  const Verdict fate = decide_in_balls(to_rational(at), Dyadic(2.0), {effort.iterations, effort.bits, 0, true}, deadline);
  const Proof* proof = std::get_if<Proof>(&fate);
  if (proof == nullptr) return probe;
  Result<Disc> disc = Failure{};
  if (const auto* cycle = std::get_if<AttractingDisc>(&proof->by)) {
    probe.point = *proof;
    probe.by = InteriorDisc{at, *cycle};
    if (effort.discs) disc = enclose_interior_disc(std::get<InteriorDisc>(*probe.by));
  } else {
    const Count* count = std::get_if<Count>(&proof->statement);
    const std::uint64_t escape = count != nullptr ? count->index : std::get<Escape>(proof->by).index;
    probe.point = escapes(escape, effort.bits);
    probe.by = ExteriorDisc{at, index_to_read_off(at, effort.bits, escape + kStepsToReadOff), effort.bits};
    if (effort.discs && std::get<ExteriorDisc>(*probe.by).index > 0)
      disc = enclose_exterior_disc(std::get<ExteriorDisc>(*probe.by));
  }
  if (disc)
    probe.disc = *disc;
  else
    probe.by.reset();
  return probe;
}

}  // namespace merestone
