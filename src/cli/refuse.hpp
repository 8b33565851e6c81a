#pragma once
#include <fmt/format.h>

#include "cli/exit_code.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// Says on standard error why a command cannot be carried out; returns the program's exit code.
inline int refuse(ExitCode code, const Failure& failure) {
  fmt::print(stderr, "merestone: {}\n", failure.message);
  return static_cast<int>(code);
}

}  // namespace merestone
