#include "cli/check_json.hpp"

#include <nlohmann/json.hpp>

#include "cli/check_facts.hpp"
#include "cli/check_number_words.hpp"
#include "cli/check_rule_words.hpp"
#include "cli/check_words.hpp"
#include "format/literal.hpp"
#include "format/names.hpp"
#include "format/spelling.hpp"
#include "kernel/overloaded.hpp"

namespace merestone {

namespace {

using nlohmann::ordered_json;

constexpr int kDigits = 20;

// A file's name need not be UTF-8.
std::string line(const ordered_json& object) {
  return object.dump(-1, ' ', false, ordered_json::error_handler_t::replace) + "\n";
}

ordered_json end_of(const std::optional<Dyadic>& end) { return end ? ordered_json(spell(*end)) : ordered_json(); }

ordered_json interval(const std::optional<Dyadic>& lower, const std::optional<Dyadic>& upper) {
  return {{"lower", end_of(lower)}, {"upper", end_of(upper)}, {"literal", interval_literal(lower, upper, kDigits)}};
}

void put_proof(ordered_json& object, const Claim& claim, const Established& established) {
  object["proved"] = ordered_json::array();
  for (const Fact& fact : facts_of(claim, established)) {
    ordered_json entry = {{"fact", fact.words}};
    if (fact.margin) entry["margin"] = interval(fact.margin, std::nullopt);
    object["proved"].push_back(std::move(entry));
  }
  object["figures"] = ordered_json::object();
  for (const Figure& figure : established.figures)
    object["figures"][figure.name] = interval(figure.lower, figure.upper);
  object["lemmas"] = established.lemmas;
}

}  // namespace

std::string claim_object(const std::string& path, const CheckedClaim& checked) {
  const Claim& claim = *checked.claim;
  ordered_json object = {{"file", path}, {"claim", checked.position}, {"words", claim_in_words(claim)}};
  if (claim.request) object["request"] = shortened(*claim.request);
  object["outcome"] = "established";
  object["rule"] = name_of(claim.by);
  object["rule_words"] = rule_in_words(claim);
  std::visit(Overloaded{[&](const Established& e) { put_proof(object, claim, e); },
                        [&](const NotEstablished& n) {
                          object["outcome"] = "not established";
                          object["reason"] = n.reason;
                        },
                        [&](const OverLimit& o) {
                          object["outcome"] = "over the limit";
                          object["reason"] = o.reason;
                        }},
             checked.outcome);
  return line(object);
}

std::string file_object(const FileSummary& summary) {
  ordered_json object = {{"file", summary.path}};
  if (summary.fault) {
    object["fault"] = fault_word(*summary.fault);
    object["message"] = summary.fault->message;
  } else {
    const Counts total = summary.tally.total();
    object["claims"] = summary.end->claims;
    if (summary.sample) object["sample"] = {{"claims", summary.sample->size}, {"seed", summary.sample->seed}};
    object["established"] = total.established;
    object["not_established"] = total.not_established;
    object["over_limit"] = total.over_limit;
    object["claims_digest"] = hexadecimal(summary.end->digest);
  }
  object["exit"] = static_cast<int>(exit_code_of(summary));
  return line(object);
}

}  // namespace merestone
