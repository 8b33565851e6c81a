#include "kernel/check.hpp"

#include "kernel/overloaded.hpp"
#include "kernel/rules/rules.hpp"
#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

std::optional<NotEstablished> request_outside_region(const Claim& claim) {
  if (!claim.request) return std::nullopt;
  const Result<ComplexRational> typed = parse_complex(*claim.request);
  if (!typed) return NotEstablished{"the request cannot be read: " + typed.failure().message};
  if (!contains(claim.region, *typed)) return NotEstablished{"the region does not contain the request"};
  return std::nullopt;
}

// The rules that establish each statement; everything else is rejected, never skipped.
struct Dispatch {
  const Region& region;

  Outcome operator()(const Outside&, const Escape& by) const { return rules::escape(region, by); }
  Outcome operator()(const Outside&, const RealSegment&) const { return rules::real_segment_outside(region); }
  Outcome operator()(const Count& count, const Escape& by) const { return rules::escape_count(region, count, by); }
  Outcome operator()(const Inside&, const AttractingDisc& by) const { return rules::attracting_disc(region, by); }
  Outcome operator()(const Inside&, const ClosedForm& by) const { return rules::closed_form_inside(region, by); }
  Outcome operator()(const Member&, const ClosedForm& by) const { return rules::closed_form_member(region, by); }
  Outcome operator()(const Member&, const RealSegment&) const { return rules::real_segment_member(region); }
  Outcome operator()(const Member&, const Preperiodic& by) const { return rules::preperiodic(region, by); }
  template <class S, class R>
  Outcome operator()(const S&, const R&) const {
    return NotEstablished{"this rule does not establish this claim"};
  }
};

constexpr std::uint64_t kLargestPeriod = std::uint64_t{1} << 53;  // figures hold it exactly

// The reader of certificates rejects these claims too; here it is for claims that were built in memory.

bool is_proper(const Disc& disc) {
  return disc.centre.re.is_moderate() && disc.centre.im.is_moderate() && disc.radius.is_moderate() &&
         disc.radius.sign() > 0;
}

bool is_proper(const Region& region) {
  return std::visit(Overloaded{[](const Point&) { return true; },
                               [](const Segment& segment) {
                                 return segment.lo.is_moderate() && segment.hi.is_moderate() && segment.lo < segment.hi;
                               },
                               [](const Disc& disc) { return is_proper(disc); }},
                    region);
}

bool hints_are_sane(const Claim& claim) {
  const Count* count = std::get_if<Count>(&claim.statement);
  if (count != nullptr && (count->index < 1 || !count->bailout.is_moderate() || count->bailout < Dyadic(2.0) || count->bailout > Dyadic(0x1p60)))
    return false;
  return std::visit(
      Overloaded{[&](const Escape& by) { return by.bits >= 2 && (count != nullptr ? by.index == 0 : by.index >= 1); },
                 [](const AttractingDisc& by) { return by.bits >= 2 && by.period >= 1 && by.period <= kLargestPeriod && is_proper(by.disc); },
                 [](const ClosedForm& by) { return by.period == 1 || by.period == 2; },
                 [](const RealSegment&) { return true; }, [](const Preperiodic& by) { return by.period >= 1; }},
      claim.by);
}

}  // namespace

Outcome establish(const Claim& claim, const Limits& limits) {
  if (!is_proper(claim.region)) return NotEstablished{"the region is not proper: a disc has a radius above 0, a segment two ends in order"};
  if (!hints_are_sane(claim)) return NotEstablished{"a hint is out of the rule's range"};
  if (const std::uint32_t bits = bits_of(claim); bits > limits.bits)
    return OverLimit{"it asks for " + std::to_string(bits) + " bits; the limit is " + std::to_string(limits.bits)};
  if (const std::uint64_t work = work_of(claim); work > limits.work)
    return OverLimit{"it implies " + std::to_string(work) + " units of work; the limit is " +
                     std::to_string(limits.work)};
  if (auto problem = request_outside_region(claim)) return *problem;
  return std::visit(Dispatch{claim.region}, claim.statement, claim.by);
}

}  // namespace merestone
