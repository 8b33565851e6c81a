#pragma once
#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>

namespace merestone {

// What reader and writer of containers share; docs/certificate-format.md has the layout.

inline constexpr std::string_view kContainerFormat = "merestone-container";
inline constexpr std::string_view kContainerMagic = "\x93" "merestone\r\n\x1a\n";
inline constexpr std::string_view kBlockMark = "BLK\n";
inline constexpr std::string_view kIndexMark = "IDX\n";
inline constexpr std::string_view kEndMark = "END\n";

inline constexpr std::size_t kMarkLength = 4;
inline constexpr std::size_t kDigestLength = 32;
inline constexpr std::uint64_t kClaimsOfBlock = 4096;
inline constexpr std::uint64_t kLargestHeader = std::uint64_t{1} << 20;
inline constexpr std::uint64_t kLargestPayload = std::uint64_t{64} << 20;
inline constexpr std::uint64_t kLargestStored = std::uint64_t{64} << 20;

/// Appends the integer's lowest `bytes` bytes, least significant first.
void put_integer(std::string& out, std::uint64_t value, std::size_t bytes);
/// Takes an integer of that many bytes from the front. Requires that many.
std::uint64_t take_integer(std::string_view& bytes, std::size_t count);

}  // namespace merestone
