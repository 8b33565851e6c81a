#pragma once
#include <cstdint>
#include <optional>

#include "kernel/claim.hpp"
#include "kernel/disc_enclosure.hpp"
#include "search/deadline.hpp"

namespace merestone {

/// Looks, at `bits` bits, for an attracting cycle of c near z whose period divides `approx_period`, and returns the
/// disc with which the kernel proved c inside (Lemma I1). Nothing when there is none to be found at this precision.
std::optional<AttractingDisc> find_attracting_disc(const ComplexRational& c, const DiscEnclosure& z,
                                                   std::uint64_t approx_period, std::uint32_t bits,
                                                   Deadline& deadline);

}  // namespace merestone
