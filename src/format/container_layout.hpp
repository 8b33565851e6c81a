#pragma once
#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>

#include "format/digest.hpp"
#include "format/read_fault.hpp"

namespace merestone {

// What reader and writer of containers share; docs/certificate-format.md has the layout.

inline constexpr std::string_view kContainerFormat = "merestone-container";
inline constexpr std::string_view kContainerMagic = "\x93" "merestone\r\n\x1a\n";
inline constexpr std::string_view kBlockMark = "BLK\n";
inline constexpr std::string_view kAbsentMark = "ABS\n";
inline constexpr std::string_view kIndexMark = "IDX\n";
inline constexpr std::string_view kEndMark = "END\n";

inline constexpr std::size_t kMarkLength = 4;
inline constexpr std::size_t kDigestLength = 32;
inline constexpr std::uint64_t kLargestHeader = std::uint64_t{1} << 20;
inline constexpr std::uint64_t kLargestPayload = std::uint64_t{64} << 20;
inline constexpr std::uint64_t kLargestStored = std::uint64_t{64} << 20;
/// No byte of a deflated stream stands for more bytes than this (RFC 1951: 258 bytes from two bits, 1032 from eight).
inline constexpr std::uint64_t kLargestInflation = 1100;

/// Appends the integer's lowest `bytes` bytes, least significant first.
void put_integer(std::string& out, std::uint64_t value, std::size_t bytes);
void put_digest(std::string& out, const Sha256& digest);
/// Takes an integer of that many bytes from the front. Requires that many.
std::uint64_t take_integer(std::string_view& bytes, std::size_t count);
/// Requires kDigestLength bytes.
Sha256 take_digest(std::string_view& bytes);

/// "block 7", as messages name it.
std::string block_name(std::uint64_t ordinal);
/// "PART: reason".
ReadFault damaged(const std::string& part, const std::string& reason);

}  // namespace merestone
