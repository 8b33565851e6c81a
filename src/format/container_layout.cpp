#include "format/container_layout.hpp"

namespace merestone {

void put_integer(std::string& out, std::uint64_t value, std::size_t bytes) {
  for (std::size_t i = 0; i < bytes; ++i) out += static_cast<char>((value >> (8 * i)) & 0xff);
}

std::uint64_t take_integer(std::string_view& bytes, std::size_t count) {
  std::uint64_t value = 0;
  for (std::size_t i = 0; i < count; ++i) value |= std::uint64_t{static_cast<unsigned char>(bytes[i])} << (8 * i);
  bytes.remove_prefix(count);
  return value;
}

}  // namespace merestone
