#pragma once
#include <cstdint>

#include "kernel/claim.hpp"
#include "kernel/outcome.hpp"
#include "kernel/work.hpp"

namespace merestone {

/// What a claim may cost. Read off the claim before anything is computed.
struct Limits {
  /// Most units of work_of.
  std::uint64_t work = 1'000'000'000;
  std::uint32_t bits = 65'536;
};

/// Establishes the claim anew from its region, statement and hints: dispatches to the one rule that fits, after
/// verifying in exact arithmetic that the region contains the request.
/// On failure: NotEstablished names the inequality, OverLimit the limit; neither says that the claim is false.
Outcome establish(const Claim& claim, const Limits& limits);

}  // namespace merestone
