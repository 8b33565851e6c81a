#pragma once
#include <string>

#include "search/catalogue/catalogue.hpp"

namespace merestone {

/// How components are written: a table, comma-separated values, or a JSON object a line.
enum class ComponentsForm { table, csv, json };

/// The lines above the components; empty where there are none.
std::string components_heading(ComponentsForm form, int digits);

/// A component on one line, with at most so many significant decimals. Ends in a newline.
std::string component_line(const CatalogueEntry& entry, ComponentsForm form, int digits);

/// What all of them are together.
struct ComponentsTotal {
  std::size_t listed = 0;  // on or above the real axis
  std::uint64_t all = 0;   // in the plane
  Dyadic area;             // lower bound, mirror images counted
  std::uint32_t complete_to = 0;

  static ComponentsTotal of(const std::vector<CatalogueEntry>& entries, std::uint32_t complete_to);
};

/// Empty for comma-separated values.
std::string total_lines(const ComponentsTotal& total, ComponentsForm form, int digits);

}  // namespace merestone
