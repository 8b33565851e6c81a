#pragma once
#include <CLI/CLI.hpp>
#include <cstdint>

#include "search/catalogue/catalogue.hpp"

namespace merestone {

/// The words of `merestone components`, as typed.
struct ComponentsWords {
  std::uint32_t max_period = 0;  // 0: not given
  int resolution = 0;            // 0: not given
  std::uint64_t most = 0;        // 0: all
  int digits = 15;
  unsigned threads = 0;  // 0: as many as allowed
  bool csv = false, json = false;
};

/// Adds the command to the program; `words` must outlive the parsing.
CLI::App* add_components_command(CLI::App& program, ComponentsWords& words);

/// What the words ask for.
CatalogueOptions read_components_words(const ComponentsWords& words);

}  // namespace merestone
