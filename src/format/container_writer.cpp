#include "format/container_writer.hpp"

#include "format/certificate.hpp"
#include "format/container_layout.hpp"

namespace merestone {

std::string ContainerWriter::header(nlohmann::json header) {
  header["format"] = kContainerFormat;
  header["version"] = kVersion;
  const std::string text = canonical_json(header);
  std::string out(kContainerMagic);
  put_integer(out, text.size(), 4);
  out += text;
  offset_ = out.size();
  return out;
}

std::string ContainerWriter::noted(std::string bytes, std::uint64_t entries, const Sha256& digest) {
  entries_.push_back({offset_, entries});
  digests_.push_back(digest);
  sum_of_entries_ += entries;
  offset_ += bytes.size();
  return bytes;
}

std::string ContainerWriter::block(const PackedBlock& block) {
  std::string out(kBlockMark);
  for (const std::uint64_t value :
       {std::uint64_t{entries_.size()}, block.entries, block.payload_length, std::uint64_t{block.stored.size()}})
    put_integer(out, value, 8);
  put_integer(out, block.crc, 4);
  put_digest(out, block.digest);
  out += block.stored;
  return noted(std::move(out), block.entries, block.digest);
}

std::string ContainerWriter::absent(std::uint64_t entries, std::uint64_t payload_length, std::string_view summary,
                                    const Sha256& digest) {
  std::string out(kAbsentMark);
  for (const std::uint64_t value : {std::uint64_t{entries_.size()}, entries, payload_length})
    put_integer(out, value, 8);
  out += summary;
  put_digest(out, digest);
  return noted(std::move(out), entries, digest);
}

std::string ContainerWriter::end() const {
  std::string out(kIndexMark);
  put_integer(out, entries_.size(), 8);
  for (std::size_t i = 0; i < entries_.size(); ++i) {
    put_integer(out, entries_[i].offset, 8);
    put_integer(out, entries_[i].entries, 8);
    put_digest(out, digests_[i]);
  }
  put_integer(out, offset_, 8);
  out += kEndMark;
  return out;
}

}  // namespace merestone
