#pragma once
#include <string>

#include "cli/decide_options.hpp"

namespace merestone {

/// Answers every parameter, in order, and writes the certificate that was asked for. Prints.
/// `command_line` goes into the certificate's provenance. Returns the program's exit code. An interrupted list is
/// answered as far as it was read, and its certificate holds what was proved until then.
int run_decide(const DecideWords& words, const std::string& command_line);

}  // namespace merestone
