#pragma once
#include <optional>
#include <string>

#include "kernel/check.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// The claim to be written for a proof about every parameter of the region, or about the region: with the least of 64,
/// 128, 256, … bits at which the kernel establishes it, so that it does not depend on how the proof was found. Rules that
/// were found with more than double precision keep at least their bits where there are several.
/// On failure (nothing): the kernel did not establish it within the limits.
std::optional<Claim> certify(const Region& region, std::optional<std::string> request, const Proof& proof,
                             const Limits& limits);
std::optional<Claim> certify(const ComplexRational& c, std::optional<std::string> request, const Proof& proof,
                             const Limits& limits);

}  // namespace merestone
