// Any bytes as a journal: refused and left as it is, or resumed with blocks that open, shortened at most. Then it takes one
// block more, and a second reading finds the same.
#include <unistd.h>

#include <cstdint>
#include <cstdlib>
#include <filesystem>
#include <fstream>

#include "format/journal.hpp"

using namespace merestone;

namespace {

constexpr const char* kWork = "{\"depth\":6}";

std::string journal_path() {
  return (std::filesystem::temp_directory_path() / ("merestone-fuzz-" + std::to_string(::getpid()))).string();
}

void demand(bool holds) {
  if (!holds) std::abort();
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  static const std::string path = journal_path();
  std::filesystem::remove(path);
  std::ofstream(path, std::ios::binary).write(reinterpret_cast<const char*>(data), static_cast<std::streamsize>(size));
  std::size_t had = 0;
  bool was_good = false;
  {
    Result<Journal> journal = Journal::resume(path, kWork);
    was_good = journal.ok();
    if (!was_good) {
      demand(std::filesystem::file_size(path) == size);
    } else {
      had = journal->records().size();
      for (const auto& [key, record] : journal->records()) demand(journal->read(key).ok());
      const Result<PackedBlock> block = pack_payload(1, "one more");
      if (!journal->contains(77)) demand(!journal.value().append(77, *block) && ++had > 0);
    }
  }
  const Result<Journal> again = Journal::resume(path, kWork);
  demand(again.ok() == was_good);
  if (again) demand(again->records().size() == had && again->dropped() == 0);
  std::filesystem::remove(path);
  return 0;
}
