#pragma once
#include <nlohmann/json.hpp>
#include <vector>

#include "format/place.hpp"
#include "kernel/claim.hpp"

namespace merestone {

/// The claim as a certificate has it. Whether its numbers keep the format's limits is for read_claim to say.
nlohmann::json to_json(const Claim& claim);

/// Reads one claim, every key checked, as docs/certificate-format.md describes it. The claim need not be true: that
/// is the kernel's business. On failure: the JSON pointer and the reason.
Result<Claim> read_claim(const nlohmann::json& value, const Place& at);

/// Reads an array of 1 to `most` claims.
Result<std::vector<Claim>> read_claims(const nlohmann::json& value, const Place& at, std::size_t most);

}  // namespace merestone
