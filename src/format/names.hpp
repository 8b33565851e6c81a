#pragma once
#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <variant>

#include "kernel/claim.hpp"

namespace merestone {

// The words that certificates use for the alternatives of Statement and Rule.

std::string_view name_of(const Statement& statement);
std::string_view name_of(const Rule& rule);

enum class StatementKind { outside, inside, member, count, straddles, nucleus, misiurewicz };
enum class RuleKind {
  escape, attracting_disc, closed_form, real_segment, preperiodic, exterior_disc, interior_disc, isolated_root, witnesses,
  quarters
};
inline constexpr std::size_t kStatementKinds = std::variant_size_v<Statement>;
inline constexpr std::size_t kRuleKinds = std::variant_size_v<Rule>;

std::string_view name_of(StatementKind kind);
std::string_view name_of(RuleKind kind);
StatementKind kind_of(const Statement& statement);
RuleKind kind_of(const Rule& rule);

/// Empty for a word that names none.
std::optional<StatementKind> statement_kind(std::string_view name);
std::optional<RuleKind> rule_kind(std::string_view name);

/// "outside, inside, …", for messages.
std::string all_statement_names();

/// Does the format admit the rule as a proof of the statement?
bool admits(StatementKind statement, RuleKind rule);

}  // namespace merestone
