#pragma once
#include "search/verdict.hpp"

namespace merestone {

/// Decides one parameter: closed forms and special points exactly, then tracked double precision, then disc enclosures
/// of 128, 256, … bits up to the limit. Every Proof is a proof: it was established with enclosures.
/// Undecided names the limit that ended the attempt.
Verdict decide_point(const ComplexRational& c, const DecideOptions& options);

}  // namespace merestone
