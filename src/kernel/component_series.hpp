#pragma once
#include <cstdint>
#include <optional>
#include <vector>

#include "kernel/disc_enclosure.hpp"

namespace merestone {

/// Encloses the first coefficients l_1, ..., l_coefficients of the multiplier lambda(t) = l_1 t + l_2 t^2 + ... of the
/// attracting cycle at the parameter c0 + t, where c0 is the nucleus of exact period `period` in the disc (Lemma A2).
/// Requires: the disc contains exactly one nucleus of that exact period; coefficients >= 1.
/// On failure (nothing): the enclosures are lost, or there would be more than kMostSeriesTerms discs to hold.
std::optional<std::vector<DiscEnclosure>> multiplier_series(const DiscEnclosure& nucleus, std::uint32_t period,
                                                            std::uint32_t coefficients, slong bits);

/// period times coefficients, at most: about 100 MiB.
inline constexpr std::uint64_t kMostSeriesTerms = std::uint64_t{1} << 20U;

}  // namespace merestone
