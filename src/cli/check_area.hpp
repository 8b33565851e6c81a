#pragma once
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "format/area_container.hpp"
#include "kernel/check.hpp"

namespace merestone {

/// How an area container is checked.
struct AreaCheckOptions {
  Limits limits;
  bool exact = false;      // everything in balls
  std::uint64_t seed = 0;  // of the marks that are established in balls too
  unsigned threads = 1;
  std::function<void(std::uint64_t blocks)>
      report;  // called with the blocks dealt with so far, by one thread at a time
};

/// What came out for an area container.
struct AreaVerdict {
  AreaHeader claimed;
  std::optional<Dyadic> at_least, at_most;  // as computed here, from what is established; at_most needs every block
  std::uint64_t blocks = 0, absent = 0, components = 0;
  std::vector<std::pair<std::uint64_t, std::uint64_t>>
      absent_runs;  // the first and last of each stretch of absent blocks; the first ones
  std::uint64_t outside_marks = 0, inside_marks = 0, sampled = 0, fallbacks = 0;
  std::vector<std::string> failures;  // what is not established; the first ones
  std::uint64_t failed = 0;
  std::optional<std::string> over_limit;  // what was refused, and how to raise the limit
  std::optional<AreaEnd> end;             // of a container that is whole
  std::optional<ReadFault> fault;         // of one that is not
};

/// Computes both bounds anew from the container's blocks (Lemmas A1, A2), on so many threads, in bounded memory.
AreaVerdict check_area(AreaReader reader, const AreaCheckOptions& options);

}  // namespace merestone
