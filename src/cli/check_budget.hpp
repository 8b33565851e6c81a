#pragma once
#include <cstdint>
#include <optional>

#include "kernel/check.hpp"

namespace merestone {

/// How many times the work of one claim all claims of a file may imply together.
inline constexpr std::uint64_t kClaimsWorthOfFile = 10;

/// What the claims of one file may cost: each as the limits say, and all of them together. It is asked in the order of
/// the claims, before anything is spent, so that what is refused does not depend on threads.
class WorkBudget {
 public:
  explicit WorkBudget(const Limits& limits);

  /// Takes the claim's work off what is left, or refuses and leaves it as it is: a later, cheaper claim may still fit.
  std::optional<OverLimit> take(const Claim& claim, std::uint64_t work);

 private:
  Limits limits_;
  std::uint64_t all_, left_;
};

}  // namespace merestone
