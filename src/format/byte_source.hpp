#pragma once
#include <cstdint>
#include <cstdio>
#include <memory>
#include <optional>
#include <string>
#include <string_view>

#include "format/read_fault.hpp"

namespace merestone {

/// Bytes read once, front to back: a file, a pipe, memory.
class ByteSource {
 public:
  static Read<ByteSource> open(const std::string& path);
  static ByteSource standard_input();
  /// Requires the bytes to outlive the source.
  static Read<ByteSource> memory(std::string_view bytes);

  /// The next byte without taking it; empty at the end or on failure.
  std::optional<unsigned char> peek();
  /// Replaces `out` by the next `length` bytes, or by fewer when the source ends. Memory grows with the bytes that
  /// are there, not with `length`. Returns the fault when reading failed.
  std::optional<ReadFault> read(std::string& out, std::size_t length);

  /// Bytes taken so far.
  std::uint64_t offset() const { return offset_; }

 private:
  struct Closer {
    void operator()(std::FILE* file) const {
      if (file != stdin) std::fclose(file);
    }
  };
  explicit ByteSource(std::FILE* file) : file_(file) {}

  std::unique_ptr<std::FILE, Closer> file_;
  std::uint64_t offset_ = 0;
};

}  // namespace merestone
