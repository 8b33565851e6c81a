#pragma once
#include <chrono>
#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <string_view>

#include "format/journal_scan.hpp"
#include "format/open_file.hpp"

namespace merestone {

/// The finished blocks of a run that is going on, on disk: what a run that was killed hands to the one that resumes it.
/// Every block has a key of the caller's. Blocks stay in the file; memory holds an index. One process at a time has it,
/// and the text that describes the work must be the same, byte for byte.
class Journal {
 public:
  /// Begins a journal.
  /// On failure: there is a file of that name already, or it cannot be written.
  static Result<Journal> create(const std::string& path, std::string_view work);
  /// Goes on with one. A write that was interrupted is dropped from its end; everything before it is verified.
  /// On failure: there is none; another process has it; it is of other work or another version; or it is damaged in
  /// another way, which names the record. The file is then as it was.
  static Result<Journal> resume(const std::string& path, std::string_view work);

  /// Writes a block at the end. When writing fails, what was written of it is taken back, and the journal is as before;
  /// when a sync that is due fails, the block stays and nobody can say whether it will outlive a loss of power. On
  /// failure: no room, the sync, or the key is there already. Not to be called by two threads at once, nor beside the
  /// others.
  std::optional<Failure> append(std::uint64_t key, const PackedBlock& block);
  /// The block of that key, read from the file and verified once more. Threads may read at the same time.
  /// On failure: it is not there, or damaged.
  Result<PackedBlock> read(std::uint64_t key) const;

  bool contains(std::uint64_t key) const { return records_.count(key) != 0; }
  /// By key, in increasing order.
  const std::map<std::uint64_t, JournalRecord>& records() const { return records_; }
  /// Bytes of an interrupted write that `resume` dropped.
  std::uint64_t dropped() const { return dropped_; }

  /// Returns when all blocks will outlive a loss of power; `append` asks for it every few seconds.
  std::optional<Failure> sync();
  /// Removes the file, when the work is done and its result is safe.
  std::optional<Failure> remove() { return file_.remove(); }

 private:
  explicit Journal(OpenFile file) : file_(std::move(file)) {}
  std::optional<Failure> begin(std::string_view prelude);
  std::optional<Failure> check_prelude(std::string_view work, std::string_view prelude, bool& cut_short) const;

  OpenFile file_;
  std::map<std::uint64_t, JournalRecord> records_;
  std::uint64_t end_ = 0, dropped_ = 0;
  bool is_broken_ = false;  // bytes that do not belong there could not be taken back
  std::chrono::steady_clock::time_point synced_ = std::chrono::steady_clock::now();
};

}  // namespace merestone
