#pragma once
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "kernel/exact.hpp"

namespace merestone {

/// A number that the proof established, enclosed: lower <= it <= upper, a missing end says nothing.
struct Figure {
  std::string name;
  std::optional<Dyadic> lower, upper;
};

/// The claim holds. What was established on the way, and the lemmas of docs/proofs.md that it rests on.
struct Established {
  std::vector<Figure> figures;
  std::vector<std::string> lemmas;
};

/// The claim was not established: which inequality failed. Says nothing about its truth.
struct NotEstablished {
  std::string reason;
};

/// The work that the claim implies exceeds the limits; nothing was tried.
struct OverLimit {
  std::string reason;
};

using Outcome = std::variant<Established, NotEstablished, OverLimit>;

}  // namespace merestone
