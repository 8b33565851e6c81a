#include "format/list_container.hpp"

#include "format/claim_json.hpp"
#include "format/container_layout.hpp"
#include "format/shown.hpp"
#include "format/strict_json.hpp"
#include "format/strict_object.hpp"
#include "format/version.hpp"

namespace merestone {

namespace {

std::optional<Failure> check_header(nlohmann::json header, const std::string& content) {
  const Place at;
  if (content != kListContent)
    return Place(at, "content").fault("the content " + shown(content) + " is not " + shown(kListContent));
  if (auto problem = check_keys(header, at, {"content", "format", "version"}, {"provenance"})) return problem;
  if (const auto provenance = take_provenance(header, at); !provenance) return provenance.failure();
  return std::nullopt;
}

Result<std::vector<Claim>> read_payload(const StoredBlock& block) {
  const Result<std::string> payload = open_payload(block.stored, block.payload_length, block.crc, block.digest);
  if (!payload) return payload.failure();
  const Result<nlohmann::json> tree = read_strict_json(*payload);
  if (!tree) return tree.failure();
  if (canonical_json(*tree) != *payload) return Failure{"the payload is not canonical JSON"};
  Result<std::vector<Claim>> claims = read_claims(*tree, Place(), kClaimsOfBlock);
  if (claims && claims->size() != block.entries)
    return Failure{"it declares " + std::to_string(block.entries) + " claims and has " +
                   std::to_string(claims->size())};
  return claims;
}

}  // namespace

Read<ListReader> ListReader::open(Read<ContainerReader> frame) {
  if (const ReadFault* fault = fault_of(frame)) return *fault;
  auto& reader = std::get<ContainerReader>(frame);
  if (auto problem = check_header(reader.header(), reader.content())) return damaged("header", problem->message);
  return ListReader(std::move(reader));
}

ListReader::Next ListReader::next() {
  ContainerReader::Next read = frame_.next();
  if (const auto* fault = std::get_if<ReadFault>(&read)) return *fault;
  if (const auto* end = std::get_if<ContainerEnd>(&read)) {
    if (frame_.digests().empty()) return damaged("index", "there is no block before it; a list has at least one");
    return ListEnd{end->entries, claims_digest(frame_.digests())};
  }
  auto& block = std::get<StoredBlock>(read);
  if (claims_before_ != kClaimsOfBlock)
    return damaged(
        block_name(block.ordinal - 1),
        "it has " + std::to_string(claims_before_) + " claims and is not the last; every block but the last has 4,096");
  if (block.entries < 1 || block.entries > kClaimsOfBlock)
    return damaged(block_name(block.ordinal),
                   "it declares " + std::to_string(block.entries) + " claims; a block has 1 to 4,096");
  claims_before_ = block.entries;
  return std::move(block);
}

Read<std::vector<Claim>> open_claims(const StoredBlock& block) {
  Result<std::vector<Claim>> claims = read_payload(block);
  if (!claims) return malformed({block_name(block.ordinal) + ", " + claims.failure().message});
  return std::move(claims.value());
}

Result<PackedBlock> pack_claims(const nlohmann::json& claims) {
  const std::string payload = canonical_json(claims);
  if (payload.size() > kLargestPayload)
    return Failure{"a block of " + std::to_string(claims.size()) +
                   " claims is larger than 64 MiB; type shorter numbers"};
  return pack_payload(claims.size(), payload);
}

std::string ListWriter::header(const nlohmann::json& provenance) {
  return frame_.header({{"content", kListContent}, {"provenance", provenance}});
}

}  // namespace merestone
