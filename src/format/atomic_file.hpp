#pragma once
#include <cstdio>
#include <memory>
#include <optional>
#include <string>
#include <string_view>

#include "kernel/result.hpp"

namespace merestone {

/// A file that appears under its name whole or not at all: written under a temporary name beside it, then renamed.
/// Dropped without commit, it leaves nothing behind.
class AtomicFile {
 public:
  /// On failure: the folder is missing or not writable, or the path names a folder.
  static Result<AtomicFile> create(const std::string& path);

  AtomicFile(AtomicFile&&) = default;
  AtomicFile& operator=(AtomicFile&&) = delete;
  ~AtomicFile();

  std::optional<Failure> write(std::string_view bytes);
  /// Makes the file durable and gives it its name. Nothing may be written afterwards.
  std::optional<Failure> commit();

  const std::string& path() const { return path_; }

 private:
  struct Closer {
    void operator()(std::FILE* file) const { std::fclose(file); }
  };
  AtomicFile(std::string path, std::string temporary, std::FILE* file)
      : path_(std::move(path)), temporary_(std::move(temporary)), file_(file) {}

  std::string path_, temporary_;
  std::unique_ptr<std::FILE, Closer> file_;
};

}  // namespace merestone
