#pragma once
#include <cstdint>
#include <nlohmann/json.hpp>
#include <string>
#include <string_view>
#include <vector>

#include "format/block_payload.hpp"

namespace merestone {

/// Makes the bytes of a container's frame one part after another: header, then each block in order, then the end. What
/// belongs into header and blocks is for the content's own writer to say (list_container.hpp, area_container.hpp).
/// The order of the calls is the order in the file: do not leave it to the compiler within one expression.
class ContainerWriter {
 public:
  /// Magic and header. The header has "content"; format and version are added.
  std::string header(nlohmann::json header);
  std::string block(const PackedBlock& block);
  /// A block of which only these figures are in the file.
  std::string absent(std::uint64_t entries, std::uint64_t payload_length, std::string_view summary,
                     const Sha256& digest);
  /// Index and end.
  std::string end() const;

  /// Of all blocks so far.
  std::uint64_t entries() const { return sum_of_entries_; }
  std::size_t blocks() const { return entries_.size(); }
  const std::vector<Sha256>& digests() const { return digests_; }

 private:
  struct Entry {
    std::uint64_t offset, entries;
  };
  std::string noted(std::string bytes, std::uint64_t entries, const Sha256& digest);

  std::uint64_t offset_ = 0, sum_of_entries_ = 0;
  std::vector<Entry> entries_;
  std::vector<Sha256> digests_;
};

}  // namespace merestone
