#include "cli/shared_manual.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <vector>

#include "cli/shared_completion.hpp"

namespace merestone {

namespace {

// Text as the formatter of manual pages takes it: a backslash and a leading point or quote are its own marks, and a
// plain hyphen may become a typographic one.
std::string roff(std::string_view text) {
  std::string out;
  bool at_line_start = true;
  for (const char c : text) {
    if (at_line_start && (c == '.' || c == '\'')) out += "\\&";
    at_line_start = c == '\n';
    if (c == '\\')
      out += "\\e";
    else if (c == '-')
      out += "\\-";
    else
      out += c;
  }
  return out;
}

std::string option_head(const CLI::Option& option) {
  if (!option.nonpositional()) return "\\fI" + roff(option.get_name(true)) + "\\fR";
  std::string names;
  for (const std::string& name : option_words(option)) names += (names.empty() ? "" : ", ") + roff(name);
  const std::string value = option_value(option);
  return "\\fB" + names + "\\fR" + (value.empty() ? "" : " \\fI" + roff(value) + "\\fR");
}

std::string option_paragraph(const CLI::Option& option) {
  const std::string preset = option.get_default_str().empty() ? "" : " (default " + option.get_default_str() + ")";
  return ".TP\n" + option_head(option) + "\n" + roff(option.get_description() + preset) + ".\n";
}

std::string options_section(const CLI::App& app) {
  std::string out;
  for (const CLI::Option* option : app.get_options()) out += option_paragraph(*option);
  return out;
}

std::string preformatted(const std::string& title, const std::string& text) {
  if (text.empty()) return {};
  return fmt::format(".SH {}\n.nf\n{}\n.fi\n", title, roff(text));
}

std::string manual_page(const CLI::App& program) {
  const std::string name = program.get_name();
  std::string upper = name;
  std::transform(upper.begin(), upper.end(), upper.begin(), [](char c) { return c >= 'a' && c <= 'z' ? static_cast<char>(c - 32) : c; });
  std::string page = fmt::format(".TH {} 1 \"\" \"{}\" \"User Commands\"\n.SH NAME\n{} \\- {}\n", upper, name, roff(name),
                                 roff(first_sentence(program.get_description())));
  page += fmt::format(".SH SYNOPSIS\n.B {}\n[\\fIoptions\\fR] \\fI...\\fR\n.SH DESCRIPTION\n{}\n.SH OPTIONS\n{}", roff(name),
                      roff(program.get_description()), options_section(program));
  for (const CLI::App* command : commands_of(program)) {
    std::string title = command->get_name();
    page += fmt::format(".SH COMMAND {}\n{}.\n{}", roff(title), roff(command->get_description()), options_section(*command));
    page += preformatted("NOTES ON " + roff(title), command->get_footer());
  }
  return page + preformatted("NOTES", program.get_footer());
}

}  // namespace

std::string manual(const CLI::App& program, ManualFormat format) {
  switch (format) {
    case ManualFormat::bash:
      return bash_completion(program);
    case ManualFormat::zsh:
      return zsh_completion(program);
    case ManualFormat::fish:
      return fish_completion(program);
    case ManualFormat::man:
      break;
  }
  return manual_page(program);
}

}  // namespace merestone
