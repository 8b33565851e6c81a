#pragma once
#include <array>
#include <cstdint>
#include <nlohmann/json.hpp>
#include <string>
#include <string_view>
#include <vector>

namespace merestone {

using Sha256 = std::array<unsigned char, 32>;

/// SHA-256 (FIPS 180-4). Out of memory is reported like any other allocation that fails.
Sha256 sha256(std::string_view bytes);

/// In lower case.
std::string hexadecimal(const Sha256& digest);

/// CRC-32 as zlib and PNG define it.
std::uint32_t crc32_of(std::string_view bytes);

/// The canonical JSON (RFC 8785) of a value that holds only ASCII strings and keys and integers below 2^53.
std::string canonical_json(const nlohmann::json& value);

/// The claims-digest of the small form, from its array of claims.
Sha256 claims_digest(const nlohmann::json& claims);
/// The claims-digest of a container, from what its header says of the claims ("content" and what belongs to it) and the
/// digests of its blocks' payloads in order.
Sha256 container_digest(nlohmann::json header, const std::vector<Sha256>& blocks);
/// The same of a container that is a list.
Sha256 claims_digest(const std::vector<Sha256>& blocks);

}  // namespace merestone
