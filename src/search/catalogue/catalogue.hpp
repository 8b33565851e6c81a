#pragma once
#include <cstdint>
#include <functional>
#include <optional>
#include <vector>

#include "search/catalogue/prove_component.hpp"

namespace merestone {

/// Which components are looked for. The same options give the same catalogue, whatever the number of threads.
struct CatalogueOptions {
  std::optional<int> resolution;      // those of a conformal radius of at least 2^-resolution, as far as they are found
  std::uint32_t complete_to = 0;      // and all up to this period, at most kLongestCompletePeriod
  std::uint32_t max_period = 20'000;  // of the former
  double left_out = 0.1;              // of each area by using few coefficients, in units of 4^-resolution
};

inline constexpr std::uint32_t kLongestCompletePeriod = 20;
inline constexpr int kFinestResolution = 20;

/// How far it has got.
struct CatalogueProgress {
  std::size_t scanned = 0, rows = 0;       // of the grid
  std::size_t candidates = 0, proved = 0;  // components
};

/// Finds hyperbolic components on or above the real axis - primitive ones from a grid, satellites from their parents -
/// and has the kernel establish each; candidates that it does not establish are dropped. In canonical order, strictly
/// increasing by (re, im). Uses the threads of oneTBB.
/// `go_on` is called now and then, from any of the threads; when it returns false, what has been proved so far is
/// returned.
std::vector<CatalogueEntry> catalogue(const CatalogueOptions& options,
                                      const std::function<bool(const CatalogueProgress&)>& go_on);

/// Does the catalogue have every nucleus of the period? A proof by counting (Lemma A2), if check_distinct holds for it.
bool is_complete_at(std::uint32_t period, const std::vector<CatalogueEntry>& entries);

}  // namespace merestone
