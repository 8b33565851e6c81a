#include "search/decide_region.hpp"

#include <algorithm>
#include <deque>

#include "kernel/work.hpp"
#include "lanes/region_escape.hpp"
#include "search/approx_escape.hpp"
#include "search/cell_rule.hpp"
#include "search/closed_form_region.hpp"
#include "search/grid.hpp"
#include "search/region_cells.hpp"
#include "search/root_search.hpp"

namespace merestone {

namespace {

constexpr slong kSmallestLane = -44;              // binary exponent of the size of regions that double precision takes
constexpr std::uint64_t kProbeIterations = 20'000, kFirstProbeIterations = 1'000;
constexpr std::uint64_t kStepsOfRadius = 64;      // within which a cell escapes as a whole
constexpr int kDeepestInBalls = 4;                // disc enclosures cost a thousand times as much as a lane
constexpr std::size_t kMostBlindProbes = 40;       // before disc enclosures take over
constexpr int kMostMemberSearches = 12;
constexpr std::uint32_t kBitsForWitness = 64;     // beyond those of the region's size

struct OpenCell {
  RegionCell at;
  std::size_t cell;    // of RegionCells
  int depth;
  std::size_t around;  // the last probe of a cell around it
};

// A parameter near the centre with few digits: people read witnesses.
ComplexDyadic short_centre_of(const Box& box) {
  constexpr slong kBitsOfSize = 10;
  const slong exponent = size_exponent(box) - kBitsOfSize;
  const ComplexDyadic centre = centre_of(box);
  return {nearest_on_grid(centre.re, exponent), nearest_on_grid(centre.im, exponent)};
}

bool proves_outside(const Rule& rule) {
  return std::holds_alternative<ExteriorDisc>(rule) || std::holds_alternative<Escape>(rule);
}

// One disc settles a typed disc although it does not contain its bounding box.
bool covers_disc(const Probe& probe, const Region& region) {
  if (!std::holds_alternative<Disc>(region)) return false;
  if (!probe.circle) return probe.disc && is_within(shape_of(region), shape_of(Region(*probe.disc)));
  const auto [x, y, radius] = *probe.circle;
  return is_within(shape_of(region), shape_of(Region(Disc{{Dyadic(x), Dyadic(y)}, Dyadic(radius)})));
}

class RegionSearch {
 public:
  RegionSearch(const RegionBounds& bounds, const DecideOptions& options)
      : bounds_(bounds), whole_(bounding_box(bounds.outer)), inner_(shape_of(bounds.inner)), options_(options),
        deadline_(options.limits.seconds) {}

  RegionVerdict run();

 private:
  struct Around {  // a probe, and the last one of a cell around its cell
    Probe probe;
    std::size_t outer;
  };
  static constexpr std::size_t kNone = SIZE_MAX;

  void cut_and_settle();
  bool all_settled() const {
    return queue_.empty() && unsettled_ == 0 && (settled_outside_ == 0 || settled_inside_ == 0);
  }
  /// A member and a parameter outside have been met, or a Misiurewicz point, which shows both.
  bool has_witnesses() const {
    return member_ && (outside_ || std::holds_alternative<Misiurewicz>(member_->statement));
  }
  /// Does the arithmetic in use decide too few parameters?
  bool is_blind() const { return blind_ > kMostBlindProbes; }
  OpenCell opened(const Box& box, std::size_t cell, int depth, std::size_t around) const;
  bool uses_discs() const { return options_.rules == Rules::all; }
  std::optional<Rule> settled_by_earlier(const OpenCell& open) const;
  std::optional<Rule> settle_by_radius(const OpenCell& open);
  std::optional<Rule> settle(OpenCell& open);
  std::optional<Rule> settle_by_probe(const Probe& probe, const OpenCell& open) const;
  Probe probe(const OpenCell& open);
  void take_witness(const Probe& probe);
  void look_for_member(const Region& region);
  void look_for_outside(const OpenCell& open);
  void take(OpenCell open);
  RegionVerdict straddles() const;
  RegionVerdict settled() const;
  RegionVerdict undecided() const;
  std::optional<Proof> count(const Region& region) const;

  const RegionBounds& bounds_;
  Box whole_;
  Shape inner_;
  const DecideOptions& options_;
  Deadline deadline_;
  RegionCells cells_;
  std::deque<OpenCell> queue_;
  std::vector<Around> around_;
  std::optional<Claim> member_, outside_;
  std::uint32_t bits_ = 64;
  std::size_t unsettled_ = 0, settled_outside_ = 0, settled_inside_ = 0;
  std::size_t blind_ = 0;  // probes that decided nothing
  int member_searches_ = 0;
  bool lanes_ = true;
  bool ran_out_of_time_ = false, ran_out_of_bits_ = false;
};

OpenCell RegionSearch::opened(const Box& box, std::size_t cell, int depth, std::size_t around) const {
  OpenCell open{{box, std::nullopt}, cell, depth, around};
  if (lanes_) open.at.lane = enclose_in_double(box);
  return open;
}

std::optional<Rule> RegionSearch::settled_by_earlier(const OpenCell& open) const {
  for (std::size_t i = open.around; i != kNone; i = around_[i].outer)
    if (certainly_covers(around_[i].probe, open.at)) return around_[i].probe.by;
  return std::nullopt;
}

Probe RegionSearch::probe(const OpenCell& open) {
  // what is left open by a short probe is cut, and longer probes follow
  const std::uint64_t iterations = std::min(kProbeIterations, kFirstProbeIterations << open.depth);
  const ProbeEffort effort{std::min(options_.limits.iterations, iterations), bits_, uses_discs()};
  const ComplexDyadic at = short_centre_of(open.at.box);
  if (open.at.lane)
    return probe_in_double(arf_get_d(at.re.raw(), ARF_RND_NEAR), arf_get_d(at.im.raw(), ARF_RND_NEAR), effort, deadline_);
  return probe_in_balls(at, effort, deadline_);
}

// Of some parameters of the box the one that escapes first, as it seems, is proved to escape.
void RegionSearch::look_for_outside(const OpenCell& open) {
  if (outside_ || !open.at.lane) return;
  const std::uint64_t iterations = std::min(kProbeIterations, kFirstProbeIterations << open.depth);
  const auto found = approx_escape(*open.at.lane, std::min(options_.limits.iterations, iterations));
  if (!found) return;
  const ProbeEffort effort{found->index + 1, bits_ + kBitsForWitness, false};
  take_witness(probe_in_balls({Dyadic(found->x), Dyadic(found->y)}, effort, deadline_));
}

void RegionSearch::take_witness(const Probe& probe) {
  if (!probe.point) return;
  std::optional<Claim>& witness = probe.is_outside() ? outside_ : member_;
  if (witness || !is_within(shape_of(to_rational(probe.at)), inner_)) return;
  witness = Claim{probe.point->statement, Point{to_rational(probe.at)}, std::nullopt, probe.point->by};
}

void RegionSearch::look_for_member(const Region& region) {
  if (member_ || member_searches_ == kMostMemberSearches) return;
  ++member_searches_;
  RootHunt hunt;
  hunt.iterations = std::min(options_.limits.iterations, hunt.iterations);
  hunt.misiurewicz = options_.rules == Rules::all;
  const std::vector<Claim> found = find_roots(region, hunt, deadline_);
  if (!found.empty() && is_within(shape_of(found.front().region), inner_)) member_ = found.front();
}

std::optional<Rule> RegionSearch::settle_by_probe(const Probe& probe, const OpenCell& open) const {
  if (probe.by && certainly_covers(probe, open.at)) return probe.by;
  if (probe.by && open.cell == RegionCells::kWhole && covers_disc(probe, bounds_.outer)) return probe.by;
  // without a lane the criterion has not been tried, and far from M there is no exterior disc
  if (uses_discs() && !(probe.is_outside() && !probe.by)) return std::nullopt;
  return elementary_rule(probe, open.at, bits_);
}

// The cheapest rule first: the radius-2 criterion over the whole cell costs a fifteenth of an exterior disc and settles
// nearly as much that is not close to M (docs/performance.md).
std::optional<Rule> RegionSearch::settle_by_radius(const OpenCell& open) {
  if (!open.at.lane) return std::nullopt;
  const auto& lane = *open.at.lane;
  const RegionEscape whole = region_escape({lane.x, lane.y, lane.reach_upper()},
                                           std::min(options_.limits.iterations, kStepsOfRadius));
  if (whole.index == 0) return std::nullopt;
  const Rule rule = Escape{whole.index, kDoubleBits};
  Probe centre;
  centre.at = short_centre_of(open.at.box);
  centre.point = Proof{Outside{}, rule};
  take_witness(centre);
  return rule;
}

std::optional<Rule> RegionSearch::settle(OpenCell& open) {
  if (auto rule = settle_by_radius(open)) return rule;
  if (auto rule = settled_by_earlier(open)) return rule;
  Probe found = probe(open);
  if (!found.point) {
    ++blind_;
    return std::nullopt;
  }
  take_witness(found);
  auto rule = settle_by_probe(found, open);
  if (found.by) {
    around_.push_back({std::move(found), open.around});
    open.around = around_.size() - 1;
  }
  return rule;
}

void RegionSearch::take(OpenCell open) {
  if (auto rule = settle(open)) {
    ++(proves_outside(*rule) ? settled_outside_ : settled_inside_);
    cells_.settle(open.cell, std::move(*rule));
    return;
  }
  look_for_outside(open);
  look_for_member(open.at.box);
  if (has_witnesses()) return;
  if (open.depth == (open.at.lane ? kDeepestRule : kDeepestInBalls) || cells_.count() + 4 > options_.limits.cells) {
    ++unsettled_;
    return;
  }
  const std::size_t first = cells_.cut(open.cell);
  const std::array<Box, 4> quarters = quarters_of(open.at.box);
  for (std::size_t i = 0; i < quarters.size(); ++i)
    queue_.push_back(opened(quarters[i], first + i, open.depth + 1, open.around));
}

RegionVerdict RegionSearch::run() {
  bits_ = static_cast<std::uint32_t>(std::max<slong>(64, 64 - 3 * size_exponent(whole_)));
  if (bits_ > options_.limits.bits) {
    ran_out_of_bits_ = true;
    return undecided();
  }
  if (const auto form = closed_form_of(bounds_.outer)) return {Proof{Inside{}, *form}, bounds_.outer};
  for (const bool lanes : {true, false}) {
    if (lanes && !(rounds_to_nearest() && size_exponent(whole_) > kSmallestLane)) continue;
    lanes_ = lanes;
    cut_and_settle();
    if (has_witnesses()) return straddles();
    if (all_settled()) return settled();
    if (ran_out_of_time_ || !is_blind()) break;
  }
  return undecided();
}

// Cuts the region anew until all its parts are settled, both witnesses have been met, or nothing more is to be expected.
void RegionSearch::cut_and_settle() {
  cells_ = RegionCells();
  around_.clear();
  unsettled_ = settled_outside_ = settled_inside_ = blind_ = 0;
  queue_ = {opened(whole_, RegionCells::kWhole, 0, kNone)};
  while (!queue_.empty() && !has_witnesses() && !(lanes_ && is_blind())) {
    if (deadline_.passed_now()) {
      ran_out_of_time_ = true;
      break;
    }
    OpenCell open = std::move(queue_.front());
    queue_.pop_front();
    take(std::move(open));
  }
}

RegionVerdict RegionSearch::straddles() const {
  Witnesses witnesses{{*member_}};
  if (!std::holds_alternative<Misiurewicz>(member_->statement)) witnesses.claims.push_back(*outside_);
  return {Proof{Straddles{}, std::move(witnesses)}, bounds_.inner};
}

// The escape index, where it is the same throughout.
std::optional<Proof> RegionSearch::count(const Region& region) const {
  const auto lane = enclose_in_double(bounding_box(region));
  if (!lane || !rounds_to_nearest()) return std::nullopt;
  const RegionEscape whole = region_escape({lane->x, lane->y, lane->reach_upper()}, options_.limits.iterations);
  if (!whole.is_count) return std::nullopt;
  return Proof{Count{Dyadic(2.0), whole.index}, Escape{0, kDoubleBits}};
}

RegionVerdict RegionSearch::settled() const {
  const Rule rule = cells_.rule();
  const bool is_cut = std::holds_alternative<Quarters>(rule);
  const Region region = is_cut ? Region(whole_) : bounds_.outer;
  if (settled_outside_ > 0) {
    if (!is_cut)
      if (auto proof = count(region)) return {*proof, region};
    return {Proof{Outside{}, rule}, region};
  }
  return {Proof{Inside{}, rule}, region};
}

RegionVerdict RegionSearch::undecided() const {
  const bool out_of_cells = cells_.count() + 4 > options_.limits.cells;
  const Limit limit = ran_out_of_time_   ? Limit::time
                      : ran_out_of_bits_ ? Limit::precision
                      : out_of_cells     ? Limit::cells
                      : is_blind() && options_.limits.iterations < kProbeIterations ? Limit::iterations
                                         : Limit::depth;
  return {Undecided{limit, std::min(options_.limits.iterations, kProbeIterations), bits_, cells_.count()}, bounds_.outer};
}

}  // namespace

RegionVerdict decide_region(const Shape& typed, const DecideOptions& options) {
  const RegionBounds bounds = bound_region(typed);
  return RegionSearch(bounds, options).run();
}

}  // namespace merestone
