#pragma once
#include <string>

namespace merestone {

/// A lemma of docs/proofs.md by its number and what it rests on: "E1 (radius-2 criterion)". A number that is not known
/// here stands alone.
std::string lemma_in_words(const std::string& number);

}  // namespace merestone
