#include "format/claim_json.hpp"

#include <algorithm>
#include <string>

#include "format/names.hpp"
#include "format/region_json.hpp"
#include "format/rule_json.hpp"
#include "format/shown.hpp"
#include "format/spelling.hpp"
#include "format/strict_object.hpp"
#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

using nlohmann::json;

Result<StatementKind> read_kind(const json& value, const Place& at) {
  const Result<std::string> name = read_text(value, at, "claim");
  if (!name) return name.failure();
  if (const auto kind = statement_kind(*name)) return *kind;
  return Place(at, "claim").fault("unknown claim " + shown(*name) + "; the claims are " + all_statement_names());
}

std::optional<Failure> check_claim_keys(const json& value, const Place& at, StatementKind kind) {
  switch (kind) {
    case StatementKind::count:
      return check_keys(value, at, {"claim", "region", "by", "bailout", "index"}, {"request"});
    case StatementKind::nucleus:
      return check_keys(value, at, {"claim", "region", "by", "period"}, {"request"});
    case StatementKind::misiurewicz:
      return check_keys(value, at, {"claim", "region", "by", "preperiod", "period"}, {"request"});
    default:
      return check_keys(value, at, {"claim", "region", "by"}, {"request"});
  }
}

Result<Statement> read_count_statement(const json& value, const Place& at) {
  const Place bailout_at(at, "bailout");
  Result<Dyadic> bailout = read_dyadic_value(value["bailout"], bailout_at);
  if (!bailout) return bailout.failure();
  if (*bailout < Dyadic(2.0) || *bailout > Dyadic(0x1p60)) return bailout_at.fault("a bailout is from 2 to 2^60");
  const Result<std::uint64_t> index = read_count(value, at, "index", 1);
  if (!index) return index.failure();
  return Statement(Count{std::move(bailout.value()), *index});
}

Result<Statement> read_nucleus(const json& value, const Place& at) {
  const Result<std::uint64_t> period = read_count(value, at, "period", 1);
  if (!period) return period.failure();
  return Statement(Nucleus{*period});
}

Result<Statement> read_misiurewicz(const json& value, const Place& at) {
  const Result<std::uint64_t> preperiod = read_count(value, at, "preperiod", 2);
  if (!preperiod) return preperiod.failure();
  const Result<std::uint64_t> period = read_count(value, at, "period", 1);
  if (!period) return period.failure();
  return Statement(Misiurewicz{*preperiod, *period});
}

Result<Statement> read_statement(const json& value, const Place& at, StatementKind kind) {
  switch (kind) {
    case StatementKind::outside:
      return Statement(Outside{});
    case StatementKind::inside:
      return Statement(Inside{});
    case StatementKind::member:
      return Statement(Member{});
    case StatementKind::straddles:
      return Statement(Straddles{});
    case StatementKind::nucleus:
      return read_nucleus(value, at);
    case StatementKind::misiurewicz:
      return read_misiurewicz(value, at);
    case StatementKind::count:
      break;
  }
  return read_count_statement(value, at);
}

Result<std::optional<std::string>> read_request(const json& value, const Place& at) {
  if (!value.contains("request")) return std::optional<std::string>();
  const Result<std::string> text = read_text(value, at, "request");
  if (!text) return text.failure();
  const bool is_printable = std::all_of(text->begin(), text->end(), [](char c) { return c >= ' ' && c <= '~'; });
  if (!is_printable) return Place(at, "request").fault("a request is printable ASCII");
  return std::optional<std::string>(*text);
}

}  // namespace

json to_json(const Claim& claim) {
  json out = {{"claim", name_of(claim.statement)},
              {"region", to_json(claim.region)},
              {"by", rule_to_json(claim.by, kind_of(claim.statement))}};
  std::visit(Overloaded{[&](const Count& count) {
                          out["bailout"] = spell(count.bailout);
                          out["index"] = count.index;
                        },
                        [&](const Nucleus& type) { out["period"] = type.period; },
                        [&](const Misiurewicz& type) {
                          out["preperiod"] = type.preperiod;
                          out["period"] = type.period;
                        },
                        [](const auto&) {}},
             claim.statement);
  if (claim.request) out["request"] = *claim.request;
  return out;
}

Result<Claim> read_claim(const json& value, const Place& at) {
  const Result<StatementKind> kind = read_kind(value, at);
  if (!kind) return kind.failure();
  if (auto problem = check_claim_keys(value, at, *kind)) return *problem;
  Result<Statement> statement = read_statement(value, at, *kind);
  if (!statement) return statement.failure();
  Result<Region> region = read_region(value["region"], Place(at, "region"));
  if (!region) return region.failure();
  Result<std::optional<std::string>> request = read_request(value, at);
  if (!request) return request.failure();
  Result<Rule> by = read_rule(value["by"], Place(at, "by"), *kind);
  if (!by) return by.failure();
  return Claim{std::move(statement.value()), std::move(region.value()), std::move(request.value()),
               std::move(by.value())};
}

Result<std::vector<Claim>> read_claims(const json& value, const Place& at, std::size_t most) {
  if (!value.is_array() || value.empty() || value.size() > most)
    return at.fault("an array of 1 to " + grouped(most) + " claims should stand here");
  std::vector<Claim> claims;
  claims.reserve(value.size());
  for (std::size_t i = 0; i < value.size(); ++i) {
    Result<Claim> claim = read_claim(value[i], Place(at, i));
    if (!claim) return claim.failure();
    claims.push_back(std::move(claim.value()));
  }
  return claims;
}

}  // namespace merestone
