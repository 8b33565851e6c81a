#pragma once
#include <cstdint>
#include <string>
#include <vector>

#include "format/byte_source.hpp"
#include "format/digest.hpp"
#include "format/read_fault.hpp"
#include "kernel/claim.hpp"

namespace merestone {

/// A block as it stands in the file, its payload still deflated and not verified.
struct StoredBlock {
  std::uint64_t ordinal = 0;
  std::uint64_t claims = 0;
  std::uint64_t payload_length = 0;
  std::uint32_t crc = 0;
  Sha256 digest{};
  std::string stored;
};

/// What ends a container that is whole.
struct ContainerEnd {
  std::uint64_t claims = 0;
  Sha256 digest{};  // the claims-digest, provided that every block was opened without fault
};

/// Reads a container in one pass, a block at a time. It verifies the frame: magic, header, marks, ordinals, lengths,
/// block sizes, the index and the end. What is inside a block is for open_block to verify, which may be done by other
/// threads meanwhile. Faults name the block.
class ContainerReader {
 public:
  /// Reads magic and header. The source must be at its beginning.
  static Read<ContainerReader> open(ByteSource source);

  using Next = std::variant<StoredBlock, ContainerEnd, ReadFault>;
  /// The next block; after the last one the end. Not to be called again after end or fault.
  Next next();

 private:
  struct Entry {
    std::uint64_t offset, claims;
  };
  explicit ContainerReader(ByteSource source) : source_(std::move(source)) {}

  std::optional<ReadFault> take(std::string& out, std::size_t length, const std::string& part);
  std::optional<ReadFault> read_header();
  Next read_block(std::uint64_t offset);
  Next read_index(std::uint64_t offset);
  std::optional<ReadFault> check_entry(std::size_t i);
  std::optional<ReadFault> check_end(std::uint64_t index_offset);

  ByteSource source_;
  std::vector<Entry> entries_;
  std::vector<Sha256> digests_;
  std::uint64_t claims_ = 0;
};

/// Inflates the block, verifies length, CRC-32 and SHA-256, and that the payload is the canonical JSON of as many
/// claims as the block declares. A pure function; faults name the block and the JSON pointer.
Read<std::vector<Claim>> open_block(const StoredBlock& block);

}  // namespace merestone
