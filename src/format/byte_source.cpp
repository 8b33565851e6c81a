#include "format/byte_source.hpp"

#include <algorithm>
#include <cerrno>
#include <system_error>

namespace merestone {

namespace {

constexpr std::size_t kChunk = std::size_t{1} << 20;

ReadFault input_fault(const std::string& what, int error) {
  return {ReadFault::Kind::input, what + ": " + std::generic_category().message(error)};
}

}  // namespace

Read<ByteSource> ByteSource::open(const std::string& path) {
  std::FILE* const file = std::fopen(path.c_str(), "rbe");
  if (file == nullptr) return input_fault("it cannot be opened", errno);
  return ByteSource(file);
}

ByteSource ByteSource::standard_input() { return ByteSource(stdin); }

Read<ByteSource> ByteSource::memory(std::string_view bytes) {
  // fmemopen refuses an empty buffer.
  std::FILE* const file = bytes.empty() ? std::fopen("/dev/null", "rbe")
                                        : fmemopen(const_cast<char*>(bytes.data()), bytes.size(), "rb");
  if (file == nullptr) return input_fault("memory cannot be opened", errno);
  return ByteSource(file);
}

std::optional<unsigned char> ByteSource::peek() {
  const int next = std::fgetc(file_.get());
  if (next == EOF) return std::nullopt;
  std::ungetc(next, file_.get());
  return static_cast<unsigned char>(next);
}

std::optional<ReadFault> ByteSource::read(std::string& out, std::size_t length) {
  out.clear();
  while (out.size() < length) {
    const std::size_t had = out.size(), wanted = std::min(length - had, kChunk);
    out.resize(had + wanted);
    errno = 0;
    const std::size_t got = std::fread(out.data() + had, 1, wanted, file_.get());
    out.resize(had + got);
    offset_ += got;
    if (got == wanted) continue;
    if (std::ferror(file_.get()) != 0) return input_fault("reading failed at byte " + std::to_string(offset_), errno);
    break;
  }
  return std::nullopt;
}

}  // namespace merestone
