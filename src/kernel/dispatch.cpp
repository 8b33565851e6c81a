#include "kernel/dispatch.hpp"

#include "kernel/rules/rules.hpp"

namespace merestone {

namespace {

// The rules that establish each statement; everything else is rejected.
struct Dispatch {
  const Region& region;

  Outcome operator()(const Outside&, const Escape& by) const { return rules::escape(region, by); }
  Outcome operator()(const Outside&, const RealSegment&) const { return rules::real_segment_outside(region); }
  Outcome operator()(const Outside&, const ExteriorDisc& by) const { return rules::exterior_disc(region, by); }
  Outcome operator()(const Outside& outside, const Quarters& by) const { return rules::quarters(outside, region, by); }
  Outcome operator()(const Count& count, const Escape& by) const { return rules::escape_count(region, count, by); }
  Outcome operator()(const Inside&, const AttractingDisc& by) const { return rules::attracting_disc(region, by); }
  Outcome operator()(const Inside&, const ClosedForm& by) const { return rules::closed_form_inside(region, by); }
  Outcome operator()(const Inside&, const InteriorDisc& by) const { return rules::interior_disc(region, by); }
  Outcome operator()(const Inside& inside, const Quarters& by) const { return rules::quarters(inside, region, by); }
  Outcome operator()(const Member&, const ClosedForm& by) const { return rules::closed_form_member(region, by); }
  Outcome operator()(const Member&, const RealSegment&) const { return rules::real_segment_member(region); }
  Outcome operator()(const Member&, const Preperiodic& by) const { return rules::preperiodic(region, by); }
  Outcome operator()(const Straddles&, const Witnesses& by) const { return rules::witnesses(region, by); }
  Outcome operator()(const Nucleus& type, const IsolatedRoot& by) const { return rules::nucleus(region, type, by); }
  Outcome operator()(const Misiurewicz& type, const IsolatedRoot& by) const {
    return rules::misiurewicz(region, type, by);
  }
  template <class S, class R>
  Outcome operator()(const S&, const R&) const {
    return NotEstablished{"this rule does not establish this claim"};
  }
};

}  // namespace

Outcome establish_by(const Statement& statement, const Region& region, const Rule& rule) {
  return std::visit(Dispatch{region}, statement, rule);
}

}  // namespace merestone
