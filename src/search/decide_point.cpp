#include "search/decide_point.hpp"

#include <algorithm>
#include <optional>

#include "kernel/rules/rules.hpp"
#include "lanes/closed_form_filter.hpp"
#include "search/ball_stage.hpp"
#include "search/double_stage.hpp"

namespace merestone {

namespace {

bool holds(const Outcome& outcome) { return std::holds_alternative<Established>(outcome); }

// Decides the closed-form components; exactly where the filter cannot tell.
std::optional<Proof> closed_form(const ComplexRational& c, const std::optional<DoubleParameter>& lane) {
  const ClosedFormSide side = lane ? closed_form_side(*lane) : ClosedFormSide::unclear;
  if (side == ClosedFormSide::inside_period_1) return Proof{Inside{}, ClosedForm{1}};
  if (side == ClosedFormSide::inside_period_2) return Proof{Inside{}, ClosedForm{2}};
  if (side == ClosedFormSide::outside_both) return std::nullopt;
  for (const std::uint32_t period : {1U, 2U}) {
    if (holds(rules::closed_form_inside(Point{c}, {period}))) return Proof{Inside{}, ClosedForm{period}};
    if (holds(rules::closed_form_member(Point{c}, {period}))) return Proof{Member{}, ClosedForm{period}};
  }
  return std::nullopt;
}

// The Gaussian integers whose critical orbit is preperiodic without 0 in the cycle: -2, i, -i.
std::optional<Proof> preperiodic(const ComplexRational& c) {
  if (!c.re.is_integer() || !c.im.is_integer()) return std::nullopt;
  for (const Preperiodic by : {Preperiodic{2, 1}, Preperiodic{2, 2}})
    if (holds(rules::preperiodic(Point{c}, by))) return Proof{Member{}, by};
  return std::nullopt;
}

// What is known of a real parameter without an orbit.
std::optional<Proof> on_the_axis(const ComplexRational& c) {
  if (c.im.sign() != 0) return std::nullopt;
  if (holds(rules::real_segment_member(Point{c}))) return Proof{Member{}, RealSegment{}};
  if (holds(rules::real_segment_outside(Point{c}))) return Proof{Outside{}, RealSegment{}};
  return std::nullopt;
}

// A parameter that is known to be a member may still be shown to be inside; the search for that is shorter.
SearchLimits limits_for(const DecideOptions& options, const std::optional<Proof>& known) {
  SearchLimits limits = options.limits;
  if (known && std::holds_alternative<Member>(known->statement)) {
    limits.bits = std::min<std::uint32_t>(limits.bits, 512);
    limits.iterations = std::min<std::uint64_t>(limits.iterations, 1'000'000);
  }
  return limits;
}

Proof escape_proof(const Dyadic& bailout, std::uint64_t index) {
  return {Count{bailout, index}, Escape{0, kDoubleBits}};
}

Proof disc_proof(const DoubleDisc& disc) {
  return {Inside{}, AttractingDisc{disc.period,
                                   {{Dyadic(disc.x), Dyadic(disc.y)}, Dyadic(disc.radius)},
                                   kDoubleBits}};
}

// A bailout that double precision holds exactly.
std::optional<double> as_double(const Dyadic& bailout) {
  const double value = arf_get_d(bailout.raw(), ARF_RND_NEAR);
  if (Dyadic(value) == bailout) return value;
  return std::nullopt;
}

// What double precision says, and where it expects an escape that it could not prove.
struct DoubleVerdict {
  Verdict verdict;
  std::uint64_t approx_escape = 0;
};

DoubleVerdict in_double(const DoubleParameter& lane, const Dyadic& bailout, const SearchLimits& limits,
                        Deadline& deadline) {
  const std::optional<double> radius = as_double(bailout);
  if (!radius) return {Undecided{Limit::precision, 0, kDoubleBits}};
  const DoubleResult result = decide_in_double(lane, *radius, limits.iterations, deadline);
  if (const auto* escape = std::get_if<DoubleEscape>(&result)) return {escape_proof(bailout, escape->index)};
  if (const auto* disc = std::get_if<DoubleDisc>(&result)) return {disc_proof(*disc)};
  if (deadline.passed_now()) return {Undecided{Limit::time, limits.iterations, kDoubleBits}};
  if (const auto* lost = std::get_if<DoubleLost>(&result))
    return {Undecided{Limit::precision, lost->index, kDoubleBits}, lost->approx_escape};
  return {Undecided{Limit::iterations, limits.iterations, kDoubleBits}};
}

bool wants_more_bits(const Verdict& verdict) {
  const Undecided* undecided = std::get_if<Undecided>(&verdict);
  return undecided != nullptr && undecided->limit == Limit::precision;
}

// From here on an escape index that cannot be told is taken for one that meets the bailout exactly.
constexpr std::uint32_t kBitsForTies = 1024;

Verdict climb(const ComplexRational& c, const std::optional<DoubleParameter>& lane, const Dyadic& bailout,
              const SearchLimits& limits) {
  Deadline deadline(limits.seconds);
  DoubleVerdict found{Undecided{Limit::precision, 0, kDoubleBits}};
  if (lane) found = in_double(*lane, bailout, limits, deadline);
  for (std::uint32_t bits = 128; wants_more_bits(found.verdict) && bits <= limits.bits; bits *= 2) {
    const bool index_is_out_of_reach = bits >= kBitsForTies || 2 * bits > limits.bits;
    found.verdict = decide_in_balls(c, bailout, {limits.iterations, bits, found.approx_escape, index_is_out_of_reach},
                                    deadline);
  }
  return found.verdict;
}

}  // namespace

Verdict decide_point(const ComplexRational& c, const DecideOptions& options) {
  const auto lane = rounds_to_nearest() ? enclose_in_double(c) : std::nullopt;
  if (auto proof = closed_form(c, lane)) return *proof;
  if (auto proof = preperiodic(c)) return *proof;
  const std::optional<Proof> known = on_the_axis(c);
  const Verdict verdict = climb(c, lane, options.bailout, limits_for(options, known));
  if (std::holds_alternative<Undecided>(verdict) && known) return *known;
  return verdict;
}

}  // namespace merestone
