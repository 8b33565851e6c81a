#include "catch.hpp"

#include <sys/resource.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <csignal>
#include <filesystem>
#include <fstream>
#include <thread>

#include "format/journal.hpp"

using namespace merestone;
namespace fs = std::filesystem;

namespace {

constexpr const char* kWork = "{\"depth\":6}";

struct Folder {
  fs::path path = fs::temp_directory_path() / "merestone-journal-XXXXXX";
  Folder() {
    std::string name = path.string();
    REQUIRE(::mkdtemp(name.data()) != nullptr);
    path = name;
  }
  ~Folder() { fs::remove_all(path); }
  std::string file() const { return (path / "run.journal").string(); }
};

std::string bytes_of(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(file), {}};
}

// A new file: some file systems wait for the disk when an old one is emptied and written again.
void put(const std::string& path, const std::string& bytes) {
  fs::remove(path);
  std::ofstream(path, std::ios::binary) << bytes;
}

std::string payload_of(std::uint64_t key) {
  std::string payload = "payload of block " + std::to_string(key);
  for (std::uint64_t k = 0; k < key; ++k) payload += static_cast<char>(k * k % 251);
  return payload;
}

PackedBlock block_of(std::uint64_t key) { return *pack_payload(key + 100, payload_of(key)); }

bool is_block_of(std::uint64_t key, const Result<PackedBlock>& block) {
  if (!block) return false;
  const auto payload = open_payload(block->stored, block->payload_length, block->crc, block->digest);
  return payload && *payload == payload_of(key) && block->entries == key + 100;
}

Journal opened(Result<Journal> journal) {
  INFO((journal ? "" : journal.failure().message));
  REQUIRE(journal);
  return std::move(journal.value());
}

/// A journal with these blocks, and where each of them ends.
std::vector<std::size_t> write_journal(const std::string& path, const std::vector<std::uint64_t>& keys) {
  Journal journal = opened(Journal::create(path, kWork));
  std::vector<std::size_t> ends = {fs::file_size(path)};
  for (const std::uint64_t key : keys) {
    REQUIRE_FALSE(journal.append(key, block_of(key)));
    ends.push_back(fs::file_size(path));
  }
  return ends;
}

bool names(const std::string& message, const std::string& part) { return message.find(part) != message.npos; }

}  // namespace

TEST_CASE("a journal that was written from the description of its layout is read") {
  // written by make_area_samples.py with Python's struct, zlib and hashlib
  const Folder folder;
  fs::copy_file(std::string(MERESTONE_TESTS_DIR) + "/format/area/three.journal", folder.file());
  const Journal journal = opened(Journal::resume(folder.file(), kWork));
  CHECK(journal.records().size() == 3);
  CHECK(journal.records().begin()->first == 2);
  CHECK(journal.contains(9));
  CHECK(journal.read(7)->entries == 6);
  CHECK(journal.dropped() == 0);
}

TEST_CASE("a journal hands its blocks to the run that resumes it") {
  const Folder folder;
  write_journal(folder.file(), {3, 0, 2000});
  Journal journal = opened(Journal::resume(folder.file(), kWork));
  REQUIRE_FALSE(journal.append(1, block_of(1)));
  for (const std::uint64_t key : {0, 1, 3, 2000}) CHECK(is_block_of(key, journal.read(key)));
  CHECK_FALSE(journal.contains(2));
  CHECK(names(journal.read(2).failure().message, "block 2 is not in this journal"));
  CHECK(names(journal.append(1, block_of(1))->message, "block 1 is in this journal already"));
}

TEST_CASE("cut short at every byte, a journal has exactly the whole records before") {
  const Folder folder;
  const std::vector<std::uint64_t> keys = {5, 1, 40, 2};
  const std::vector<std::size_t> ends = write_journal(folder.file(), keys);
  const std::string whole = bytes_of(folder.file());
  for (std::size_t length = 0; length <= whole.size(); ++length) {
    put(folder.file(), whole.substr(0, length));
    Journal journal = opened(Journal::resume(folder.file(), kWork));
    std::size_t kept = 0;
    while (kept < keys.size() && ends[kept + 1] <= length) ++kept;
    REQUIRE(journal.records().size() == kept);
    for (std::size_t k = 0; k < kept; ++k) REQUIRE(is_block_of(keys[k], journal.read(keys[k])));
    REQUIRE(journal.dropped() == (length < ends[0] ? 0 : length - ends[kept]));
    for (std::size_t k = kept; k < keys.size(); ++k) REQUIRE_FALSE(journal.append(keys[k], block_of(keys[k])));
    REQUIRE(bytes_of(folder.file()) == whole);
  }
}

TEST_CASE("with any bit flipped, no wrong payload is accepted and nothing is lost in silence") {
  const Folder folder;
  const std::vector<std::uint64_t> keys = {5, 1, 40};
  const std::vector<std::size_t> ends = write_journal(folder.file(), keys);
  const std::string whole = bytes_of(folder.file());
  for (std::size_t at = 0; at < whole.size(); ++at) {
    for (int bit = 0; bit < 8; ++bit) {
      std::string bytes = whole;
      bytes[at] = static_cast<char>(bytes[at] ^ (1 << bit));
      put(folder.file(), bytes);
      INFO("byte " << at << ", bit " << bit);
      const Result<Journal> journal = Journal::resume(folder.file(), kWork);
      if (!journal) {
        REQUIRE(at < ends[keys.size() - 1]);
        const std::size_t record =
            static_cast<std::size_t>(std::upper_bound(ends.begin(), ends.end(), at) - ends.begin());
        REQUIRE(
            (record == 0 || names(journal.failure().message, "record " + std::to_string(record - 1) + ", at byte")));
        REQUIRE(bytes_of(folder.file()) == bytes);
        continue;
      }
      // the last record was dropped, or the bit says nothing in the deflated form
      REQUIRE(at >= ends[0]);
      REQUIRE(journal->records().size() >= keys.size() - 1);
      REQUIRE((journal->records().size() == keys.size() || at >= ends[keys.size() - 1]));
      for (const auto& [key, record] : journal->records()) REQUIRE(is_block_of(key, journal->read(key)));
    }
  }
}

TEST_CASE("rubbish at the end is dropped, however much it looks like a record") {
  const Folder folder;
  write_journal(folder.file(), {5, 1});
  const std::string whole = bytes_of(folder.file());
  for (const std::string& tail :
       {std::string(5000, '\0'), std::string("REC\n"), std::string("REC\nREC\nREC\n") + std::string(100, 'R'),
        whole.substr(whole.size() - 40), std::string(1 << 20, '\n') + "REC\n"}) {
    put(folder.file(), whole + tail);
    const Journal journal = opened(Journal::resume(folder.file(), kWork));
    CHECK(journal.records().size() == 2);
    CHECK(journal.dropped() == tail.size());
    CHECK(bytes_of(folder.file()) == whole);
  }
}

TEST_CASE("a good record far behind a damaged one is found") {
  const Folder folder;
  const std::vector<std::size_t> ends = write_journal(folder.file(), {5, 1, 2});
  const std::string whole = bytes_of(folder.file());
  const std::string first = whole.substr(0, ends[1]), last = whole.substr(ends[2]);
  for (const std::size_t between : {(std::size_t{1} << 20) - 2, std::size_t{1} << 20, (std::size_t{3} << 20) + 7}) {
    const std::string bytes = first + std::string(between, 'x') + last;
    put(folder.file(), bytes);
    const auto journal = Journal::resume(folder.file(), kWork);
    REQUIRE_FALSE(journal);
    CHECK(names(journal.failure().message, "record 1, at byte " + std::to_string(ends[1]) + ", is damaged"));
    CHECK(names(journal.failure().message, "from byte " + std::to_string(ends[1] + between)));
    CHECK(fs::file_size(folder.file()) == bytes.size());
  }
}

TEST_CASE("a record that stands twice is named") {
  const Folder folder;
  const std::vector<std::size_t> ends = write_journal(folder.file(), {5, 1});
  const std::string whole = bytes_of(folder.file());
  put(folder.file(), whole + whole.substr(ends[0], ends[1] - ends[0]));
  const auto journal = Journal::resume(folder.file(), kWork);
  REQUIRE_FALSE(journal);
  CHECK(names(journal.failure().message, "record 2 has the key 5"));
}

TEST_CASE("a journal of other work is refused, and both are named") {
  const Folder folder;
  write_journal(folder.file(), {5});
  const std::string whole = bytes_of(folder.file());
  for (const char* other : {"{\"depth\":7}", "{\"depth\":66}", "{}", ""}) {
    const auto journal = Journal::resume(folder.file(), other);
    REQUIRE_FALSE(journal);
    CHECK(names(journal.failure().message, std::string("'") + other + "'"));
    CHECK(names(journal.failure().message, std::string("'") + kWork + "'"));
    CHECK(bytes_of(folder.file()) == whole);
  }
}

TEST_CASE("what is no journal, or one of another version, is left alone") {
  const Folder folder;
  put(folder.file(), "some notes");
  CHECK(names(Journal::resume(folder.file(), kWork).failure().message, "is not a journal"));
  CHECK(bytes_of(folder.file()) == "some notes");
  CHECK_FALSE(Journal::resume((folder.path / "missing").string(), kWork));
  CHECK_FALSE(Journal::resume(folder.path.string(), kWork));
  CHECK_FALSE(Journal::create((folder.path / "missing" / "run").string(), kWork));
  std::string newer = bytes_of(std::string(MERESTONE_TESTS_DIR) + "/format/area/three.journal");
  newer[22] = 2;  // the version, after the magic line of 22 bytes
  put(folder.file(), newer);
  CHECK(names(Journal::resume(folder.file(), kWork).failure().message, "journal of version 2"));
}

TEST_CASE("a journal is not begun over one that is there") {
  const Folder folder;
  write_journal(folder.file(), {5});
  const std::string whole = bytes_of(folder.file());
  const auto journal = Journal::create(folder.file(), kWork);
  REQUIRE_FALSE(journal);
  CHECK(names(journal.failure().message, folder.file()));
  CHECK(bytes_of(folder.file()) == whole);
}

TEST_CASE("two runs do not share a journal") {
  const Folder folder;
  {
    const Journal first = opened(Journal::create(folder.file(), kWork));
    const auto second = Journal::resume(folder.file(), kWork);
    REQUIRE_FALSE(second);
    CHECK(names(second.failure().message, "another run has it in use"));
  }
  CHECK(Journal::resume(folder.file(), kWork));
}

TEST_CASE("a run that is killed leaves its lock and no broken record") {
  const Folder folder;
  write_journal(folder.file(), {0});
  const pid_t child = ::fork();
  REQUIRE(child >= 0);
  if (child == 0) {
    auto journal = Journal::resume(folder.file(), kWork);
    for (std::uint64_t key = 1; journal && !journal.value().append(key, block_of(key)); ++key) {
    }
    ::_exit(1);
  }
  while (fs::file_size(folder.file()) < 20'000) std::this_thread::yield();
  ::kill(child, SIGKILL);
  ::waitpid(child, nullptr, 0);
  const Journal journal = opened(Journal::resume(folder.file(), kWork));
  std::uint64_t next = 0;
  for (const auto& [key, record] : journal.records()) {
    REQUIRE(key == next++);
    REQUIRE(is_block_of(key, journal.read(key)));
  }
  CHECK(next > 10);
}

TEST_CASE("when there is no room, the journal stays as it was and goes on later") {
  const Folder folder;
  write_journal(folder.file(), {5, 1});
  Journal journal = opened(Journal::resume(folder.file(), kWork));
  const std::string whole = bytes_of(folder.file());
  // a limit on the length of files stands for a disk that is full: a write that ends in the middle, then an error
  struct rlimit before {};
  REQUIRE(::getrlimit(RLIMIT_FSIZE, &before) == 0);
  auto* const handler = std::signal(SIGXFSZ, SIG_IGN);
  struct rlimit limited = before;
  limited.rlim_cur = whole.size() + 50;
  REQUIRE(::setrlimit(RLIMIT_FSIZE, &limited) == 0);
  const auto problem = journal.append(40, block_of(40));
  ::setrlimit(RLIMIT_FSIZE, &before);
  std::signal(SIGXFSZ, handler);
  REQUIRE(problem);
  CHECK(names(problem->message, folder.file() + ": writing failed"));
  CHECK(bytes_of(folder.file()) == whole);
  CHECK_FALSE(journal.contains(40));
  REQUIRE_FALSE(journal.append(40, block_of(40)));
  CHECK(is_block_of(40, journal.read(40)));
}

TEST_CASE("damage that happens while a journal is in use is found on reading") {
  const Folder folder;
  write_journal(folder.file(), {5, 1});
  const Journal journal = opened(Journal::resume(folder.file(), kWork));
  std::fstream file(folder.file(), std::ios::in | std::ios::out | std::ios::binary);
  file.seekp(-3, std::ios::end) << '\xff';
  file.seekp(-2, std::ios::end) << '\xff';
  file.close();
  CHECK(names(journal.read(1).failure().message, "block 1 of this journal"));
  CHECK(is_block_of(5, journal.read(5)));
}

TEST_CASE("a journal is removed when its work is done") {
  const Folder folder;
  write_journal(folder.file(), {5});
  Journal journal = opened(Journal::resume(folder.file(), kWork));
  CHECK_FALSE(journal.remove());
  CHECK_FALSE(fs::exists(folder.file()));
}
