#pragma once
#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

#include "format/digest.hpp"
#include "kernel/result.hpp"

namespace merestone {

/// A payload deflated, with the figures that the head of its block and the index need.
struct PackedBlock {
  std::uint64_t entries = 0, payload_length = 0;
  std::uint32_t crc = 0;
  Sha256 digest{};
  std::string stored;
};

/// On failure: the payload is larger than a block may be.
Result<PackedBlock> pack_payload(std::uint64_t entries, std::string_view payload);

/// The payload of what is stored, with its length, CRC-32 and SHA-256 verified. A pure function.
Result<std::string> open_payload(std::string_view stored, std::uint64_t payload_length, std::uint32_t crc,
                                 const Sha256& digest);

/// Why figures of a payload cannot be those of a block, or nothing: it, or what is stored, is above the limit, or no
/// deflated data of that length hold so much. To be asked before the stored data are read.
std::optional<Failure> check_lengths(std::uint64_t payload_length, std::uint64_t stored_length);

}  // namespace merestone
