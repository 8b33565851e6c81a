#pragma once
#include <algorithm>
#include <array>

namespace merestone {

/// The exit codes, the same in every program; docs/certificate-format.md has the table.
enum class ExitCode {
  established = 0,   // everything asked was proved, upheld or established
  refuted = 1,       // something is provably wrong, or a claim was not established
  malformed = 2,     // usage, or input that is malformed
  undecided = 3,     // undecided or refused within the limits
  io_failed = 4,     // input or output failed
  sample_only = 5,   // established on a sample
};

/// Of two codes the one that stands first in 4, 2, 1, 3, 5, 0.
constexpr ExitCode worse(ExitCode a, ExitCode b) {
  constexpr std::array kOrder = {ExitCode::io_failed, ExitCode::malformed,   ExitCode::refuted,
                                 ExitCode::undecided, ExitCode::sample_only, ExitCode::established};
  return std::find(kOrder.begin(), kOrder.end(), a) < std::find(kOrder.begin(), kOrder.end(), b) ? a : b;
}

}  // namespace merestone
