#include "format/area_block.hpp"

#include "format/component_payload.hpp"
#include "format/container_layout.hpp"
#include "format/cover_payload.hpp"
#include "format/shown.hpp"

namespace merestone {

namespace {

/// A block and how many entries it has.
struct Opened {
  AreaBlock block;
  std::uint64_t entries = 0;
};

Result<Opened> opened_cover(AreaKind kind, ByteCursor& bytes) {
  std::uint64_t marked = 0;
  Result<CoverBlock> block = take_cover(bytes, marked);
  if (!block) return block.failure();
  return Opened{{0, kind, std::move(block.value())}, marked};
}

Result<Opened> opened_components(ByteCursor& bytes) {
  Result<std::vector<Component>> components = take_components(bytes);
  if (!components) return components.failure();
  const std::uint64_t count = components->size();
  return Opened{{0, AreaKind::components, std::move(components.value())}, count};
}

Result<Opened> read_payload(std::string_view payload) {
  ByteCursor bytes(payload);
  const auto kind = static_cast<AreaKind>(bytes.u8());
  if (!bytes.ok()) return Failure{"the payload is empty"};
  switch (kind) {
    case AreaKind::trunk:
    case AreaKind::cover:
      return opened_cover(kind, bytes);
    case AreaKind::components:
      return opened_components(bytes);
  }
  return Failure{"the payload does not begin with T, C or N"};
}

Result<AreaBlock> open_stored(const StoredBlock& block) {
  const Result<std::string> payload = open_payload(block.stored, block.payload_length, block.crc, block.digest);
  if (!payload) return payload.failure();
  Result<Opened> opened = read_payload(*payload);
  if (!opened) return opened.failure();
  if (opened->entries != block.entries)
    return Failure{"it declares " + grouped(block.entries) + " entries and has " + grouped(opened->entries)};
  opened.value().block.ordinal = block.ordinal;
  return std::move(opened.value().block);
}

// Read again before it is packed: nothing is written that a reader refuses or takes for something else.
Result<PackedBlock> pack_cover(AreaKind kind, const CoverBlock& block) {
  std::string payload(1, static_cast<char>(kind));
  put_cover(payload, block);
  const Result<Opened> again = read_payload(payload);
  if (!again) return Failure{"this block cannot be written: " + again.failure().message};
  if (!(again->block.cover() == block))
    return Failure{"this block cannot be written: it has figures that are not stored"};
  return pack_payload(again->entries, payload);
}

}  // namespace

Read<AreaBlock> open_area_block(const StoredBlock& block) {
  Result<AreaBlock> opened = open_stored(block);
  if (!opened) return malformed({block_name(block.ordinal) + ", " + opened.failure().message});
  return std::move(opened.value());
}

Read<AbsentCover> open_absent(const AbsentBlock& block) {
  ByteCursor bytes(block.summary);
  const Result<CoverBlock> said = take_cover_summary(bytes);
  if (!said) return malformed({block_name(block.ordinal) + ", which is absent, " + said.failure().message});
  return AbsentCover{block.ordinal, block.entries,       block.payload_length, said->column, said->row,
                     said->grade,   said->outside_cells, said->inside_cells,   block.digest};
}

Result<PackedBlock> pack_trunk(const CoverBlock& block) { return pack_cover(AreaKind::trunk, block); }

Result<PackedBlock> pack_cover_block(const CoverBlock& block) { return pack_cover(AreaKind::cover, block); }

Result<PackedBlock> pack_components(std::span<const Component> components) {
  std::string payload(1, static_cast<char>(AreaKind::components));
  put_components(payload, components);
  if (const Result<Opened> again = read_payload(payload); !again)
    return Failure{"these components cannot be written: " + again.failure().message};
  return pack_payload(components.size(), payload);
}

AbsentCover absent_of(const CoverBlock& block, const PackedBlock& packed) {
  return {0,           packed.entries,      packed.payload_length, block.column, block.row,
          block.grade, block.outside_cells, block.inside_cells,    packed.digest};
}

}  // namespace merestone
