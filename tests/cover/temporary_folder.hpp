#pragma once
#include <stdlib.h>

#include <filesystem>
#include <string>

#include "catch.hpp"

/// A folder of its own for a test, removed with all that is in it.
struct TemporaryFolder {
  std::filesystem::path path = std::filesystem::temp_directory_path() / "merestone-cover-XXXXXX";
  TemporaryFolder() {
    std::string name = path.string();
    REQUIRE(::mkdtemp(name.data()) != nullptr);
    path = name;
  }
  TemporaryFolder(const TemporaryFolder&) = delete;
  TemporaryFolder& operator=(const TemporaryFolder&) = delete;
  ~TemporaryFolder() { std::filesystem::remove_all(path); }
  std::string file() const { return (path / "run.journal").string(); }
};
