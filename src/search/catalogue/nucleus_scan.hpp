#pragma once
#include <cstdint>
#include <vector>

#include "search/catalogue/approx_nucleus.hpp"

namespace merestone {

/// A grid over the upper half of M, and which nuclei are looked for from its points.
struct ScanOptions {
  int places = 9;                     // the grid's step is 2^-places
  double least_size = 0x1p-14;        // of a component
  std::uint32_t max_period = 20'000;  // steps of an orbit
};

/// Rows of the grid: from the real axis up to where M ends.
std::uint32_t scan_rows(const ScanOptions& options);

/// The nuclei to which Newton's method leads from the points of a row: from each point c those of the periods n at
/// which |z_n(c)| is smaller than ever before, if the first step goes no farther than the grid's. Those c form the atom
/// domain of a component, whose size is about the square root of the component's: a coarse grid finds small primitive
/// components. A nucleus may occur several times; satellites are met by chance only.
std::vector<ApproxNucleus> scan_row(std::uint32_t row, const ScanOptions& options);

}  // namespace merestone
