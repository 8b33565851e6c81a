// Any bytes as an area container: every block is opened or refused, and the end is reached or refused. What is opened is
// packed again as the same payload: nothing has two spellings.
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "format/area_container.hpp"
#include "format/area_sequence.hpp"

using namespace merestone;

namespace {

Result<PackedBlock> packed_again(const AreaBlock& block) {
  if (block.kind == AreaKind::components) return pack_components(block.components());
  return block.kind == AreaKind::trunk ? pack_trunk(block.cover()) : pack_cover_block(block.cover());
}

// False when there is nothing more to be read.
bool take_one(AreaReader& reader, AreaSequence& sequence) {
  const auto next = reader.next();
  if (const auto* absent = std::get_if<AbsentCover>(&next)) return !sequence.admit(*absent);
  const auto* stored = std::get_if<StoredBlock>(&next);
  if (stored == nullptr) return false;
  const auto opened = open_area_block(*stored);
  const auto* block = std::get_if<AreaBlock>(&opened);
  if (block == nullptr) return false;
  const Result<PackedBlock> again = packed_again(*block);
  if (!again || again->digest != stored->digest || again->entries != stored->entries) std::abort();
  return !sequence.admit(*block);
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  auto source = ByteSource::memory(std::string_view(reinterpret_cast<const char*>(data), size));
  if (fault_of(source) != nullptr) return 0;
  auto opened = AreaReader::open(ContainerReader::open(std::move(std::get<ByteSource>(source))));
  auto* reader = std::get_if<AreaReader>(&opened);
  if (reader == nullptr) return 0;
  if (!AreaWriter::create(reader->header())) std::abort();
  AreaSequence sequence(reader->header());
  while (take_one(*reader, sequence)) {
  }
  (void)sequence.finish();
  return 0;
}
