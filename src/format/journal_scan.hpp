#pragma once
#include <cstdint>
#include <map>

#include "format/journal_record.hpp"

namespace merestone {

/// The records of a journal by their keys, and where the last good one ends.
struct JournalScan {
  std::map<std::uint64_t, JournalRecord> records;
  std::uint64_t end = 0;
};

/// Reads and verifies the records from `begin` to the end of the file, holding one payload at a time. What follows the
/// last good record, a write that was interrupted, is not counted. On failure: a record is damaged and good ones follow
/// it, a key occurs twice, or the file could not be read.
Result<JournalScan> scan_journal(const OpenFile& file, std::uint64_t begin);

}  // namespace merestone
