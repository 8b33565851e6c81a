#pragma once
#include <optional>

#include "kernel/component_area.hpp"
#include "search/catalogue/approx_component.hpp"

namespace merestone {

/// A hyperbolic component that the kernel established. Whether it is a satellite is not proved.
struct CatalogueEntry {
  Component component;
  ComponentArea proved;
  bool appears_satellite = false;
};

/// Establishes the component with as many coefficients as leave about `rest` of its area out, and more precision where
/// the bound falls short of what is expected. Nothing when the kernel does not follow.
std::optional<CatalogueEntry> prove_component(const ApproxComponent& component, double rest);

}  // namespace merestone
