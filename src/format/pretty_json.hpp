#pragma once
#include <nlohmann/json.hpp>
#include <string>

namespace merestone {

/// JSON for people, deterministic: two spaces a level, what is short and simple on one line, the keys of a certificate
/// in the order in which they are read aloud and all others in alphabetical order; a line feed at the end.
std::string pretty_json(const nlohmann::json& value);

}  // namespace merestone
