#pragma once
#include <CLI/CLI.hpp>
#include <string>

namespace merestone {

enum class ManualFormat { man, bash, zsh, fish };

/// The word that names each format on the command line.
inline const std::map<std::string, ManualFormat>& manual_formats() {
  static const std::map<std::string, ManualFormat> formats = {
      {"man", ManualFormat::man}, {"bash", ManualFormat::bash}, {"zsh", ManualFormat::zsh}, {"fish", ManualFormat::fish}};
  return formats;
}

/// The manual page, or the completion for a shell, of a program: made from the same tree of commands and options as its
/// --help.
std::string manual(const CLI::App& program, ManualFormat format);

}  // namespace merestone
