#pragma once
#include <cstdint>
#include <optional>
#include <utility>

#include "format/area_block.hpp"
#include "format/area_header.hpp"

namespace merestone {

/// Verifies that the blocks of an area container follow each other as they must, and that they fit the header. It is
/// asked of one block after another, in the order in which they stand, once each is opened; it computes nothing of M.
///
/// If there is a cover, the trunk is block 0, on the root; then blocks of the cover, present or absent, strictly
/// increasing by (row, column), each of one of the trunk's fine cells; then components, every block but the last full,
/// strictly increasing by (re, im) across blocks.
class AreaSequence {
 public:
  explicit AreaSequence(const AreaHeader& header);

  // The fault names the block.
  std::optional<ReadFault> admit(const AreaBlock& block);
  std::optional<ReadFault> admit(const AbsentCover& block);
  /// After the last block: nothing is missing that the header calls for.
  std::optional<ReadFault> finish() const;

  // What was admitted so far.
  std::uint64_t blocks() const { return blocks_; }
  std::uint64_t absent() const { return absent_; }
  std::uint64_t components() const { return components_; }

 private:
  std::optional<Failure> check_ordinal(std::uint64_t ordinal) const;
  std::optional<Failure> admit_trunk(const CoverBlock& block);
  std::optional<Failure> admit_square(std::uint32_t column, std::uint32_t row, std::uint64_t inside_cells);
  std::optional<Failure> admit_components(const std::vector<Component>& components);
  std::optional<Failure> admit_content(const AreaBlock& block);

  bool has_cover_, has_at_least_;
  std::uint32_t trunk_grade_ = 0;
  bool has_trunk_ = false, has_inside_ = false;
  std::optional<std::pair<std::uint32_t, std::uint32_t>> square_;  // row and column of the last block of the cover
  std::optional<Component> component_;                             // the last one
  std::uint64_t blocks_ = 0, absent_ = 0, components_ = 0;
};

}  // namespace merestone
