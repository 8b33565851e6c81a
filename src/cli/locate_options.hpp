#pragma once
#include <CLI/CLI.hpp>
#include <string>
#include <utility>

#include "kernel/result.hpp"
#include "kernel/shape.hpp"
#include "search/locate.hpp"

namespace merestone {

/// The words of `merestone locate`, as typed.
struct LocateWords {
  std::pair<std::string, std::string> box, disc;  // two corners; centre and radius
  std::string kind = "both";
  unsigned digits = 20;
  LocateOptions options;
  std::string out;
  bool json = false;
};

/// Adds the command to the program; `words` must outlive the parsing.
CLI::App* add_locate_command(CLI::App& program, LocateWords& words);

/// The words, read and checked.
struct LocateRequest {
  std::string typed;  // the region, as a certificate's request has it
  Shape region;
  LocateOptions options;
};
Result<LocateRequest> read_locate_words(const LocateWords& words);

}  // namespace merestone
