#pragma once
#include <cstdint>
#include <set>
#include <string>

#include "cli/check_notation.hpp"
#include "cli/check_tally.hpp"
#include "format/digest.hpp"

namespace merestone {

/// An established claim as a paper can quote it: statement, what follows for the request, proof with theorems cited.
struct Quote {
  std::uint64_t position = 0;
  std::string sentences, lemmas;
  std::set<Source> cited;
};

/// Requires that the claim was established.
Quote quote_of(const CheckedClaim& checked, StatementForm form);

/// What the sentences take as known; stands once before them.
std::string definitions(StatementForm form);
/// The quote as a paragraph that ends with where its proof is found.
std::string quote_paragraph(const Quote& quote, const std::string& path, const Sha256& digest, StatementForm form);
/// The sources that were cited, once after everything.
std::string bibliography(const std::set<Source>& sources, StatementForm form);

}  // namespace merestone
