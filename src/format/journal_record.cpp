#include "format/journal_record.hpp"

#include "format/container_layout.hpp"

namespace merestone {

namespace {

void put_crc(std::string& out) { put_integer(out, crc32_of(out), 4); }

}  // namespace

std::string journal_prelude(std::string_view work) {
  std::string out(kJournalMagic);
  put_integer(out, kJournalVersion, 4);
  put_integer(out, work.size(), 4);
  out += work;
  put_crc(out);
  return out;
}

std::string record_bytes(std::uint64_t key, const PackedBlock& block) {
  std::string out(kRecordMark);
  for (const std::uint64_t value : {key, block.entries, block.payload_length, std::uint64_t{block.stored.size()}})
    put_integer(out, value, 8);
  put_integer(out, block.crc, 4);
  put_digest(out, block.digest);
  put_crc(out);
  out += block.stored;
  return out;
}

std::optional<JournalRecord> read_record_head(std::string_view bytes) {
  if (bytes.size() < kRecordHeadLength || bytes.substr(0, kRecordMark.size()) != kRecordMark) return std::nullopt;
  const std::uint32_t expected = crc32_of(bytes.substr(0, kRecordHeadLength - 4));
  bytes.remove_prefix(kRecordMark.size());
  JournalRecord record;
  record.key = take_integer(bytes, 8);
  record.entries = take_integer(bytes, 8);
  record.payload_length = take_integer(bytes, 8);
  record.stored_length = take_integer(bytes, 8);
  record.crc = static_cast<std::uint32_t>(take_integer(bytes, 4));
  record.digest = take_digest(bytes);
  if (take_integer(bytes, 4) != expected || check_lengths(record.payload_length, record.stored_length))
    return std::nullopt;
  return record;
}

Result<PackedBlock> read_record(const OpenFile& file, const JournalRecord& record) {
  Result<std::string> stored = file.read(record.offset + kRecordHeadLength, record.stored_length);
  if (!stored) return stored.failure();
  if (stored->size() < record.stored_length) return Failure{"it is cut short"};
  const Result<std::string> payload = open_payload(*stored, record.payload_length, record.crc, record.digest);
  if (!payload) return payload.failure();
  return PackedBlock{record.entries, record.payload_length, record.crc, record.digest, std::move(stored.value())};
}

}  // namespace merestone
