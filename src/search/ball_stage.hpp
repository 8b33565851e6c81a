#pragma once
#include "search/deadline.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// Follows the critical orbit of c in disc enclosures of `bits` bits until an escape is proved, an attracting cycle is
/// proved, the enclosure is lost, or the iterations or the deadline are used up.
/// Undecided with Limit::precision means that more bits may help.
Verdict decide_in_balls(const ComplexRational& c, const Dyadic& bailout, std::uint64_t iterations, std::uint32_t bits,
                        Deadline& deadline);

}  // namespace merestone
