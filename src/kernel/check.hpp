#pragma once
#include <cstdint>

#include "kernel/claim.hpp"
#include "kernel/outcome.hpp"

namespace merestone {

/// What a claim may cost. Read off the claim before anything is computed.
struct Limits {
  /// Most steps of an orbit, each weighted by (bits / 64)^1.6 rounded up: about 0.3 microseconds a unit.
  std::uint64_t work = 1'000'000'000;
  std::uint32_t bits = 65'536;
};

/// The work that establishing the claim implies, in the units of Limits::work.
std::uint64_t work_of(const Claim& claim);

/// Establishes the claim anew from its region, statement and hints: dispatches to the one rule that fits, after
/// verifying in exact arithmetic that the region contains the request.
/// On failure: NotEstablished names the inequality, OverLimit the limit; neither says that the claim is false.
Outcome establish(const Claim& claim, const Limits& limits);

}  // namespace merestone
