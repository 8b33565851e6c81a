#pragma once
#include <string>

#include "cli/locate_options.hpp"

namespace merestone {

/// Lists what the region contains and writes the certificate that was asked for. Prints. Returns the program's exit code.
int run_locate(const LocateWords& words, const std::string& command_line);

}  // namespace merestone
