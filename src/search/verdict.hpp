#pragma once
#include <cstdint>
#include <variant>

#include "kernel/claim.hpp"

namespace merestone {

/// How far the search for a proof may go.
struct SearchLimits {
  std::uint64_t iterations = 10'000'000;  // steps of an orbit
  std::uint32_t bits = 16'384;            // working precision
  double seconds = 60;                    // for one parameter or region
  std::uint64_t cells = 20'000;           // into which a region is cut
};

/// Which rules the search may use: elementary ones need nothing but arithmetic, the radius-2 criterion, attracting
/// cycles and nuclei; the others rest on the theory of univalent functions, or on that of repelling cycles.
enum class Rules { all, elementary };

struct DecideOptions {
  Dyadic bailout = Dyadic(2.0);
  SearchLimits limits;
  Rules rules = Rules::all;
};

/// The bits of a proof that was found in tracked double precision (Lemma E4); proofs over disc enclosures have more.
inline constexpr std::uint32_t kDoubleBits = 53;

/// A proved statement about the parameter, with the rule and hints that prove it.
struct Proof {
  Statement statement;
  Rule by;
};

enum class Limit { iterations, precision, time, cells, depth };

/// Nothing was proved; which limit ended the attempt, and where it stood.
struct Undecided {
  Limit limit = Limit::iterations;
  std::uint64_t iterations = 0;  // steps made at the last precision
  std::uint32_t bits = kDoubleBits;       // the last precision
  std::uint64_t cells = 0;                // into which the region was cut
};

using Verdict = std::variant<Proof, Undecided>;

}  // namespace merestone
