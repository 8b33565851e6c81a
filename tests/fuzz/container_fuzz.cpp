// Any bytes as a container of claims: every block is opened or refused, and the end is reached or refused.
#include <cstdint>
#include <string_view>

#include "format/list_container.hpp"

using namespace merestone;

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  auto source = ByteSource::memory(std::string_view(reinterpret_cast<const char*>(data), size));
  if (fault_of(source) != nullptr) return 0;
  auto opened = ListReader::open(ContainerReader::open(std::move(std::get<ByteSource>(source))));
  auto* reader = std::get_if<ListReader>(&opened);
  if (reader == nullptr) return 0;
  for (auto next = reader->next(); const auto* block = std::get_if<StoredBlock>(&next); next = reader->next())
    if (fault_of(open_claims(*block)) != nullptr) break;
  return 0;
}
