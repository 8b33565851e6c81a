#pragma once
#include <functional>
#include <span>

#include "cover/trunk.hpp"
#include "format/area_block.hpp"
#include "format/journal.hpp"

namespace merestone {

/// The finished blocks of a run in its journal.
class BlockStore {
 public:
  explicit BlockStore(Journal journal) : journal_(std::move(journal)) {}

  bool has(const BlockPlace& place) const { return journal_.contains(place.key()); }
  std::optional<Failure> put(const BlockPlace& place, const PackedBlock& block) {
    return journal_.append(place.key(), block);
  }
  Result<PackedBlock> packed(const BlockPlace& place) const { return journal_.read(place.key()); }
  Result<CoverBlock> block(const BlockPlace& place) const;

  /// The whole catalogue; nothing when it is not there, or not all of it.
  Result<std::optional<std::vector<Component>>> components() const;
  std::optional<Failure> put_components(std::span<const Component> components);

  std::optional<Failure> sync() { return journal_.sync(); }
  std::optional<Failure> remove() { return journal_.remove(); }

 private:
  Journal journal_;
};

/// Calls `take` with each block into which a list of components is cut, packed. Stops at the first failure.
std::optional<Failure> for_each_component_block(std::span<const Component> components,
                                                const std::function<std::optional<Failure>(const PackedBlock&)>& take);

}  // namespace merestone
