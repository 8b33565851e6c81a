#pragma once
#include <optional>
#include <string>

#include "kernel/check.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// The claim to be written for a proof about the point c: with the least of 64, 128, 256, … bits at which the kernel
/// establishes it, so that it does not depend on how the proof was found.
/// On failure (nothing): the kernel did not establish it within the limits.
std::optional<Claim> certify(const ComplexRational& c, std::optional<std::string> request, const Proof& proof,
                             const Limits& limits);

}  // namespace merestone
