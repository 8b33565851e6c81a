#pragma once
#include "cli/components_options.hpp"

namespace merestone {

/// Lists hyperbolic components. Prints. Returns the program's exit code.
int run_components(const ComponentsWords& words);

}  // namespace merestone
