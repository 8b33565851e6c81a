#include "format/claim_json.hpp"
#include "format/container_layout.hpp"
#include "format/container_reader.hpp"
#include "format/deflate.hpp"
#include "format/strict_json.hpp"

namespace merestone {

namespace {

Result<std::vector<Claim>> open_payload(const StoredBlock& block) {
  const Result<std::string> payload = inflated(block.stored, block.payload_length);
  if (!payload) return payload.failure();
  if (crc32_of(*payload) != block.crc) return Failure{"the CRC-32 of the payload does not match: the block is damaged"};
  if (sha256(*payload) != block.digest) return Failure{"the SHA-256 of the payload does not match: the block is damaged"};
  const Result<nlohmann::json> tree = read_strict_json(*payload);
  if (!tree) return tree.failure();
  if (canonical_json(*tree) != *payload) return Failure{"the payload is not canonical JSON"};
  Result<std::vector<Claim>> claims = read_claims(*tree, Place(), kClaimsOfBlock);
  if (claims && claims->size() != block.claims)
    return Failure{"it declares " + std::to_string(block.claims) + " claims and has " + std::to_string(claims->size())};
  return claims;
}

}  // namespace

Read<std::vector<Claim>> open_block(const StoredBlock& block) {
  Result<std::vector<Claim>> claims = open_payload(block);
  if (!claims) return malformed({"block " + std::to_string(block.ordinal) + ", " + claims.failure().message});
  return std::move(claims.value());
}

}  // namespace merestone
