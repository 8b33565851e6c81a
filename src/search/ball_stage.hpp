#pragma once
#include "search/deadline.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// One attempt in disc enclosures.
struct BallAttempt {
  std::uint64_t iterations = 0;
  std::uint32_t bits = 128;
  /// No cycle is looked for before the orbit has outlived this index, at which it is expected to escape.
  std::uint64_t approx_escape = 0;
  /// Is a proof that the orbit escapes welcome although the escape index cannot be told?
  bool takes_no_index = false;
};

/// Follows the critical orbit of c in disc enclosures until an escape is proved, an attracting cycle is proved, the
/// enclosure is lost, or the iterations or the deadline are used up.
/// Undecided with Limit::precision means that more bits may help.
Verdict decide_in_balls(const ComplexRational& c, const Dyadic& bailout, const BallAttempt& attempt,
                        Deadline& deadline);

}  // namespace merestone
