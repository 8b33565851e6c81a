#pragma once
#include <CLI/CLI.hpp>
#include <optional>
#include <string>
#include <utility>

#include "cover/area_request.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// The words of `merestone area`, as typed.
struct AreaWords {
  std::pair<std::string, std::string> within;  // two corners
  std::optional<unsigned> depth;
  std::optional<double> seconds;
  std::optional<int> resolution;
  std::string rules = "all";
  std::string out;
  bool resume = false, outline = false, json = false;
  std::string picture;
  unsigned pixels = 1600;
  std::string lanes;
  unsigned threads = 0;
};

/// Adds the command to the program; `words` must outlive the parsing.
CLI::App* add_area_command(CLI::App& program, AreaWords& words);

/// The words, read and checked.
Result<AreaRequest> read_area_words(const AreaWords& words);

/// The box between two opposite corners, as typed; `command` is named in a fault.
Result<RationalBox> read_box(const std::string& command, const std::pair<std::string, std::string>& corners);
/// Refuses a name that does not end in .mere.
std::optional<Failure> check_container_name(const std::string& path);

}  // namespace merestone
