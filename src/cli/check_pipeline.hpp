#pragma once
#include <functional>
#include <optional>
#include <variant>

#include "cli/check_source.hpp"
#include "kernel/check.hpp"

namespace merestone {

/// What is made of the batches.
struct BatchReport {
  std::function<void(Batch&)> prepare;  // called by any thread, for several batches at once
  std::function<bool(Batch&)> deliver;  // called in the order of the claims; false ends the check
};

using CertificateEnded = std::variant<CertificateEnd, ReadFault>;

/// Establishes the chosen claims of a source on `threads` threads; claims over the limits or over
/// what a WorkBudget allows for all of them are refused. Batches before a damaged one are delivered, none after it.
/// Memory does not grow with the number of claims.
/// On failure (nothing): the report ended the check.
std::optional<CertificateEnded> check_claims(ClaimSource& source, const Limits& limits, unsigned threads,
                                             const BatchReport& report);

}  // namespace merestone
