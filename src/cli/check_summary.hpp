#pragma once
#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "cli/check_source.hpp"
#include "cli/exit_code.hpp"
#include "format/read_fault.hpp"

namespace merestone {

/// A sample that was drawn.
struct Sample {
  std::uint64_t size = 0, seed = 0;
  bool fresh = false;  // nobody chose the seed
};

/// What came out for one file.
struct FileSummary {
  std::string path;
  Tally tally;
  std::vector<std::string> failures;  // the first ones, a line each
  std::optional<CertificateEnd> end;  // of a certificate that is whole
  std::optional<ReadFault> fault;     // of one that is not
  std::optional<Sample> sample;
};

/// Failures that a report for people lists.
inline constexpr std::size_t kMostFailuresListed = 20;

/// How many more there are.
std::uint64_t failures_unlisted(const FileSummary& summary);

/// The exit code that the file calls for. Requires that it has an end or a fault.
ExitCode exit_code_of(const FileSummary& summary);

/// The word for a fault: "malformed", "newer", "input".
std::string_view fault_word(const ReadFault& fault);

}  // namespace merestone
