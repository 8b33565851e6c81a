#pragma once
#include <string>

#include "cli/check_summary.hpp"
#include "cli/check_tally.hpp"

namespace merestone {

// The report for programs: JSON objects, each a line with its line feed.

/// A claim and what became of it.
std::string claim_object(const std::string& path, const CheckedClaim& checked);
/// The object that ends the report on a file.
std::string file_object(const FileSummary& summary);

}  // namespace merestone
