#pragma once
#include <cstdint>
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "format/byte_source.hpp"
#include "format/digest.hpp"
#include "format/read_fault.hpp"

namespace merestone {

/// A block as it stands in the file, its payload still deflated and not verified.
struct StoredBlock {
  std::uint64_t ordinal = 0;
  std::uint64_t entries = 0;
  std::uint64_t payload_length = 0;
  std::uint32_t crc = 0;
  Sha256 digest{};
  std::string stored;
};

/// A block of which the file has the figures alone.
struct AbsentBlock {
  std::uint64_t ordinal = 0;
  std::uint64_t entries = 0;
  std::uint64_t payload_length = 0;
  std::string summary;  // what the content says of it, not verified
  Sha256 digest{};
};

/// What ends a frame that is whole.
struct ContainerEnd {
  std::uint64_t entries = 0;  // of all blocks
};

/// Reads the frame of a container in one pass, a block at a time, whatever its content: magic, header, marks, ordinals,
/// lengths, the index and the end are verified. What the header says beyond format and version, and what is inside the
/// blocks, is for the content's own reader (list_container.hpp, area_container.hpp). Faults name the block.
class ContainerReader {
 public:
  /// Reads magic and header. The source must be at its beginning.
  static Read<ContainerReader> open(ByteSource source);

  /// A JSON object, strictly read, whose "format" and "version" are verified and whose "content" is a string.
  const nlohmann::json& header() const { return header_; }
  const std::string& content() const { return header_["content"].get_ref<const std::string&>(); }

  /// From now on blocks may be absent; each says so many bytes of itself. Before, they may not.
  void admit_absent(std::size_t summary_length) { summary_length_ = summary_length; }

  using Next = std::variant<StoredBlock, AbsentBlock, ContainerEnd, ReadFault>;
  /// The next block; after the last one the end. Not to be called again after end or fault.
  Next next();

  /// Of the payloads of the blocks read so far, in order.
  const std::vector<Sha256>& digests() const { return digests_; }

 private:
  struct Entry {
    std::uint64_t offset, entries;
  };
  explicit ContainerReader(ByteSource source) : source_(std::move(source)) {}

  std::optional<ReadFault> take(std::string& out, std::size_t length, const std::string& part);
  std::optional<ReadFault> read_header();
  Next read_block(std::uint64_t offset);
  Next read_absent(std::uint64_t offset);
  Next read_index(std::uint64_t offset);
  std::optional<ReadFault> check_entry(std::size_t i);
  std::optional<ReadFault> check_end(std::uint64_t index_offset);
  void note(std::uint64_t offset, std::uint64_t entries, const Sha256& digest);

  ByteSource source_;
  nlohmann::json header_;
  std::optional<std::size_t> summary_length_;
  std::vector<Entry> entries_;
  std::vector<Sha256> digests_;
  std::uint64_t sum_of_entries_ = 0;
};

}  // namespace merestone
