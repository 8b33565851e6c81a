#include "catch.hpp"

#include <filesystem>
#include <fstream>

#include "format/atomic_file.hpp"

using namespace merestone;
namespace fs = std::filesystem;

namespace {

struct Folder {
  fs::path path = fs::temp_directory_path() / "merestone-atomic-XXXXXX";
  Folder() {
    std::string name = path.string();
    REQUIRE(::mkdtemp(name.data()) != nullptr);
    path = name;
  }
  ~Folder() { fs::remove_all(path); }
  std::size_t entries() const {
    return static_cast<std::size_t>(std::distance(fs::directory_iterator(path), fs::directory_iterator()));
  }
};

std::string text_of(const fs::path& path) {
  std::ifstream file(path);
  return {std::istreambuf_iterator<char>(file), {}};
}

}  // namespace

TEST_CASE("a file appears whole, on commit") {
  const Folder folder;
  const fs::path path = folder.path / "claims";
  auto file = AtomicFile::create(path.string());
  REQUIRE(file);
  CHECK_FALSE(file.value().write("one"));
  CHECK_FALSE(fs::exists(path));
  CHECK_FALSE(file.value().write(" two"));
  CHECK_FALSE(file.value().commit());
  CHECK(text_of(path) == "one two");
  CHECK(folder.entries() == 1);
}

TEST_CASE("a file that is given up leaves nothing behind, and the older one alone") {
  const Folder folder;
  const fs::path path = folder.path / "claims";
  std::ofstream(path) << "older";
  {
    auto file = AtomicFile::create(path.string());
    REQUIRE(file);
    CHECK_FALSE(file.value().write("newer"));
  }
  CHECK(text_of(path) == "older");
  CHECK(folder.entries() == 1);
}

TEST_CASE("paths that cannot be written are refused with their name") {
  const Folder folder;
  for (const fs::path& path : {folder.path, folder.path / "missing" / "claims"}) {
    const auto file = AtomicFile::create(path.string());
    REQUIRE_FALSE(file);
    CHECK(file.failure().message.find(path.string()) == 0);
  }
}
