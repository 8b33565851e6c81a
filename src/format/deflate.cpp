#include "format/deflate.hpp"

#include <zlib.h>

#include <algorithm>

namespace merestone {

namespace {

constexpr int kLevel = 6;
constexpr std::size_t kFirstChunk = std::size_t{1} << 20;

// An inflating stream, closed when it goes out of scope.
struct Inflation {
  z_stream stream{};
  bool ready = inflateInit(&stream) == Z_OK;
  Inflation() = default;
  Inflation(const Inflation&) = delete;
  Inflation& operator=(const Inflation&) = delete;
  ~Inflation() {
    if (ready) inflateEnd(&stream);
  }
};

}  // namespace

Result<std::string> deflated(std::string_view bytes) {
  uLongf length = compressBound(bytes.size());
  std::string out(length, '\0');
  if (compress2(reinterpret_cast<Bytef*>(out.data()), &length, reinterpret_cast<const Bytef*>(bytes.data()),
                bytes.size(), kLevel) != Z_OK)
    return Failure{"zlib could not deflate " + std::to_string(bytes.size()) + " bytes"};
  out.resize(length);
  return out;
}

Result<std::string> inflated(std::string_view stored, std::size_t length) {
  Inflation inflation;
  if (!inflation.ready) return Failure{"zlib could not start"};
  z_stream& z = inflation.stream;
  z.next_in = const_cast<Bytef*>(reinterpret_cast<const Bytef*>(stored.data()));
  z.avail_in = static_cast<uInt>(stored.size());
  std::string out;
  int status = Z_OK;
  while (status == Z_OK) {
    const std::size_t had = out.size();
    if (had == length) break;
    out.resize(std::min(length, std::max(kFirstChunk, 2 * had)));
    z.next_out = reinterpret_cast<Bytef*>(out.data()) + had;
    z.avail_out = static_cast<uInt>(out.size() - had);
    status = inflate(&z, Z_NO_FLUSH);
    out.resize(out.size() - z.avail_out);
  }
  if (status == Z_OK) {  // all bytes are there, but the end of the stream was not seen yet
    unsigned char beyond = 0;
    z.next_out = &beyond;
    z.avail_out = 1;
    status = inflate(&z, Z_FINISH);
    if (z.avail_out == 0) return Failure{"the stored data inflate to more than the " + std::to_string(length) + " bytes declared"};
  }
  if (status != Z_STREAM_END) return Failure{"the stored data are not a whole zlib stream"};
  if (out.size() != length)
    return Failure{"the stored data inflate to " + std::to_string(out.size()) + " bytes, not the " +
                   std::to_string(length) + " declared"};
  if (z.avail_in != 0) return Failure{"bytes follow the zlib stream"};
  return out;
}

}  // namespace merestone
