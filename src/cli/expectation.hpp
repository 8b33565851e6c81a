#pragma once
#include "cli/answer.hpp"
#include "cli/decide_options.hpp"
#include "cli/exit_code.hpp"

namespace merestone {

/// The exit code that one answer calls for.
ExitCode exit_code_of(const Answer& answer, const std::optional<Expectation>& expected);

}  // namespace merestone
