#include "format/rule_json.hpp"

#include <limits>
#include <string>
#include <variant>

#include "format/region_json.hpp"
#include "format/shown.hpp"
#include "format/strict_object.hpp"

namespace merestone {

namespace {

using nlohmann::json;

constexpr std::uint64_t kLeastBits = 2;
constexpr std::uint64_t kMostBits = std::numeric_limits<std::uint32_t>::max();
constexpr std::uint64_t kLongestPreperiodic = 1'000'000;  // preperiod and period each

struct HintsToJson {
  json& out;
  bool is_count;

  void operator()(const Escape& by) const {
    // A count has its index in the statement; one that stood here too would be written, and refused by every reader.
    if (!is_count || by.index != 0) out["index"] = by.index;
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
};

Result<std::uint32_t> read_small(const json& value, const Place& at, std::string_view key, std::uint64_t least,
                                 std::uint64_t most) {
  const Result<std::uint64_t> count = read_count(value, at, key, least, most);
  if (!count) return count.failure();
  return static_cast<std::uint32_t>(*count);
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
  const Result<std::uint32_t> bits = read_small(value, at, "bits", kLeastBits, kMostBits);
  if (!bits) return bits.failure();
  by.bits = *bits;
  return Rule(by);
}

Result<Rule> read_attracting_disc(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"rule", "period", "disc", "bits"})) return *problem;
  const Result<std::uint64_t> period = read_count(value, at, "period", 1);
  if (!period) return period.failure();
  Result<Disc> disc = read_disc(value["disc"], Place(at, "disc"));
  if (!disc) return disc.failure();
  const Result<std::uint32_t> bits = read_small(value, at, "bits", kLeastBits, kMostBits);
  if (!bits) return bits.failure();
  return Rule(AttractingDisc{*period, std::move(disc.value()), *bits});
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

}  // namespace

json rule_to_json(const Claim& claim) {
  json out = {{"rule", name_of(claim.by)}};
  std::visit(HintsToJson{out, std::holds_alternative<Count>(claim.statement)}, claim.by);
  return out;
}

Result<Rule> read_rule(const json& value, const Place& at, StatementKind statement) {
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
    case RuleKind::real_segment:
      break;
  }
  if (auto problem = check_keys(value, at, {"rule"})) return *problem;
  return Rule(RealSegment{});
}

}  // namespace merestone
