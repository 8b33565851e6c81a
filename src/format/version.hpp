#pragma once
#include <nlohmann/json.hpp>
#include <optional>
#include <string_view>

#include "format/place.hpp"
#include "format/read_fault.hpp"

namespace merestone {

/// A fault unless the document says that it is of this format and of a version that this reader knows. It looks at
/// nothing else, so that a newer version is never taken for a malformed one.
std::optional<ReadFault> check_format(const nlohmann::json& document, const Place& at, std::string_view format);

/// Takes the member "provenance", which is optional and an object, out of the document.
Result<std::optional<nlohmann::json>> take_provenance(nlohmann::json& document, const Place& at);

}  // namespace merestone
