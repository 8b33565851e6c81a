#pragma once
#include <CLI/CLI.hpp>
#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "cli/check_notation.hpp"
#include "kernel/check.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// Seeds end here, so that every reader of JSON has them exactly.
inline constexpr std::uint64_t kLargestSeed = (std::uint64_t{1} << 53) - 1;

/// The words of merestone-check, as typed.
struct CheckWords {
  std::vector<std::string> files;
  bool json = false, all = false, quiet = false;
  bool exact = false;                      // areas in balls throughout
  std::optional<StatementForm> statement;  // sentences to quote instead of a report
  Limits limits;                           // of one claim
  unsigned threads = 0;
  std::optional<std::uint64_t> sample, seed;
};

/// Adds the options to the program; `words` must outlive the parsing.
void add_check_options(CLI::App& program, CheckWords& words);

/// The failure when the words do not go together.
std::optional<Failure> problem_of(const CheckWords& words);

}  // namespace merestone
