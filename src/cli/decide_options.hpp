#pragma once
#include <CLI/CLI.hpp>
#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "kernel/result.hpp"
#include "search/verdict.hpp"

namespace merestone {

/// What --expect asks of every parameter or region.
enum class Expectation { outside, inside, member, straddles };

/// The words of `merestone decide`, as typed.
struct DecideWords {
  std::vector<std::string> points;
  std::vector<std::pair<std::string, std::string>> boxes, discs;  // two corners; centre and radius
  std::string list;
  std::string bailout = "2";
  SearchLimits limits;
  std::string rules = "all";
  std::string expect;
  std::optional<unsigned> depth;  // cut the one box into cells
  std::string out;
  bool resume = false;
  bool json = false, quiet = false;
  unsigned threads = 0;
};

/// Adds the command to the program; `words` must outlive the parsing.
CLI::App* add_decide_command(CLI::App& program, DecideWords& words);

/// The words, read and checked.
struct DecideRequest {
  DecideOptions options;
  std::optional<Expectation> expect;
};
Result<DecideRequest> read_decide_words(const DecideWords& words);

}  // namespace merestone
