#pragma once
#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

#include "format/block_payload.hpp"
#include "format/open_file.hpp"

namespace merestone {

// How journals are laid out. They are private to the program that writes them: no other reads them, and another version
// may lay them out differently.
//
// "\x9A", "merestone-journal", CR LF, 0x1A, LF; u32 version; u32 length of the text that describes the work; the text;
// u32 CRC-32 of all that. Then records: "REC\n", u64 key, u64 entries, u64 payload length, u64 stored length, u32
// CRC-32 and SHA-256 of the payload, u32 CRC-32 of all that (the head), then the payload, deflated. Little-endian.

inline constexpr std::string_view kJournalMagic =
    "\x9A"
    "merestone-journal\r\n\x1a\n";
inline constexpr std::uint32_t kJournalVersion = 1;
inline constexpr std::string_view kRecordMark = "REC\n";
inline constexpr std::size_t kRecordHeadLength = 4 + 4 * 8 + 4 + 32 + 4;

/// What is known of a record; its payload stays in the file.
struct JournalRecord {
  std::uint64_t offset = 0;  // of its mark
  std::uint64_t key = 0, entries = 0, payload_length = 0, stored_length = 0;
  std::uint32_t crc = 0;
  Sha256 digest{};

  std::uint64_t end() const { return offset + kRecordHeadLength + stored_length; }
};

/// The bytes before the first record.
std::string journal_prelude(std::string_view work);

/// The record's bytes.
std::string record_bytes(std::uint64_t key, const PackedBlock& block);

/// The head that these bytes begin with, or nothing when it is not whole and undamaged. The offset is not set.
std::optional<JournalRecord> read_record_head(std::string_view bytes);

/// The block of a record, verified as open_payload does.
/// On failure: it is damaged or cut short, or the file could not be read.
Result<PackedBlock> read_record(const OpenFile& file, const JournalRecord& record);

}  // namespace merestone
