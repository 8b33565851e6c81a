#pragma once
#include <string>

#include "cover/area_run.hpp"
#include "format/digest.hpp"

namespace merestone {

/// A certificate that was written.
struct WrittenArea {
  std::uint64_t bytes = 0, blocks = 0;
  Sha256 digest{};
};

/// Writes the certificate of a run from its store; the file appears whole or not at all. With `outline` the blocks of
/// the cover stand in it by their figures and digests alone; the digest of the whole is the same. On failure: the file
/// cannot be written, or the store read. What was finished stays in the store.
Result<WrittenArea> assemble_area(const AreaResult& result, const BlockStore& store, const std::string& path,
                                  bool outline, const nlohmann::json& provenance);

}  // namespace merestone
