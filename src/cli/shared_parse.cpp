#include "cli/shared_parse.hpp"

#include <algorithm>
#include <cstdio>

namespace merestone {

namespace {

// The command that the words had reached, for the hint at its help.
std::string command_words(const CLI::App& program) {
  std::string words = program.get_name();
  for (const CLI::App* command : program.get_subcommands()) words += " " + command->get_name();
  return words;
}

std::string one_line(std::string text) {
  std::replace(text.begin(), text.end(), '\n', ' ');
  return text;
}

}  // namespace

std::optional<ExitCode> parse_words(CLI::App& program, std::vector<std::string> words) {
  std::reverse(words.begin(), words.end());  // the library takes them from the back
  try {
    program.parse(std::move(words));
  } catch (const CLI::ParseError& outcome) {
    if (outcome.get_exit_code() == 0) {  // help or version
      program.exit(outcome);
      return std::fflush(stdout) == 0 ? ExitCode::established : ExitCode::io_failed;
    }
    std::fprintf(stderr, "%s: %s; '%s --help' explains\n", program.get_name().c_str(), one_line(outcome.what()).c_str(),
                 command_words(program).c_str());
    return ExitCode::malformed;
  }
  return std::nullopt;
}

}  // namespace merestone
