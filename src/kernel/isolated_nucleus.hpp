#pragma once
#include <cstdint>
#include <variant>

#include "kernel/disc_enclosure.hpp"
#include "kernel/outcome.hpp"

namespace merestone {

/// What Lemma P2 shows of an equation g = 0 with exactly one root in a disc about a.
struct IsolatedBy {
  DiscEnclosure value;  // encloses g(a)
  DiscEnclosure slope;  // encloses g' over the disc
  Dyadic steepness;     // kappa > 0: for each c of the disc the root is within |g(c)| / kappa
  Dyadic distance;      // of the root from the centre, at most
};

/// Shows that exactly one nucleus of exact period `period` lies in the disc (Lemma P2, with g = z_period). It is real
/// if the centre is. On failure: which inequality was not shown.
std::variant<IsolatedBy, NotEstablished> isolate_nucleus(const Disc& disc, std::uint64_t period, slong bits);

}  // namespace merestone
