#pragma once
#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <utility>

#include "kernel/result.hpp"

namespace merestone {

/// A file that this process has open, alone: an exclusive lock is on it until it is closed, by a crash too. Failures
/// name the path.
class OpenFile {
 public:
  /// Creates the file. On failure: there is one already, or it cannot be created.
  static Result<OpenFile> create(const std::string& path);
  /// Opens a regular file that is there, for reading and for appending.
  /// On failure: it cannot be opened, or another process has it.
  static Result<OpenFile> open(const std::string& path);

  OpenFile(OpenFile&& other) noexcept
      : path_(std::move(other.path_)), descriptor_(std::exchange(other.descriptor_, -1)) {}
  OpenFile& operator=(OpenFile&&) = delete;
  ~OpenFile();

  const std::string& path() const { return path_; }
  Result<std::uint64_t> length() const;
  /// Exactly the `length` bytes from `offset`, or fewer when the file ends there. Any thread may ask.
  Result<std::string> read(std::uint64_t offset, std::uint64_t length) const;
  /// All bytes at the end of the file, in one write where the system takes them in one.
  std::optional<Failure> append(std::string_view bytes);
  std::optional<Failure> truncate(std::uint64_t length);
  /// Returns when what was written will outlive a loss of power.
  std::optional<Failure> sync();
  std::optional<Failure> remove();

 private:
  OpenFile(std::string path, int descriptor) : path_(std::move(path)), descriptor_(descriptor) {}
  static Result<OpenFile> locked(const std::string& path, int flags, const char* what);
  Failure failed(const char* what) const;

  std::string path_;
  int descriptor_;
};

}  // namespace merestone
