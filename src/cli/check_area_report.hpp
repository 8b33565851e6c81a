#pragma once
#include <string>

#include "cli/check_area.hpp"
#include "cli/check_options.hpp"
#include "cli/check_report.hpp"

namespace merestone {

/// Prints what came out for an area container, in the form that was asked for; the exit code that it calls for.
ExitCode report_area(const std::string& path, const AreaVerdict& verdict, const CheckWords& words, std::uint64_t seed,
                     Console& console);

}  // namespace merestone
