#include "cli/check_tally.hpp"

namespace merestone {

Counts& Counts::operator+=(const Counts& other) {
  established += other.established;
  not_established += other.not_established;
  over_limit += other.over_limit;
  return *this;
}

void Tally::add(const CheckedClaim& checked) {
  Counts& counts = counts_[checked.claim->statement.index()][checked.claim->by.index()];
  if (std::holds_alternative<Established>(checked.outcome)) ++counts.established;
  if (std::holds_alternative<NotEstablished>(checked.outcome)) ++counts.not_established;
  if (std::holds_alternative<OverLimit>(checked.outcome)) ++counts.over_limit;
}

void Tally::add(const Tally& other) {
  for (std::size_t s = 0; s < kStatementKinds; ++s)
    for (std::size_t r = 0; r < kRuleKinds; ++r) counts_[s][r] += other.counts_[s][r];
}

const Counts& Tally::of(StatementKind statement, RuleKind rule) const {
  return counts_[static_cast<std::size_t>(statement)][static_cast<std::size_t>(rule)];
}

Counts Tally::total() const {
  Counts sum;
  for (const auto& row : counts_)
    for (const Counts& counts : row) sum += counts;
  return sum;
}

}  // namespace merestone
