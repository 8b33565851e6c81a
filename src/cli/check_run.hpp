#pragma once
#include "cli/check_options.hpp"
#include "cli/exit_code.hpp"

namespace merestone {

/// Checks the files one after another and prints what came out. Requires words without problem.
ExitCode run_check(const CheckWords& words);

}  // namespace merestone
