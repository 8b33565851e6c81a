#include "format/journal_scan.hpp"

#include <algorithm>

namespace merestone {

namespace {

constexpr std::uint64_t kChunk = std::uint64_t{1} << 20;

class Scanner {
 public:
  Scanner(const OpenFile& file, std::uint64_t length) : file_(file), length_(length) {}

  Result<JournalScan> run(std::uint64_t begin);

 private:
  using Found = std::optional<JournalRecord>;

  Result<Found> good_record_at(std::uint64_t offset) const;
  Result<Found> good_record_from(std::uint64_t offset) const;

  const OpenFile& file_;
  std::uint64_t length_;
};

Result<Scanner::Found> Scanner::good_record_at(std::uint64_t offset) const {
  const Result<std::string> head = file_.read(offset, kRecordHeadLength);
  if (!head) return head.failure();
  Found record = read_record_head(*head);
  if (!record) return Found();
  record->offset = offset;
  // what is cut short or damaged is no good record, but a file that cannot be read must not look like one
  if (record->end() > length_) return Found();
  const Result<std::string> stored = file_.read(offset + kRecordHeadLength, record->stored_length);
  if (!stored) return stored.failure();
  if (!open_payload(*stored, record->payload_length, record->crc, record->digest)) return Found();
  return record;
}

// The first good record that begins at or after the offset.
Result<Scanner::Found> Scanner::good_record_from(std::uint64_t offset) const {
  while (offset < length_) {
    const Result<std::string> bytes = file_.read(offset, kChunk + kRecordMark.size() - 1);
    if (!bytes) return bytes.failure();
    for (std::size_t at = bytes->find(kRecordMark); at != std::string::npos; at = bytes->find(kRecordMark, at + 1)) {
      Result<Found> record = good_record_at(offset + at);
      if (!record || *record) return record;
    }
    offset += kChunk;
  }
  return Found();
}

Result<JournalScan> Scanner::run(std::uint64_t begin) {
  JournalScan scan;
  for (scan.end = begin; scan.end < length_;) {
    const std::string name = file_.path() + ": record " + std::to_string(scan.records.size());
    const Result<Found> found = good_record_at(scan.end);
    if (!found) return found.failure();
    if (!*found) {
      const Result<Found> later = good_record_from(scan.end + 1);
      if (!later) return later.failure();
      if (!*later) break;
      return Failure{name + ", at byte " + std::to_string(scan.end) + ", is damaged and good ones follow, from byte " +
                     std::to_string((*later)->offset) +
                     "; take the file from a backup, or begin anew with another one"};
    }
    const JournalRecord& record = **found;
    if (!scan.records.emplace(record.key, record).second)
      return Failure{name + " has the key " + std::to_string(record.key) +
                     " of an earlier one; begin anew with another file"};
    scan.end = record.end();
  }
  return scan;
}

}  // namespace

Result<JournalScan> scan_journal(const OpenFile& file, std::uint64_t begin) {
  const Result<std::uint64_t> length = file.length();
  if (!length) return length.failure();
  return Scanner(file, *length).run(begin);
}

}  // namespace merestone
