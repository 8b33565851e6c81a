#pragma once
#include <cstdint>
#include <optional>

#include "kernel/check.hpp"

namespace merestone {

/// The work that the claims of one file may imply together. It is asked in the order of the claims, before anything is
/// spent, so that what is refused does not depend on threads.
class WorkBudget {
 public:
  /// `limits.work` is for all claims together.
  explicit WorkBudget(const Limits& limits) : limits_(limits), left_(limits.work) {}

  /// Takes the claim's work off what is left, or refuses and leaves it as it is: a later, cheaper claim may still fit.
  std::optional<OverLimit> take(const Claim& claim, std::uint64_t work);

 private:
  Limits limits_;
  std::uint64_t left_;
};

}  // namespace merestone
