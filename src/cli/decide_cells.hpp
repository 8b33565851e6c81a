#pragma once
#include <string>

#include "cli/decide_options.hpp"

namespace merestone {

/// Carries out `merestone decide --box A B --depth N`: cuts the box into cells and prints the exact area that each
/// verdict has. Requires words.depth. Returns the program's exit code.
int run_decide_cells(const DecideWords& words, const std::string& command_line);

}  // namespace merestone
