#pragma once
#include <cstdint>
#include <string>
#include <string_view>

namespace merestone {

/// Takes numbers from the front of a binary payload. Once the bytes have run out, or a double is none that a payload
/// may hold, everything taken is 0 or empty and `ok` is false: ask before believing.
class ByteCursor {
 public:
  explicit ByteCursor(std::string_view bytes) : rest_(bytes) {}

  std::uint8_t u8() { return static_cast<std::uint8_t>(integer(1)); }
  std::uint16_t u16() { return static_cast<std::uint16_t>(integer(2)); }
  std::uint32_t u32() { return static_cast<std::uint32_t>(integer(4)); }
  /// Two's complement.
  std::int32_t i32() { return static_cast<std::int32_t>(u32()); }
  std::uint64_t u64() { return integer(8); }
  /// IEEE 754 binary64. Finite, and not -0: every number has one spelling.
  double number();
  std::string_view bytes(std::size_t count);

  bool ok() const { return ok_; }
  std::size_t left() const { return rest_.size(); }

 private:
  std::uint64_t integer(std::size_t count);

  std::string_view rest_;
  bool ok_ = true;
};

/// Appends the number's eight bytes.
void put_number(std::string& out, double value);

}  // namespace merestone
