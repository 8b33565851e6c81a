#pragma once
#include <CLI/CLI.hpp>
#include <string>
#include <vector>

namespace merestone {

// What manual pages and completions ask of the tree of commands and options.

/// "-q", "--quiet": the option's words with their dashes.
std::vector<std::string> option_words(const CLI::Option& option);
/// What stands for the option's value in a synopsis, such as FILE; empty for a flag.
std::string option_value(const CLI::Option& option);
std::vector<const CLI::App*> commands_of(const CLI::App& program);
/// The text up to its first full stop or line end.
std::string first_sentence(const std::string& text);

std::string bash_completion(const CLI::App& program);
std::string zsh_completion(const CLI::App& program);
std::string fish_completion(const CLI::App& program);

}  // namespace merestone
