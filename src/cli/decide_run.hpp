#pragma once
#include "cli/decide_options.hpp"
#include "cli/exit_code.hpp"

namespace merestone {

/// Answers every parameter, in order, and writes the certificate that was asked for. Prints.
ExitCode run_decide(const DecideWords& words);

}  // namespace merestone
