#include "format/block_payload.hpp"

#include "format/container_layout.hpp"
#include "format/deflate.hpp"
#include "format/shown.hpp"

namespace merestone {

Result<PackedBlock> pack_payload(std::uint64_t entries, std::string_view payload) {
  if (payload.size() > kLargestPayload)
    return Failure{"a block of " + grouped(payload.size()) + " bytes is larger than 64 MiB"};
  Result<std::string> stored = deflated(payload);
  if (!stored) return stored.failure();
  return PackedBlock{entries, payload.size(), crc32_of(payload), sha256(payload), std::move(stored.value())};
}

Result<std::string> open_payload(std::string_view stored, std::uint64_t payload_length, std::uint32_t crc,
                                 const Sha256& digest) {
  Result<std::string> payload = inflated(stored, payload_length);
  if (!payload) return payload.failure();
  if (crc32_of(*payload) != crc) return Failure{"the CRC-32 of the payload does not match: the block is damaged"};
  if (sha256(*payload) != digest) return Failure{"the SHA-256 of the payload does not match: the block is damaged"};
  return payload;
}

std::optional<Failure> check_lengths(std::uint64_t payload_length, std::uint64_t stored_length) {
  if (payload_length > kLargestPayload) return Failure{"it declares a payload above 64 MiB"};
  if (stored_length > kLargestStored) return Failure{"it declares stored data above 64 MiB"};
  if (payload_length > kLargestInflation * stored_length)
    return Failure{"it declares a payload of " + grouped(payload_length) + " bytes, more than " +
                   grouped(stored_length) + " bytes of deflated data can hold"};
  return std::nullopt;
}

}  // namespace merestone
