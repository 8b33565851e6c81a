#include "format/container_reader.hpp"

#include <algorithm>

#include "format/container_layout.hpp"
#include "format/shown.hpp"
#include "format/strict_json.hpp"
#include "format/strict_object.hpp"
#include "format/version.hpp"

namespace merestone {

namespace {

constexpr std::size_t kBlockHeadLength = 4 * 8 + 4 + kDigestLength;  // after the mark
constexpr std::size_t kIndexEntryLength = 2 * 8 + kDigestLength;

ReadFault damaged(const std::string& part, const std::string& reason) { return malformed({part + ": " + reason}); }

std::string block_name(std::uint64_t ordinal) { return "block " + std::to_string(ordinal); }

Sha256 take_digest(std::string_view& bytes) {
  Sha256 digest{};
  std::copy_n(bytes.begin(), kDigestLength, digest.begin());
  bytes.remove_prefix(kDigestLength);
  return digest;
}

StoredBlock read_head(std::string_view bytes, std::uint64_t& stored_length) {
  StoredBlock block;
  block.ordinal = take_integer(bytes, 8);
  block.claims = take_integer(bytes, 8);
  block.payload_length = take_integer(bytes, 8);
  stored_length = take_integer(bytes, 8);
  block.crc = static_cast<std::uint32_t>(take_integer(bytes, 4));
  block.digest = take_digest(bytes);
  return block;
}

}  // namespace

Read<ContainerReader> ContainerReader::open(ByteSource source) {
  ContainerReader reader(std::move(source));
  if (auto fault = reader.read_header()) return *fault;
  return reader;
}

std::optional<ReadFault> ContainerReader::take(std::string& out, std::size_t length, const std::string& part) {
  if (auto fault = source_.read(out, length)) return fault;
  if (out.size() < length)
    return damaged(part, "the file ends at byte " + std::to_string(source_.offset()) + "; it was cut short");
  return std::nullopt;
}

std::optional<ReadFault> ContainerReader::read_header() {
  std::string bytes;
  if (auto fault = take(bytes, kContainerMagic.size(), "magic")) return fault;
  if (bytes != kContainerMagic)
    return damaged("magic", "the first bytes are not those of a container; a transfer in text mode damages them so");
  if (auto fault = take(bytes, 4, "header")) return fault;
  std::string_view length_bytes = bytes;
  const std::uint64_t length = take_integer(length_bytes, 4);
  if (length > kLargestHeader) return damaged("header", "it is longer than 1 MiB");
  if (auto fault = take(bytes, length, "header")) return fault;
  Result<nlohmann::json> header = read_strict_json(bytes);
  if (!header) return damaged("header", header.failure().message);
  const Place at;
  if (auto fault = check_format(*header, at, kContainerFormat)) return ReadFault{fault->kind, "header: " + fault->message};
  if (auto problem = check_keys(*header, at, {"content", "format", "version"}, {"provenance"}))
    return damaged("header", problem->message);
  const Result<std::string> content = read_text(*header, at, "content");
  if (!content) return damaged("header", content.failure().message);
  if (*content != "list") return damaged("header", Place(at, "content").fault("the content " + shown(*content) + " is not 'list'").message);
  const auto provenance = take_provenance(header.value(), at);
  if (!provenance) return damaged("header", provenance.failure().message);
  return std::nullopt;
}

ContainerReader::Next ContainerReader::next() {
  const std::uint64_t offset = source_.offset();
  std::string mark;
  if (auto fault = take(mark, kMarkLength, block_name(entries_.size()))) return *fault;
  if (mark == kBlockMark) return read_block(offset);
  if (mark == kIndexMark) return read_index(offset);
  return damaged(block_name(entries_.size()), "neither a block nor the index begins at byte " + std::to_string(offset));
}

ContainerReader::Next ContainerReader::read_block(std::uint64_t offset) {
  const std::uint64_t ordinal = entries_.size();
  const std::string name = block_name(ordinal);
  if (ordinal > 0 && entries_.back().claims != kClaimsOfBlock)
    return damaged(block_name(ordinal - 1), "it has " + std::to_string(entries_.back().claims) +
                                                " claims and is not the last; every block but the last has 4,096");
  std::string head;
  if (auto fault = take(head, kBlockHeadLength, name)) return *fault;
  std::uint64_t stored_length = 0;
  StoredBlock block = read_head(head, stored_length);
  if (block.ordinal != ordinal) return damaged(name, "it has the ordinal " + std::to_string(block.ordinal));
  if (block.claims < 1 || block.claims > kClaimsOfBlock)
    return damaged(name, "it declares " + std::to_string(block.claims) + " claims; a block has 1 to 4,096");
  if (block.payload_length > kLargestPayload) return damaged(name, "it declares a payload above 64 MiB");
  if (stored_length > kLargestStored) return damaged(name, "it declares stored data above 64 MiB");
  if (auto fault = take(block.stored, stored_length, name)) return *fault;
  entries_.push_back({offset, block.claims});
  digests_.push_back(block.digest);
  claims_ += block.claims;
  return block;
}

ContainerReader::Next ContainerReader::read_index(std::uint64_t offset) {
  if (entries_.empty()) return damaged("index", "there is no block before it; a list has at least one");
  std::string bytes;
  if (auto fault = take(bytes, 8, "index")) return *fault;
  std::string_view count_bytes = bytes;
  if (const std::uint64_t count = take_integer(count_bytes, 8); count != entries_.size())
    return damaged("index", "it counts " + std::to_string(count) + " blocks; " + std::to_string(entries_.size()) + " were read");
  for (std::size_t i = 0; i < entries_.size(); ++i)
    if (auto fault = check_entry(i)) return *fault;
  if (auto fault = check_end(offset)) return *fault;
  return ContainerEnd{claims_, claims_digest(digests_)};
}

std::optional<ReadFault> ContainerReader::check_entry(std::size_t i) {
  std::string bytes;
  if (auto fault = take(bytes, kIndexEntryLength, "index")) return fault;
  std::string_view rest = bytes;
  const std::uint64_t offset = take_integer(rest, 8), claims = take_integer(rest, 8);
  if (offset != entries_[i].offset || claims != entries_[i].claims || take_digest(rest) != digests_[i])
    return damaged("index", "its entry for block " + std::to_string(i) + " disagrees with the block");
  return std::nullopt;
}

std::optional<ReadFault> ContainerReader::check_end(std::uint64_t index_offset) {
  std::string bytes;
  if (auto fault = take(bytes, 8 + kMarkLength, "end")) return fault;
  std::string_view rest = bytes;
  if (take_integer(rest, 8) != index_offset) return damaged("end", "it does not point to the index");
  if (rest != kEndMark) return damaged("end", "the mark END is missing");
  if (auto fault = source_.read(bytes, 1)) return fault;
  if (!bytes.empty()) return damaged("end", "bytes follow the end of the container");
  return std::nullopt;
}

}  // namespace merestone
