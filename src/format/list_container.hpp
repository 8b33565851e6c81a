#pragma once
#include <cstdint>
#include <nlohmann/json.hpp>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "format/container_reader.hpp"
#include "format/container_writer.hpp"
#include "kernel/claim.hpp"

namespace merestone {

// The content "list": any number of claims. The entries of its blocks are claims.

inline constexpr std::string_view kListContent = "list";
inline constexpr std::uint64_t kClaimsOfBlock = 4096;

/// What ends a list that is whole.
struct ListEnd {
  std::uint64_t claims = 0;
  Sha256 digest{};  // the claims-digest, provided that every block was opened without fault
};

/// Reads a list, a block at a time, and verifies header and block sizes. What is inside a block is for open_claims to
/// verify, which may be done by other threads meanwhile. Faults name the block.
class ListReader {
 public:
  /// Takes over a frame of which no block was read yet, or passes on the fault.
  static Read<ListReader> open(Read<ContainerReader> frame);

  using Next = std::variant<StoredBlock, ListEnd, ReadFault>;
  /// The next block; after the last one the end. Not to be called again after end or fault.
  Next next();

 private:
  explicit ListReader(ContainerReader frame) : frame_(std::move(frame)) {}
  ContainerReader frame_;
  std::uint64_t claims_before_ = kClaimsOfBlock;  // of the block before the next one
};

/// Inflates the block, verifies length, CRC-32 and SHA-256, and that the payload is the canonical JSON of as many
/// claims as the block declares. A pure function; faults name the block and the JSON pointer.
Read<std::vector<Claim>> open_claims(const StoredBlock& block);

/// Packs an array of 1 to kClaimsOfBlock claims. A pure function.
/// On failure: the payload is larger than a block may be.
Result<PackedBlock> pack_claims(const nlohmann::json& claims);

/// Makes the bytes of a list one part after another: header, then each block in order, then the end.
class ListWriter {
 public:
  std::string header(const nlohmann::json& provenance);
  std::string block(const PackedBlock& block) { return frame_.block(block); }
  /// Requires at least one block.
  std::string end() const { return frame_.end(); }

  std::uint64_t claims() const { return frame_.entries(); }
  Sha256 digest() const { return claims_digest(frame_.digests()); }

 private:
  ContainerWriter frame_;
};

}  // namespace merestone
