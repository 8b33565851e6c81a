#pragma once
#include <nlohmann/json.hpp>

#include "format/names.hpp"
#include "format/place.hpp"
#include "kernel/claim.hpp"

namespace merestone {

/// The value of the key "by": the rule's name and hints.
nlohmann::json rule_to_json(const Rule& rule, StatementKind statement);

/// Reads the value of the key "by" of a claim of the given kind. On failure: the JSON pointer and the reason.
Result<Rule> read_rule(const nlohmann::json& value, const Place& at, StatementKind statement);

}  // namespace merestone
