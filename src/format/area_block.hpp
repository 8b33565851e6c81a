#pragma once
#include <cstdint>
#include <span>
#include <variant>
#include <vector>

#include "format/block_payload.hpp"
#include "format/container_reader.hpp"
#include "kernel/component.hpp"
#include "kernel/cover.hpp"

namespace merestone {

// The blocks of the content "area". The entries of a block of the cover are its marked cells, those of a list its
// components.

/// What a block is; the first byte of its payload.
enum class AreaKind : char {
  trunk = 'T',       // the block of the whole root
  cover = 'C',       // the block of one of the trunk's fine cells
  components = 'N',  // hyperbolic components
};

struct AreaBlock {
  std::uint64_t ordinal = 0;
  AreaKind kind = AreaKind::trunk;
  std::variant<CoverBlock, std::vector<Component>> content;  // components: the second

  /// Require that kind.
  const CoverBlock& cover() const { return std::get<0>(content); }
  const std::vector<Component>& components() const { return std::get<1>(content); }
};

/// A block of the cover (never the trunk) of which the file has the figures alone.
struct AbsentCover {
  std::uint64_t ordinal = 0, entries = 0, payload_length = 0;
  std::uint32_t column = 0, row = 0, grade = 0;
  std::uint64_t outside_cells = 0, inside_cells = 0;
  Sha256 digest{};
  friend bool operator==(const AbsentCover&, const AbsentCover&) = default;
};

/// Inflates the block, verifies length, CRC-32 and SHA-256, and that it is laid out as docs/certificate-format.md says,
/// with as many entries as it declares. How blocks follow each other is for AreaSequence to verify. A pure function;
/// faults name the block.
Read<AreaBlock> open_area_block(const StoredBlock& block);

/// What the file says of an absent block. Faults name the block.
Read<AbsentCover> open_absent(const AbsentBlock& block);

// Pure functions. What they pack is what open_area_block gives back. On failure: the block could not be read again.

Result<PackedBlock> pack_trunk(const CoverBlock& block);
Result<PackedBlock> pack_cover_block(const CoverBlock& block);
Result<PackedBlock> pack_components(std::span<const Component> components);

/// What stands in the file when the block does not. `ordinal` is for the writer to set.
AbsentCover absent_of(const CoverBlock& block, const PackedBlock& packed);

}  // namespace merestone
