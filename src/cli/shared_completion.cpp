#include "cli/shared_completion.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>

namespace merestone {

namespace {

bool wants_file(const CLI::Option& option) { return option_value(option).find("FILE") != std::string::npos; }

// The words between which a value chooses, "{a,b}" in the value's name; empty when it is free.
std::vector<std::string> choices_of(const CLI::Option& option) {
  const std::string value = option_value(option);
  if (value.size() < 2 || value.front() != '{' || value.back() != '}') return {};
  return CLI::detail::split(value.substr(1, value.size() - 2), ',');
}

std::vector<std::string> words_of(const CLI::App& app) {
  std::vector<std::string> words;
  for (const CLI::Option* option : app.get_options())
    for (const std::string& word : option_words(*option)) words.push_back(word);
  for (const CLI::App* command : commands_of(app)) words.push_back(command->get_name());
  return words;
}

// Single quotes inside a text in single quotes, as the shells of the Bourne family want them.
std::string quoted(const std::string& text) {
  std::string out = "'";
  for (const char c : text) out += c == '\'' ? "'\\''" : std::string(1, c);
  return out + "'";
}

std::string function_name(const CLI::App& program) {
  std::string name = "_" + program.get_name();
  std::replace(name.begin(), name.end(), '-', '_');
  return name;
}

// For the options of one command: what completes the value after each.
std::string bash_values(const CLI::App& app) {
  std::string out;
  for (const CLI::Option* option : app.get_options()) {
    if (option_value(*option).empty() || !option->nonpositional()) continue;
    const std::string words = fmt::format("{}", fmt::join(option_words(*option), "|"));
    const std::vector<std::string> choices = choices_of(*option);
    const std::string how = wants_file(*option) ? "-f" : fmt::format("-W {}", quoted(fmt::format("{}", fmt::join(choices, " "))));
    out += fmt::format("    {}) COMPREPLY=($(compgen {} -- \"$word\")); return ;;\n", words, how);
  }
  return out;
}

std::string zsh_arguments(const CLI::App& app) {
  std::string out;
  for (const CLI::Option* option : app.get_options()) {
    const std::vector<std::string> choices = choices_of(*option);
    const std::string action = wants_file(*option) ? "_files" : choices.empty() ? "" : fmt::format("({})", fmt::join(choices, " "));
    const std::string value = option_value(*option).empty() ? "" : fmt::format(":value:{}", action);
    std::string text = first_sentence(option->get_description());
    for (const char c : {':', '[', ']'}) text.erase(std::remove(text.begin(), text.end(), c), text.end());
    if (!option->nonpositional()) {
      out += fmt::format(" {}", quoted(fmt::format("*:{}:{}", option->get_name(true), action)));
      continue;
    }
    for (const std::string& word : option_words(*option)) out += fmt::format(" \\\n    {}", quoted(fmt::format("{}[{}]{}", word, text, value)));
  }
  return out;
}

std::string fish_lines(const CLI::App& program, const CLI::App& app, const std::string& condition) {
  std::string out;
  for (const CLI::Option* option : app.get_options()) {
    if (!option->nonpositional()) continue;
    std::string line = fmt::format("complete -c {}{}", program.get_name(), condition);
    for (const std::string& word : option_words(*option))
      line += word.substr(0, 2) == "--" ? " -l " + word.substr(2) : " -s " + word.substr(1);
    if (!option_value(*option).empty()) line += wants_file(*option) ? " -r" : " -x";
    if (const auto choices = choices_of(*option); !choices.empty()) line += " -a " + quoted(fmt::format("{}", fmt::join(choices, " ")));
    out += line + " -d " + quoted(first_sentence(option->get_description())) + "\n";
  }
  return out;
}

}  // namespace

std::vector<std::string> option_words(const CLI::Option& option) {
  std::vector<std::string> words;
  for (const std::string& name : option.get_snames()) words.push_back("-" + name);
  for (const std::string& name : option.get_lnames()) words.push_back("--" + name);
  return words;
}

std::string option_value(const CLI::Option& option) {
  if (option.get_items_expected_max() == 0) return {};
  const std::string type = option.get_type_name();
  const std::size_t braces = type.find('{');
  if (braces != type.npos) return type.substr(braces, type.find('}') + 1 - braces);
  return type.substr(0, type.find(':'));
}

std::vector<const CLI::App*> commands_of(const CLI::App& program) {
  return program.get_subcommands([](const CLI::App* command) { return !command->get_name().empty(); });
}

std::string first_sentence(const std::string& text) {
  const std::size_t line = text.find('\n'), stop = text.find(". ");
  return text.substr(0, std::min(line, stop));
}

std::string bash_completion(const CLI::App& program) {
  std::string cases, values = bash_values(program);
  for (const CLI::App* command : commands_of(program)) {
    cases += fmt::format("    {}) words={} ;;\n", command->get_name(), quoted(fmt::format("{}", fmt::join(words_of(*command), " "))));
    values += bash_values(*command);
  }
  return fmt::format(R"(# bash completion for {0}
{1}() {{
  local word="${{COMP_WORDS[COMP_CWORD]}}" before="${{COMP_WORDS[COMP_CWORD-1]}}" words={2}
  COMPREPLY=()
  case "$before" in
{3}  esac
  case "${{COMP_WORDS[1]}}" in
{4}  esac
  COMPREPLY=($(compgen -W "$words" -- "$word"))
}}
complete -o default -F {1} {0}
)",
                     program.get_name(), function_name(program), quoted(fmt::format("{}", fmt::join(words_of(program), " "))),
                     values, cases);
}

std::string zsh_completion(const CLI::App& program) {
  std::string cases, names;
  for (const CLI::App* command : commands_of(program)) {
    cases += fmt::format("    {}) shift words; (( CURRENT-- )); _arguments{} ;;\n", command->get_name(), zsh_arguments(*command));
    names += " " + quoted(command->get_name() + ":" + first_sentence(command->get_description()));
  }
  if (names.empty())
    return fmt::format("#compdef {}\n_arguments{}\n", program.get_name(), zsh_arguments(program));
  return fmt::format(R"(#compdef {}
if (( CURRENT == 2 )) && [[ $words[2] != -* ]]; then
  local -a commands=({})
  _describe command commands
else
  case $words[2] in
{}    *) _arguments{} ;;
  esac
fi
)",
                     program.get_name(), names, cases, zsh_arguments(program));
}

std::string fish_completion(const CLI::App& program) {
  std::string out = fmt::format("# fish completion for {}\n", program.get_name());
  const auto commands = commands_of(program);
  out += fish_lines(program, program, commands.empty() ? "" : " -n __fish_use_subcommand");
  for (const CLI::App* command : commands) {
    out += fmt::format("complete -c {} -n __fish_use_subcommand -f -a {} -d {}\n", program.get_name(), command->get_name(),
                       quoted(first_sentence(command->get_description())));
    out += fish_lines(program, *command, fmt::format(" -n '__fish_seen_subcommand_from {}'", command->get_name()));
  }
  return out;
}

}  // namespace merestone
