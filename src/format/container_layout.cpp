#include "format/container_layout.hpp"

#include <algorithm>

namespace merestone {

void put_integer(std::string& out, std::uint64_t value, std::size_t bytes) {
  for (std::size_t i = 0; i < bytes; ++i) out += static_cast<char>((value >> (8 * i)) & 0xff);
}

void put_digest(std::string& out, const Sha256& digest) { out.append(digest.begin(), digest.end()); }

std::uint64_t take_integer(std::string_view& bytes, std::size_t count) {
  std::uint64_t value = 0;
  for (std::size_t i = 0; i < count; ++i) value |= std::uint64_t{static_cast<unsigned char>(bytes[i])} << (8 * i);
  bytes.remove_prefix(count);
  return value;
}

Sha256 take_digest(std::string_view& bytes) {
  Sha256 digest{};
  std::copy_n(bytes.begin(), kDigestLength, digest.begin());
  bytes.remove_prefix(kDigestLength);
  return digest;
}

std::string block_name(std::uint64_t ordinal) { return "block " + std::to_string(ordinal); }

ReadFault damaged(const std::string& part, const std::string& reason) { return malformed({part + ": " + reason}); }

}  // namespace merestone
