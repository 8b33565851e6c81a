#pragma once
#include <array>
#include <cstddef>
#include <cstdint>

#include "format/names.hpp"
#include "kernel/outcome.hpp"

namespace merestone {

/// A claim, where it stands in its certificate (from 0), and what became of it.
struct CheckedClaim {
  std::uint64_t position = 0;
  const Claim* claim = nullptr;
  Outcome outcome = NotEstablished{"it was not looked at"};
};

/// How many claims met which fate.
struct Counts {
  std::uint64_t established = 0, not_established = 0, over_limit = 0;

  std::uint64_t all() const { return established + not_established + over_limit; }
  Counts& operator+=(const Counts& other);
};

/// Counts by statement and rule.
class Tally {
 public:
  void add(const CheckedClaim& checked);
  void add(const Tally& other);

  const Counts& of(StatementKind statement, RuleKind rule) const;
  Counts total() const;

 private:
  std::array<std::array<Counts, kRuleKinds>, kStatementKinds> counts_{};
};

}  // namespace merestone
