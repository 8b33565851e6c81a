#pragma once
#include <string>

#include "cli/decide_options.hpp"
#include "cli/exit_code.hpp"

namespace merestone {

/// Answers every parameter, in order, and writes the certificate that was asked for. Prints.
/// `command_line` goes into the certificate's provenance.
ExitCode run_decide(const DecideWords& words, const std::string& command_line);

}  // namespace merestone
