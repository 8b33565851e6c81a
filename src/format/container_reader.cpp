#include "format/container_reader.hpp"

#include "format/block_payload.hpp"
#include "format/container_layout.hpp"
#include "format/strict_json.hpp"
#include "format/strict_object.hpp"
#include "format/version.hpp"

namespace merestone {

namespace {

// after the mark
constexpr std::size_t kBlockHeadLength = 4 * 8 + 4 + kDigestLength;
constexpr std::size_t kAbsentHeadLength = 3 * 8 + kDigestLength;  // and the summary before the digest
constexpr std::size_t kIndexEntryLength = 2 * 8 + kDigestLength;

std::string wrong_ordinal(std::uint64_t ordinal) {
  return "it has the ordinal " + std::to_string(ordinal) + "; a block before it is missing, or blocks were exchanged";
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
  if (auto fault = check_format(*header, at, kContainerFormat))
    return ReadFault{fault->kind, "header: " + fault->message};
  if (const auto content = read_text(*header, at, "content"); !content)
    return damaged("header", content.failure().message);
  header_ = std::move(header.value());
  return std::nullopt;
}

ContainerReader::Next ContainerReader::next() {
  const std::uint64_t offset = source_.offset();
  const std::string name = block_name(entries_.size());
  std::string mark;
  if (auto fault = take(mark, kMarkLength, name)) return *fault;
  if (mark == kBlockMark) return read_block(offset);
  if (mark == kAbsentMark) return read_absent(offset);
  if (mark == kIndexMark) return read_index(offset);
  return damaged(name, "neither a block nor the index begins at byte " + std::to_string(offset));
}

void ContainerReader::note(std::uint64_t offset, std::uint64_t entries, const Sha256& digest) {
  entries_.push_back({offset, entries});
  digests_.push_back(digest);
  sum_of_entries_ += entries;
}

ContainerReader::Next ContainerReader::read_block(std::uint64_t offset) {
  const std::string name = block_name(entries_.size());
  std::string head;
  if (auto fault = take(head, kBlockHeadLength, name)) return *fault;
  std::string_view rest = head;
  StoredBlock block;
  block.ordinal = take_integer(rest, 8);
  block.entries = take_integer(rest, 8);
  block.payload_length = take_integer(rest, 8);
  const std::uint64_t stored_length = take_integer(rest, 8);
  block.crc = static_cast<std::uint32_t>(take_integer(rest, 4));
  block.digest = take_digest(rest);
  if (block.ordinal != entries_.size()) return damaged(name, wrong_ordinal(block.ordinal));
  if (auto problem = check_lengths(block.payload_length, stored_length)) return damaged(name, problem->message);
  if (auto fault = take(block.stored, stored_length, name)) return *fault;
  note(offset, block.entries, block.digest);
  return block;
}

ContainerReader::Next ContainerReader::read_absent(std::uint64_t offset) {
  const std::string name = block_name(entries_.size());
  if (!summary_length_) return damaged(name, "it is absent; a container of this content holds all of its blocks");
  std::string head;
  if (auto fault = take(head, kAbsentHeadLength + *summary_length_, name)) return *fault;
  std::string_view rest = head;
  AbsentBlock block;
  block.ordinal = take_integer(rest, 8);
  block.entries = take_integer(rest, 8);
  block.payload_length = take_integer(rest, 8);
  block.summary = rest.substr(0, *summary_length_);
  rest.remove_prefix(*summary_length_);
  block.digest = take_digest(rest);
  if (block.ordinal != entries_.size()) return damaged(name, wrong_ordinal(block.ordinal));
  if (block.payload_length > kLargestPayload) return damaged(name, "it declares a payload above 64 MiB");
  note(offset, block.entries, block.digest);
  return block;
}

ContainerReader::Next ContainerReader::read_index(std::uint64_t offset) {
  std::string bytes;
  if (auto fault = take(bytes, 8, "index")) return *fault;
  std::string_view count_bytes = bytes;
  if (const std::uint64_t count = take_integer(count_bytes, 8); count != entries_.size())
    return damaged("index",
                   "it counts " + std::to_string(count) + " blocks; " + std::to_string(entries_.size()) + " were read");
  for (std::size_t i = 0; i < entries_.size(); ++i)
    if (auto fault = check_entry(i)) return *fault;
  if (auto fault = check_end(offset)) return *fault;
  return ContainerEnd{sum_of_entries_};
}

std::optional<ReadFault> ContainerReader::check_entry(std::size_t i) {
  std::string bytes;
  if (auto fault = take(bytes, kIndexEntryLength, "index")) return fault;
  std::string_view rest = bytes;
  const std::uint64_t offset = take_integer(rest, 8), entries = take_integer(rest, 8);
  if (offset != entries_[i].offset || entries != entries_[i].entries || take_digest(rest) != digests_[i])
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
