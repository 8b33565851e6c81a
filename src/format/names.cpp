#include "format/names.hpp"

#include <array>
#include <cstddef>
#include <type_traits>
#include <variant>

namespace merestone {

namespace {

// In the order of the alternatives of the variants, which the assertions below hold fast.
constexpr std::array<std::string_view, kStatementKinds> kStatementNames = {"outside",   "inside",  "member",     "count",
                                                                           "straddles", "nucleus", "misiurewicz"};
constexpr std::array<std::string_view, kRuleKinds> kRuleNames = {
    "escape",        "attracting-disc", "closed-form",   "real-segment", "preperiodic",
    "exterior-disc", "interior-disc",   "isolated-root", "witnesses",    "quarters"};

static_assert(std::is_same_v<std::variant_alternative_t<0, Statement>, Outside>);
static_assert(std::is_same_v<std::variant_alternative_t<1, Statement>, Inside>);
static_assert(std::is_same_v<std::variant_alternative_t<2, Statement>, Member>);
static_assert(std::is_same_v<std::variant_alternative_t<3, Statement>, Count>);
static_assert(std::is_same_v<std::variant_alternative_t<4, Statement>, Straddles>);
static_assert(std::is_same_v<std::variant_alternative_t<5, Statement>, Nucleus>);
static_assert(std::is_same_v<std::variant_alternative_t<6, Statement>, Misiurewicz>);
static_assert(std::is_same_v<std::variant_alternative_t<0, Rule>, Escape>);
static_assert(std::is_same_v<std::variant_alternative_t<1, Rule>, AttractingDisc>);
static_assert(std::is_same_v<std::variant_alternative_t<2, Rule>, ClosedForm>);
static_assert(std::is_same_v<std::variant_alternative_t<3, Rule>, RealSegment>);
static_assert(std::is_same_v<std::variant_alternative_t<4, Rule>, Preperiodic>);
static_assert(std::is_same_v<std::variant_alternative_t<5, Rule>, ExteriorDisc>);
static_assert(std::is_same_v<std::variant_alternative_t<6, Rule>, InteriorDisc>);
static_assert(std::is_same_v<std::variant_alternative_t<7, Rule>, IsolatedRoot>);
static_assert(std::is_same_v<std::variant_alternative_t<8, Rule>, Witnesses>);
static_assert(std::is_same_v<std::variant_alternative_t<9, Rule>, Quarters>);

template <class Kind, std::size_t N>
std::optional<Kind> find(const std::array<std::string_view, N>& names, std::string_view name) {
  for (std::size_t i = 0; i < N; ++i)
    if (names[i] == name) return static_cast<Kind>(i);
  return std::nullopt;
}

}  // namespace

std::string_view name_of(StatementKind kind) { return kStatementNames[static_cast<std::size_t>(kind)]; }
std::string_view name_of(RuleKind kind) { return kRuleNames[static_cast<std::size_t>(kind)]; }
StatementKind kind_of(const Statement& statement) { return static_cast<StatementKind>(statement.index()); }
RuleKind kind_of(const Rule& rule) { return static_cast<RuleKind>(rule.index()); }
std::string_view name_of(const Statement& statement) { return name_of(kind_of(statement)); }
std::string_view name_of(const Rule& rule) { return name_of(kind_of(rule)); }

std::optional<StatementKind> statement_kind(std::string_view name) { return find<StatementKind>(kStatementNames, name); }
std::optional<RuleKind> rule_kind(std::string_view name) { return find<RuleKind>(kRuleNames, name); }

std::string all_statement_names() {
  std::string text;
  for (const std::string_view name : kStatementNames) text += (text.empty() ? "" : ", ") + std::string(name);
  return text;
}

bool admits(StatementKind statement, RuleKind rule) {
  switch (statement) {
    case StatementKind::outside:
      return rule == RuleKind::escape || rule == RuleKind::real_segment || rule == RuleKind::exterior_disc ||
             rule == RuleKind::quarters;
    case StatementKind::inside:
      return rule == RuleKind::attracting_disc || rule == RuleKind::closed_form || rule == RuleKind::interior_disc ||
             rule == RuleKind::quarters;
    case StatementKind::member:
      return rule == RuleKind::closed_form || rule == RuleKind::real_segment || rule == RuleKind::preperiodic;
    case StatementKind::count:
      return rule == RuleKind::escape;
    case StatementKind::straddles:
      return rule == RuleKind::witnesses;
    case StatementKind::nucleus:
    case StatementKind::misiurewicz:
      return rule == RuleKind::isolated_root;
  }
  return false;
}

}  // namespace merestone
