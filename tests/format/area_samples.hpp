#pragma once
// The contents of tests/format/area/whole.mere, and what the tests of the area container share. The figures are
// invented.
#include "catch.hpp"

#include <fstream>
#include <iterator>
#include <string>
#include <vector>

#include "format/area_container.hpp"
#include "format/area_sequence.hpp"

namespace merestone::samples {

inline std::string file_text(const std::string& name) {
  std::ifstream file(std::string(MERESTONE_TESTS_DIR) + "/format/area/" + name, std::ios::binary);
  REQUIRE(file);
  return {std::istreambuf_iterator<char>(file), {}};
}

inline CoverBlock trunk() { return {0, 0, 3, {2, 1}, {2, 0x40}, {{0, 0, 0, 0}}, 16, 16}; }
inline CoverBlock block() { return {5, 1, 6, {3, 0x55}, {2, 4}, {{3, -0.125, 0.75, 0.0625}}, 4096 - 7, 7}; }
inline CoverBlock later() { return {2, 2, 6, {1}, {}, {}, 4096, 0}; }
inline std::vector<Component> components() { return {{2, -1.0, 0.0, -60, 16, 64}, {3, -0.125, 0.75, -40, 32, 128}}; }

inline AreaHeader header() {
  const AreaCover cover{{{-2, 0, 2, 3}, CoverRules::all}, true, std::nullopt};
  return {Dyadic(1.5), Dyadic(3.5), cover};
}

inline PackedBlock packed(Result<PackedBlock> block) {
  INFO((block ? "" : block.failure().message));
  REQUIRE(block);
  return std::move(block.value());
}

inline std::vector<PackedBlock> all_packed() {
  return {packed(pack_trunk(trunk())), packed(pack_cover_block(block())), packed(pack_cover_block(later())),
          packed(pack_components(components()))};
}

inline std::string container(const AreaHeader& said, const std::vector<PackedBlock>& blocks) {
  Result<AreaWriter> writer = AreaWriter::create(said);
  REQUIRE(writer);
  std::string bytes = writer.value().header({{"program", "a test"}});
  for (const PackedBlock& one : blocks) bytes += writer.value().block(one);
  return bytes + writer->end();
}

struct Contents {
  std::vector<AreaBlock> blocks;
  std::vector<AbsentCover> absent;
  std::optional<Sha256> digest;
  std::string fault;
};

/// Reads it as a checker does: frame, blocks, sequence.
inline Contents read(const std::string& bytes) {
  Contents contents;
  const auto failed = [](const ReadFault& fault) { return Contents{{}, {}, {}, fault.message}; };
  auto opened = AreaReader::open(ContainerReader::open(std::move(std::get<ByteSource>(ByteSource::memory(bytes)))));
  if (const ReadFault* fault = fault_of(opened)) return failed(*fault);
  auto& reader = std::get<AreaReader>(opened);
  AreaSequence sequence(reader.header());
  for (;;) {
    auto next = reader.next();
    if (const auto* fault = std::get_if<ReadFault>(&next)) return failed(*fault);
    if (const auto* end = std::get_if<AreaEnd>(&next)) {
      if (auto fault = sequence.finish()) return failed(*fault);
      contents.digest = end->digest;
      return contents;
    }
    if (const auto* absent = std::get_if<AbsentCover>(&next)) {
      if (auto fault = sequence.admit(*absent)) return failed(*fault);
      contents.absent.push_back(*absent);
      continue;
    }
    auto block = open_area_block(std::get<StoredBlock>(next));
    if (const ReadFault* fault = fault_of(block)) return failed(*fault);
    if (auto fault = sequence.admit(std::get<AreaBlock>(block))) return failed(*fault);
    contents.blocks.push_back(std::move(std::get<AreaBlock>(block)));
  }
}

inline bool names(const std::string& message, const std::string& part) { return message.find(part) != message.npos; }

}  // namespace merestone::samples
