// Any bytes as the payload of a block of an area container: refused, or packed again as the same bytes. (A fuzzer does not
// find its way through a SHA-256, so the payload is put into a block here.)
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "format/area_block.hpp"

using namespace merestone;

namespace {

// The block with as many entries as a fault says that it has, since they are not known beforehand.
std::uint64_t entries_of(const std::string& fault) {
  constexpr std::string_view kSaid = " entries and has ";
  const std::size_t at = fault.find(kSaid);
  if (at == fault.npos) return 0;
  std::uint64_t count = 0;
  for (const char c : fault.substr(at + kSaid.size()))
    if (c != ',') count = 10 * count + static_cast<std::uint64_t>(c - '0');
  return count;
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const Result<PackedBlock> packed = pack_payload(0, std::string_view(reinterpret_cast<const char*>(data), size));
  if (!packed) std::abort();
  StoredBlock stored{0, 0, packed->payload_length, packed->crc, packed->digest, packed->stored};
  auto opened = open_area_block(stored);
  if (const ReadFault* fault = fault_of(opened)) {
    stored.entries = entries_of(fault->message);
    opened = open_area_block(stored);
  }
  const auto* block = std::get_if<AreaBlock>(&opened);
  if (block == nullptr) return 0;
  const Result<PackedBlock> again = block->kind == AreaKind::components ? pack_components(block->components())
                                    : block->kind == AreaKind::trunk    ? pack_trunk(block->cover())
                                                                        : pack_cover_block(block->cover());
  if (!again || again->digest != stored.digest || again->entries != stored.entries) std::abort();
  return 0;
}
