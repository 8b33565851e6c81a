#include "kernel/check.hpp"

#include "kernel/dispatch.hpp"
#include "kernel/sane.hpp"
#include "kernel/typed_region.hpp"

namespace merestone {

namespace {

// Does the statement say that something is in the region, rather than that it holds throughout?
bool is_existential(const Statement& statement) {
  return std::holds_alternative<Straddles>(statement) || std::holds_alternative<Nucleus>(statement) ||
         std::holds_alternative<Misiurewicz>(statement);
}

// What holds throughout a region holds in every part of it; what is in a region is in everything around it (Lemma N1).
std::optional<NotEstablished> request_does_not_follow(const Claim& claim) {
  if (!claim.request) return std::nullopt;
  const Result<Shape> typed = parse_region(*claim.request);
  if (!typed) return NotEstablished{"the request cannot be read: " + typed.failure().message};
  const Shape region = shape_of(claim.region);
  if (is_existential(claim.statement)) {
    if (!is_within(region, *typed)) return NotEstablished{"the request does not contain the region"};
  } else if (!is_within(*typed, region)) {
    return NotEstablished{"the region does not contain the request"};
  }
  return std::nullopt;
}

}  // namespace

Outcome establish(const Claim& claim, const Limits& limits) {
  if (!is_proper(claim.region))
    return NotEstablished{"the region is not proper: a disc has a radius above 0, a segment and a box have ends in order"};
  if (!hints_are_sane(claim)) return NotEstablished{"a hint is out of the rule's range"};
  if (const std::uint32_t bits = bits_of(claim); bits > limits.bits)
    return OverLimit{"it asks for " + std::to_string(bits) + " bits; the limit is " + std::to_string(limits.bits)};
  if (const std::uint64_t work = work_of(claim); work > limits.work)
    return OverLimit{"it implies " + std::to_string(work) + " units of work; the limit is " +
                     std::to_string(limits.work)};
  if (auto problem = request_does_not_follow(claim)) return *problem;
  return establish_by(claim.statement, claim.region, claim.by);
}

}  // namespace merestone
