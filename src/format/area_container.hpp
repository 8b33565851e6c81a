#pragma once
#include <cstdint>
#include <nlohmann/json.hpp>
#include <string>
#include <variant>

#include "format/area_block.hpp"
#include "format/area_header.hpp"
#include "format/container_reader.hpp"
#include "format/container_writer.hpp"

namespace merestone {

// The content "area": bounds of the area of M, by a cover and by hyperbolic components.

/// What ends an area container that is whole.
struct AreaEnd {
  std::uint64_t blocks = 0;
  /// The claims-digest, provided that every block was opened and admitted by an AreaSequence without fault, and its
  /// finish() found none. Blocks that are absent enter it by the digest that the file gives.
  Sha256 digest{};
};

/// Reads an area container, a block at a time. What is inside a block is for open_area_block to verify, which may be
/// done by other threads meanwhile; that blocks follow each other properly is for an AreaSequence. Faults name the
/// block.
class AreaReader {
 public:
  /// Takes over a frame of which no block was read yet, or passes on the fault.
  static Read<AreaReader> open(Read<ContainerReader> frame);

  const AreaHeader& header() const { return header_; }

  using Next = std::variant<StoredBlock, AbsentCover, AreaEnd, ReadFault>;
  /// The next block; after the last one the end. Not to be called again after end or fault.
  Next next();

 private:
  AreaReader(ContainerReader frame, AreaHeader header) : frame_(std::move(frame)), header_(std::move(header)) {}

  ContainerReader frame_;
  AreaHeader header_;
};

/// Makes the bytes of an area container one part after another: header, then each block in order, then the end. It does
/// not look at the order; an AreaSequence does.
class AreaWriter {
 public:
  /// On failure: a reader would refuse the header.
  static Result<AreaWriter> create(const AreaHeader& header);

  std::string header(const nlohmann::json& provenance);
  std::string block(const PackedBlock& block) { return frame_.block(block); }
  /// Its ordinal is set.
  std::string absent(const AbsentCover& block);
  /// Requires at least one block.
  std::string end() const { return frame_.end(); }

  std::uint64_t blocks() const { return frame_.blocks(); }
  Sha256 digest() const { return container_digest(header_, frame_.digests()); }

 private:
  explicit AreaWriter(nlohmann::json header) : header_(std::move(header)) {}

  nlohmann::json header_;
  ContainerWriter frame_;
};

}  // namespace merestone
