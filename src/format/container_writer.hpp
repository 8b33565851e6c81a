#pragma once
#include <cstdint>
#include <nlohmann/json.hpp>
#include <string>
#include <vector>

#include "format/digest.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// A block ready to be written: its payload deflated, with the figures that its head and the index need.
struct PackedBlock {
  std::uint64_t claims = 0, payload_length = 0;
  std::uint32_t crc = 0;
  Sha256 digest{};
  std::string stored;
};

/// Packs an array of 1 to kClaimsOfBlock claims. A pure function.
/// On failure: the payload is larger than a block may be.
Result<PackedBlock> pack_block(const nlohmann::json& claims);

/// Makes the bytes of a container one part after another: header, then each block in order, then the end.
class ContainerWriter {
 public:
  /// Magic and header.
  std::string header(const nlohmann::json& provenance);
  std::string block(const PackedBlock& block);
  /// Index and end. Requires at least one block.
  std::string end() const;

  std::uint64_t claims() const { return claims_; }
  Sha256 digest() const { return claims_digest(digests_); }

 private:
  struct Entry {
    std::uint64_t offset, claims;
  };
  std::uint64_t offset_ = 0, claims_ = 0;
  std::vector<Entry> entries_;
  std::vector<Sha256> digests_;
};

}  // namespace merestone
