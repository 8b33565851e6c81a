#pragma once
#include <string>

#include "cli/check_options.hpp"
#include "cli/check_report.hpp"
#include "cli/exit_code.hpp"

namespace merestone {

/// Checks one file, "-" for standard input, and reports on it. `threads` is at least 1. When the output fails the check
/// ends there.
ExitCode check_file(const std::string& path, const CheckWords& words, unsigned threads, Console& console);

}  // namespace merestone
