#pragma once
#include <string>

#include "cli/check_summary.hpp"
#include "cli/check_tally.hpp"

namespace merestone {

// The report for people.

/// Which program says it; stands once before everything.
std::string program_in_words();
/// What the words of claims mean; stands once before the first of them.
std::string notation_in_words();

/// A claim with everything that was established about it.
std::string claim_paragraph(const CheckedClaim& checked);
/// A claim that was not established or refused, and why, on one line.
std::string failure_line(const CheckedClaim& checked);

/// What was counted in a file, by statement and rule, with its first failures.
std::string summary_paragraph(const FileSummary& summary);
/// The sample and the digest, for a certificate that is whole.
std::string identity_paragraph(const FileSummary& summary);
/// The line that ends the report on a file.
std::string verdict_line(const FileSummary& summary);

}  // namespace merestone
