#include "format/journal.hpp"

#include "format/container_layout.hpp"
#include "format/shown.hpp"

namespace merestone {

namespace {

constexpr auto kBetweenSyncs = std::chrono::seconds(5);
constexpr std::size_t kShownWork = 600;

}  // namespace

Result<Journal> Journal::create(const std::string& path, std::string_view work) {
  if (work.size() > kLargestHeader) return Failure{path + ": the description of the work is longer than 1 MiB"};
  Result<OpenFile> file = OpenFile::create(path);
  if (!file) return file.failure();
  Journal journal(std::move(file.value()));
  if (auto problem = journal.begin(journal_prelude(work))) return *problem;
  return journal;
}

std::optional<Failure> Journal::begin(std::string_view prelude) {
  if (auto problem = file_.truncate(0)) return problem;
  if (auto problem = file_.append(prelude)) return problem;
  end_ = prelude.size();
  return sync();
}

// Whether what is there begins as a journal of this work does, or ends before that is decided.
std::optional<Failure> Journal::check_prelude(std::string_view work, std::string_view prelude, bool& cut_short) const {
  constexpr std::size_t kFixed = kJournalMagic.size() + 8;
  const Result<std::string> read = file_.read(0, kFixed + kLargestHeader + 4);
  if (!read) return read.failure();
  const std::string_view bytes = *read;
  cut_short = bytes.size() < prelude.size() && prelude.substr(0, bytes.size()) == bytes;
  if (cut_short || bytes.substr(0, prelude.size()) == prelude) return std::nullopt;
  if (bytes.substr(0, kJournalMagic.size()) != kJournalMagic || bytes.size() < kFixed)
    return Failure{file_.path() + ": is not a journal of merestone; name another file"};
  std::string_view rest = bytes.substr(kJournalMagic.size());
  const std::uint64_t version = take_integer(rest, 4), length = take_integer(rest, 4);
  if (version != kJournalVersion)
    return Failure{file_.path() + ": is a journal of version " + std::to_string(version) +
                   ", and this program goes on with version " + std::to_string(kJournalVersion) +
                   "; use the merestone that wrote it, or begin anew with another file"};
  const std::string_view theirs = rest.substr(0, length);
  if (rest.size() < length + 4 || journal_prelude(theirs) != bytes.substr(0, kFixed + length + 4))
    return Failure{file_.path() + ": the header of this journal is damaged; begin anew with another file"};
  return Failure{file_.path() + ": is the journal of other work, " + shown(theirs, kShownWork) + "; this is " +
                 shown(work, kShownWork) + ". Ask for the same work, or begin anew with another file"};
}

Result<Journal> Journal::resume(const std::string& path, std::string_view work) {
  Result<OpenFile> file = OpenFile::open(path);
  if (!file) return file.failure();
  Journal journal(std::move(file.value()));
  const std::string prelude = journal_prelude(work);
  bool cut_short = false;
  if (auto problem = journal.check_prelude(work, prelude, cut_short)) return *problem;
  if (cut_short) {
    if (auto problem = journal.begin(prelude)) return *problem;
    return journal;
  }
  Result<JournalScan> scan = scan_journal(journal.file_, prelude.size());
  if (!scan) return scan.failure();
  const Result<std::uint64_t> length = journal.file_.length();
  if (!length) return length.failure();
  journal.records_ = std::move(scan.value().records);
  journal.end_ = scan->end;
  journal.dropped_ = *length - scan->end;
  if (journal.dropped_ > 0)
    if (auto problem = journal.file_.truncate(journal.end_)) return *problem;
  return journal;
}

std::optional<Failure> Journal::append(std::uint64_t key, const PackedBlock& block) {
  if (is_broken_)
    return Failure{file_.path() + ": nothing more can be written to this journal after an earlier failure"};
  if (contains(key)) return Failure{file_.path() + ": block " + std::to_string(key) + " is in this journal already"};
  const std::string bytes = record_bytes(key, block);
  if (auto problem = file_.append(bytes)) {
    is_broken_ = file_.truncate(end_).has_value();
    return problem;
  }
  JournalRecord record{end_, key, block.entries, block.payload_length, block.stored.size(), block.crc, block.digest};
  records_.emplace(key, record);
  end_ = record.end();
  return std::chrono::steady_clock::now() - synced_ < kBetweenSyncs ? std::nullopt : sync();
}

Result<PackedBlock> Journal::read(std::uint64_t key) const {
  const std::string name = file_.path() + ": block " + std::to_string(key);
  const auto found = records_.find(key);
  if (found == records_.end()) return Failure{name + " is not in this journal"};
  Result<PackedBlock> block = read_record(file_, found->second);
  if (!block) return Failure{name + " of this journal: " + block.failure().message};
  return block;
}

std::optional<Failure> Journal::sync() {
  if (auto problem = file_.sync()) return problem;
  synced_ = std::chrono::steady_clock::now();
  return std::nullopt;
}

}  // namespace merestone
