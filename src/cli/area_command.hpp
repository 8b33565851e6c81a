#pragma once
#include <string>

#include "cli/area_options.hpp"

namespace merestone {

/// Carries out `merestone area`; returns the program's exit code.
int run_area_command(const AreaWords& words, const std::string& command_line);

}  // namespace merestone
