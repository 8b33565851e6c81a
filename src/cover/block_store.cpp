#include "cover/block_store.hpp"

#include "format/component_payload.hpp"

namespace merestone {

namespace {

// Above the keys of all places; the key says which block it is, and of how many.
constexpr std::uint64_t kComponents = std::uint64_t{1} << 62;
constexpr unsigned kCountBits = 20;

std::uint64_t component_key(std::uint64_t blocks, std::uint64_t which) {
  return kComponents | blocks << kCountBits | which;
}

StoredBlock as_stored(PackedBlock block) {
  StoredBlock stored;
  stored.entries = block.entries;
  stored.payload_length = block.payload_length;
  stored.crc = block.crc;
  stored.digest = block.digest;
  stored.stored = std::move(block.stored);
  return stored;
}

Result<AreaBlock> opened(Result<PackedBlock> packed) {
  if (!packed) return packed.failure();
  Read<AreaBlock> block = open_area_block(as_stored(std::move(packed.value())));
  if (const ReadFault* fault = fault_of(block)) return Failure{"the journal: " + fault->message};
  return std::get<AreaBlock>(std::move(block));
}

}  // namespace

Result<CoverBlock> BlockStore::block(const BlockPlace& place) const {
  Result<AreaBlock> block = opened(packed(place));
  if (!block) return block.failure();
  return block->cover();
}

Result<std::optional<std::vector<Component>>> BlockStore::components() const {
  const auto& records = journal_.records();
  const auto first = records.lower_bound(kComponents);
  if (first == records.end()) return std::optional<std::vector<Component>>();
  const std::uint64_t blocks = (first->first & ~kComponents) >> kCountBits;
  std::vector<Component> all;
  for (std::uint64_t k = 0; k < blocks; ++k) {
    if (!journal_.contains(component_key(blocks, k))) return std::optional<std::vector<Component>>();
    const Result<AreaBlock> block = opened(journal_.read(component_key(blocks, k)));
    if (!block) return block.failure();
    all.insert(all.end(), block->components().begin(), block->components().end());
  }
  return std::optional(std::move(all));
}

std::optional<Failure> BlockStore::put_components(std::span<const Component> components) {
  const std::uint64_t blocks = (components.size() + kComponentsOfBlock - 1) / kComponentsOfBlock;
  std::uint64_t which = 0;
  return for_each_component_block(components, [&](const PackedBlock& block) -> std::optional<Failure> {
    const std::uint64_t key = component_key(blocks, which++);
    return journal_.contains(key) ? std::nullopt : journal_.append(key, block);
  });
}

std::optional<Failure> for_each_component_block(std::span<const Component> components,
                                                const std::function<std::optional<Failure>(const PackedBlock&)>& take) {
  for (std::size_t first = 0; first < components.size(); first += kComponentsOfBlock) {
    const std::size_t count = std::min<std::size_t>(kComponentsOfBlock, components.size() - first);
    const Result<PackedBlock> packed = pack_components(components.subspan(first, count));
    if (!packed) return packed.failure();
    if (auto problem = take(*packed)) return problem;
  }
  return std::nullopt;
}

}  // namespace merestone
