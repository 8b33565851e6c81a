#include "kernel/check.hpp"

#include <cmath>
#include <limits>

#include "kernel/overloaded.hpp"
#include "kernel/rules/rules.hpp"
#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

struct Cost {
  std::uint64_t steps;
  std::uint32_t bits;
};

Cost cost_of(const Claim& claim) {
  return std::visit(
      Overloaded{[&](const Escape& by) {
                   const Count* count = std::get_if<Count>(&claim.statement);
                   return Cost{count != nullptr ? count->index : by.index, by.bits};
                 },
                 [](const AttractingDisc& by) { return Cost{by.period, by.bits}; },
                 [](const ClosedForm&) { return Cost{1, 64}; }, [](const RealSegment&) { return Cost{1, 64}; },
                 [](const Preperiodic& by) { return Cost{std::uint64_t{by.preperiod} + by.period, 64}; }},
      claim.by);
}

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

// Hints that no rule can use; the reader rejects them too, this is for claims that were built in memory.
bool hints_are_sane(const Claim& claim) {
  const Count* count = std::get_if<Count>(&claim.statement);
  if (count != nullptr && (count->index < 1 || count->bailout < Dyadic(2.0) || count->bailout > Dyadic(0x1p60)))
    return false;
  return std::visit(
      Overloaded{[&](const Escape& by) { return by.bits >= 2 && (count != nullptr ? by.index == 0 : by.index >= 1); },
                 [](const AttractingDisc& by) { return by.bits >= 2 && by.period >= 1 && by.disc.radius.sign() > 0; },
                 [](const ClosedForm& by) { return by.period == 1 || by.period == 2; },
                 [](const RealSegment&) { return true; }, [](const Preperiodic& by) { return by.period >= 1; }},
      claim.by);
}

}  // namespace

std::uint64_t work_of(const Claim& claim) {
  const Cost cost = cost_of(claim);
  const double words = std::ceil(cost.bits / 64.0);
  const double work = static_cast<double>(cost.steps) * std::ceil(std::pow(words, 1.6));
  constexpr double kMost = 0x1p63;
  return work < kMost ? static_cast<std::uint64_t>(work) : std::numeric_limits<std::uint64_t>::max();
}

Outcome establish(const Claim& claim, const Limits& limits) {
  if (!hints_are_sane(claim)) return NotEstablished{"a hint is out of the rule's range"};
  if (const Cost cost = cost_of(claim); cost.bits > limits.bits)
    return OverLimit{"it asks for " + std::to_string(cost.bits) + " bits; the limit is " + std::to_string(limits.bits)};
  if (const std::uint64_t work = work_of(claim); work > limits.work)
    return OverLimit{"it implies " + std::to_string(work) + " units of work; the limit is " +
                     std::to_string(limits.work)};
  if (auto problem = request_outside_region(claim)) return *problem;
  return std::visit(Dispatch{claim.region}, claim.statement, claim.by);
}

}  // namespace merestone
