#include "search/locate.hpp"

#include <cmath>
#include <deque>

#include "kernel/orbit_enclosure.hpp"
#include "search/region_bounds.hpp"

namespace merestone {

namespace {

// The range of z_n over the region for n = 0, 1, …, in double precision, rounded outward.
class Ranges {
 public:
  Ranges(const Region& region, std::uint64_t most, slong bits) {
    OrbitEnclosure orbit(region, bits);
    do {
      const DiscEnclosure range = orbit.range();
      take(range);
      escapes_ = certainly_beyond(range, Dyadic(2.0));
    } while (!escapes_ && orbit.index() < most && orbit.step());
  }

  /// Have all parameters escaped at the last index?
  bool escape() const { return escapes_; }
  /// The largest index whose range is known.
  std::uint64_t known() const { return discs_.size() - 1; }

  /// May the equation have a root in the region? False is a proof (Lemma E2).
  bool possibly_vanishes(const RootEquation& equation) const {
    const auto [early, late] = equation;
    if (late >= discs_.size()) return true;
    const Range &a = discs_[early], &b = discs_[late];
    const double x = a.x + b.x, y = a.y + b.y;
    return !(std::sqrt(x * x + y * y) > (a.radius + b.radius) * (1 + 0x1p-40) + 0x1p-40);
  }

 private:
  struct Range {
    double x, y, radius;
  };

  // a double's rounding of the midpoint, at most 2^64 in size, is inside the absolute and relative margins above for
  // what is near 0; what is far out is far from 0
  void take(const DiscEnclosure& range) {
    discs_.push_back({arf_get_d(range.re, ARF_RND_NEAR), arf_get_d(range.im, ARF_RND_NEAR), mag_get_d(range.radius)});
  }

  std::vector<Range> discs_;
  bool escapes_ = false;
};

constexpr std::uint64_t kShortPeriod = 64;  // all types up to here are isolated, whatever is known of their orbits

constexpr std::uint64_t kLongestPair = 512;  // there are that many squared types up to here
constexpr slong kPlacesBeyondSize = 32;
constexpr std::size_t kHuntedCells = 21;  // the region, its quarters, and theirs

class Locating {
 public:
  Locating(const Shape& region, const LocateOptions& options, const std::function<bool(const LocatedType&)>& take)
      : region_(region), options_(options), take_(take), deadline_(options.seconds), outer_(bound_region(region).outer),
        isolation_(options.isolation), ranges_(outer_, options.max_period, 64 - 2 * std::min<slong>(size_exponent(outer_), 0)) {
    isolation_.places = std::max(isolation_.places, kPlacesBeyondSize - size_exponent(outer_));
  }

  LocatedExtent run() {
    if (ranges_.escape()) return {options_.max_period, options_.max_period};  // a root's orbit does not escape
    const std::uint64_t last = std::min(options_.max_period, std::max(kShortPeriod, ranges_.known()));
    LocatedExtent extent;
    for (std::uint64_t late = 1; late <= last && wants_more(); ++late) {
      if (wants_nuclei()) {
        nuclei_ += look_for({0, late});
        extent.nuclei = deadline_.passed_now() ? late - 1 : late;
      }
      // a pair with this index has preperiod + period = late + 1
      if (!wants_others() || late >= std::min(options_.max_period, kLongestPair + 1)) continue;
      if (look_for_pairs(late)) extent.misiurewicz = late + 1;
    }
    if (last < options_.max_period && wants_more()) hunt(extent);
    return extent;
  }

 private:
  bool wants_nuclei() const { return options_.nuclei && nuclei_ < options_.most; }
  bool wants_others() const { return options_.misiurewicz && others_ < options_.most; }
  bool wants_more() { return (wants_nuclei() || wants_others()) && !stopped_ && !deadline_.passed_now(); }
  void give(const LocatedType& found) { stopped_ |= !take_(found); }

  // Beyond the extent: what Newton's method finds from the centres of the region and of the cells it is cut into.
  void hunt(const LocatedExtent& extent) {
    RootHunt hunt;
    hunt.iterations = options_.max_period;
    hunt.trials = hunt.most = 2 * options_.most;
    hunt.places = isolation_.places;
    std::deque<Box> cells = {bounding_box(bound_region(region_).inner)};
    for (std::size_t taken = 0; taken < kHuntedCells && wants_more(); ++taken) {
      for (const Claim& claim : find_roots(cells.front(), hunt, deadline_)) take_hunted(claim, extent);
      for (const Box& quarter : quarters_of(cells.front())) cells.push_back(quarter);
      cells.pop_front();
    }
  }

  void take_hunted(const Claim& claim, const LocatedExtent& extent) {
    const auto* nucleus = std::get_if<Nucleus>(&claim.statement);
    const auto* other = std::get_if<Misiurewicz>(&claim.statement);
    const std::uint64_t order = nucleus != nullptr ? nucleus->period : other->preperiod + other->period;
    const bool is_wanted = nucleus != nullptr ? wants_nuclei() && order > extent.nuclei
                                              : wants_others() && order > extent.misiurewicz;
    if (!is_wanted || order > options_.max_period || !is_within(shape_of(claim.region), region_)) return;
    const Rectangle place = bounding_rectangle(claim.region);
    for (const Claim& known : hunted_)
      if (known.statement == claim.statement && !are_disjoint(place, shape_of(known.region))) return;
    hunted_.push_back(claim);
    ++(nucleus != nullptr ? nuclei_ : others_);
    give({claim.statement, {{claim}, false}});
  }

  // False when it ended before all types with this index were looked for.
  bool look_for_pairs(std::uint64_t late) {
    for (std::uint64_t early = 1; early < late; ++early) {
      if (!wants_others()) return false;
      others_ += look_for({early, late});
    }
    return !deadline_.passed_now();
  }

  std::uint64_t look_for(const RootEquation& equation) {
    if (stopped_ || !ranges_.possibly_vanishes(equation) || deadline_.passed()) return 0;
    LocatedType found{equation.type(), isolate_roots(equation, region_, isolation_, deadline_)};
    if (!found.roots.claims.empty() || !found.roots.is_complete) give(found);
    return found.roots.claims.size();
  }

  const Shape& region_;
  const LocateOptions& options_;
  const std::function<bool(const LocatedType&)>& take_;
  Deadline deadline_;
  Region outer_;
  IsolationLimits isolation_;
  Ranges ranges_;
  std::vector<Claim> hunted_;
  bool stopped_ = false;  // by the receiver
  std::uint64_t nuclei_ = 0, others_ = 0;
};

}  // namespace

LocatedExtent locate(const Shape& region, const LocateOptions& options,
                     const std::function<bool(const LocatedType&)>& take) {
  return Locating(region, options, take).run();
}

}  // namespace merestone
