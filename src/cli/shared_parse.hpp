#pragma once
#include <CLI/CLI.hpp>
#include <optional>
#include <string>
#include <vector>

#include "cli/exit_code.hpp"

namespace merestone {

/// Parses the words into what the program's options are bound to. When that ends the run - help or version was asked
/// for and printed, or the words are wrong, which one line on standard error says - returns the exit code.
std::optional<ExitCode> parse_words(CLI::App& program, std::vector<std::string> words);

}  // namespace merestone
