#include "format/byte_cursor.hpp"

#include <bit>
#include <cmath>

#include "format/container_layout.hpp"

namespace merestone {

std::string_view ByteCursor::bytes(std::size_t count) {
  if (count > rest_.size()) ok_ = false;
  if (!ok_) return {};
  const std::string_view taken = rest_.substr(0, count);
  rest_.remove_prefix(count);
  return taken;
}

std::uint64_t ByteCursor::integer(std::size_t count) {
  std::string_view taken = bytes(count);
  return ok_ ? take_integer(taken, count) : 0;
}

double ByteCursor::number() {
  const double value = std::bit_cast<double>(u64());
  if (!std::isfinite(value) || (value == 0 && std::signbit(value))) ok_ = false;
  return ok_ ? value : 0;
}

void put_number(std::string& out, double value) { put_integer(out, std::bit_cast<std::uint64_t>(value), 8); }

}  // namespace merestone
