#include "format/rule_json.hpp"

#include <limits>
#include <string>
#include <variant>

#include "format/claim_json.hpp"
#include "format/region_json.hpp"
#include "format/shown.hpp"
#include "format/strict_object.hpp"
#include "kernel/work.hpp"

namespace merestone {

namespace {

using nlohmann::json;

constexpr std::uint64_t kLeastBits = 2;
constexpr std::uint64_t kMostBits = std::numeric_limits<std::uint32_t>::max();
constexpr std::size_t kMostWitnesses = 2;
constexpr std::uint64_t kLongestPreperiodic = 1'000'000;  // preperiod and period each

struct HintsToJson {
  json& out;
  StatementKind statement;

  void operator()(const Escape& by) const {
    // A count has its index in the statement; one that stood here too would be written, and refused by every reader.
    if (statement != StatementKind::count || by.index != 0) out["index"] = by.index;
    out["bits"] = by.bits;
  }
  void operator()(const AttractingDisc& by) const {
    out["period"] = by.period;
    out["disc"] = to_json(by.disc);
    out["bits"] = by.bits;
  }
  void operator()(const ClosedForm& by) const { out["period"] = by.period; }
  void operator()(const RealSegment&) const {}
  void operator()(const Preperiodic& by) const {
    out["preperiod"] = by.preperiod;
    out["period"] = by.period;
  }
  void operator()(const ExteriorDisc& by) const {
    out["centre"] = to_json(by.centre);
    out["index"] = by.index;
    out["bits"] = by.bits;
  }
  void operator()(const InteriorDisc& by) const {
    out["centre"] = to_json(by.centre);
    (*this)(by.cycle);
  }
  void operator()(const IsolatedRoot& by) const { out["bits"] = by.bits; }
  void operator()(const Witnesses& by) const {
    out["witnesses"] = json::array();
    for (const Claim& claim : by.claims) out["witnesses"].push_back(to_json(claim));
  }
  void operator()(const Quarters& by) const {
    out["quarters"] = json::array();
    for (const Rule& rule : by.rules) out["quarters"].push_back(rule_to_json(rule, statement));
  }
};

Result<std::uint32_t> read_small(const json& value, const Place& at, std::string_view key, std::uint64_t least,
                                 std::uint64_t most) {
  const Result<std::uint64_t> count = read_count(value, at, key, least, most);
  if (!count) return count.failure();
  return static_cast<std::uint32_t>(*count);
}

Result<std::uint32_t> read_bits(const json& value, const Place& at) {
  return read_small(value, at, "bits", kLeastBits, kMostBits);
}

Result<Rule> read_escape(const json& value, const Place& at, bool is_count) {
  const auto problem = is_count ? check_keys(value, at, {"rule", "bits"}) : check_keys(value, at, {"rule", "index", "bits"});
  if (problem) return *problem;
  Escape by;
  if (!is_count) {
    const Result<std::uint64_t> index = read_count(value, at, "index", 1);
    if (!index) return index.failure();
    by.index = *index;
  }
  const Result<std::uint32_t> bits = read_bits(value, at);
  if (!bits) return bits.failure();
  by.bits = *bits;
  return Rule(by);
}

// The hints of a cycle, in an object whose keys have been checked.
Result<AttractingDisc> read_cycle(const json& value, const Place& at) {
  const Result<std::uint64_t> period = read_count(value, at, "period", 1);
  if (!period) return period.failure();
  Result<Disc> disc = read_disc(value["disc"], Place(at, "disc"));
  if (!disc) return disc.failure();
  const Result<std::uint32_t> bits = read_bits(value, at);
  if (!bits) return bits.failure();
  return AttractingDisc{*period, std::move(disc.value()), *bits};
}

Result<Rule> read_attracting_disc(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "period", "disc", "bits"})) return *problem;
  Result<AttractingDisc> cycle = read_cycle(value, at);
  if (!cycle) return cycle.failure();
  return Rule(std::move(cycle.value()));
}

Result<Rule> read_interior_disc(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "centre", "period", "disc", "bits"})) return *problem;
  Result<ComplexDyadic> centre = read_centre(value, at);
  if (!centre) return centre.failure();
  Result<AttractingDisc> cycle = read_cycle(value, at);
  if (!cycle) return cycle.failure();
  return Rule(InteriorDisc{std::move(centre.value()), std::move(cycle.value())});
}

Result<Rule> read_exterior_disc(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "centre", "index", "bits"})) return *problem;
  Result<ComplexDyadic> centre = read_centre(value, at);
  if (!centre) return centre.failure();
  const Result<std::uint64_t> index = read_count(value, at, "index", 1);
  if (!index) return index.failure();
  const Result<std::uint32_t> bits = read_bits(value, at);
  if (!bits) return bits.failure();
  return Rule(ExteriorDisc{std::move(centre.value()), *index, *bits});
}

Result<Rule> read_isolated_root(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "bits"})) return *problem;
  const Result<std::uint32_t> bits = read_bits(value, at);
  if (!bits) return bits.failure();
  return Rule(IsolatedRoot{*bits});
}

Result<Rule> read_witnesses(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "witnesses"})) return *problem;
  const Place inner(at, "witnesses");
  Result<std::vector<Claim>> claims = read_claims(value["witnesses"], inner, kMostWitnesses);
  if (!claims) return claims.failure();
  for (std::size_t i = 0; i < claims->size(); ++i) {
    const Claim& claim = (*claims)[i];
    if (claim.request) return Place(inner, i).fault("a witness has no request");
    if (std::holds_alternative<Straddles>(claim.statement)) return Place(inner, i).fault("a witness does not straddle");
  }
  return Rule(Witnesses{std::move(claims.value())});
}

Result<Rule> read_nested_rule(const json& value, const Place& at, StatementKind statement, int depth);

Result<Rule> read_quarters(const json& value, const Place& at, StatementKind statement, int depth) {
  if (auto problem = check_keys(value, at, {"rule", "quarters"})) return *problem;
  const Place inner(at, "quarters");
  const json& rules = value["quarters"];
  if (depth == kDeepestRule)
    return inner.fault("quarters are nested at most " + std::to_string(kDeepestRule) + " deep");
  if (!rules.is_array() || rules.size() != 4) return inner.fault("an array of 4 rules should stand here");
  Quarters quarters;
  for (std::size_t i = 0; i < rules.size(); ++i) {
    Result<Rule> rule = read_nested_rule(rules[i], Place(inner, i), statement, depth + 1);
    if (!rule) return rule.failure();
    quarters.rules.push_back(std::move(rule.value()));
  }
  return Rule(std::move(quarters));
}

Result<Rule> read_closed_form(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "period"})) return *problem;
  const Result<std::uint32_t> period = read_small(value, at, "period", 1, 2);
  if (!period) return period.failure();
  return Rule(ClosedForm{*period});
}

Result<Rule> read_preperiodic(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "preperiod", "period"})) return *problem;
  const Result<std::uint32_t> preperiod = read_small(value, at, "preperiod", 0, kLongestPreperiodic);
  if (!preperiod) return preperiod.failure();
  const Result<std::uint32_t> period = read_small(value, at, "period", 1, kLongestPreperiodic);
  if (!period) return period.failure();
  return Rule(Preperiodic{*preperiod, *period});
}

Result<RuleKind> read_kind(const json& value, const Place& at, StatementKind statement) {
  const Result<std::string> name = read_text(value, at, "rule");
  if (!name) return name.failure();
  const auto kind = rule_kind(*name);
  if (kind && admits(statement, *kind)) return *kind;
  std::string admitted;
  for (std::size_t i = 0; i < kRuleKinds; ++i)
    if (const auto other = static_cast<RuleKind>(i); admits(statement, other))
      admitted += (admitted.empty() ? "" : ", ") + std::string(name_of(other));
  return Place(at, "rule").fault((kind ? "the rule " : "unknown rule ") + shown(*name) +
                                 (kind ? " does not prove the claim " : "; the rules for the claim ") +
                                 shown(name_of(statement)) + (kind ? "; the rules that do are " : " are ") + admitted);
}

Result<Rule> read_nested_rule(const json& value, const Place& at, StatementKind statement, int depth) {
  const Result<RuleKind> kind = read_kind(value, at, statement);
  if (!kind) return kind.failure();
  switch (*kind) {
    case RuleKind::escape:
      return read_escape(value, at, statement == StatementKind::count);
    case RuleKind::attracting_disc:
      return read_attracting_disc(value, at);
    case RuleKind::closed_form:
      return read_closed_form(value, at);
    case RuleKind::preperiodic:
      return read_preperiodic(value, at);
    case RuleKind::exterior_disc:
      return read_exterior_disc(value, at);
    case RuleKind::interior_disc:
      return read_interior_disc(value, at);
    case RuleKind::isolated_root:
      return read_isolated_root(value, at);
    case RuleKind::witnesses:
      return read_witnesses(value, at);
    case RuleKind::quarters:
      return read_quarters(value, at, statement, depth);
    case RuleKind::real_segment:
      break;
  }
  if (auto problem = check_keys(value, at, {"rule"})) return *problem;
  return Rule(RealSegment{});
}

}  // namespace

json rule_to_json(const Rule& rule, StatementKind statement) {
  json out = {{"rule", name_of(rule)}};
  std::visit(HintsToJson{out, statement}, rule);
  return out;
}

Result<Rule> read_rule(const json& value, const Place& at, StatementKind statement) {
  return read_nested_rule(value, at, statement, 0);
}

}  // namespace merestone
