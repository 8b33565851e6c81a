#include "format/container_writer.hpp"

#include "format/certificate.hpp"
#include "format/container_layout.hpp"
#include "format/deflate.hpp"

namespace merestone {

namespace {

void put_digest(std::string& out, const Sha256& digest) { out.append(digest.begin(), digest.end()); }

}  // namespace

Result<PackedBlock> pack_block(const nlohmann::json& claims) {
  const std::string payload = canonical_json(claims);
  if (payload.size() > kLargestPayload)
    return Failure{"a block of " + std::to_string(claims.size()) + " claims is larger than 64 MiB; type shorter numbers"};
  Result<std::string> stored = deflated(payload);
  if (!stored) return stored.failure();
  return PackedBlock{claims.size(), payload.size(), crc32_of(payload), sha256(payload), std::move(stored.value())};
}

std::string ContainerWriter::header(const nlohmann::json& provenance) {
  const std::string text = canonical_json(
      {{"content", "list"}, {"format", kContainerFormat}, {"provenance", provenance}, {"version", kVersion}});
  std::string out(kContainerMagic);
  put_integer(out, text.size(), 4);
  out += text;
  offset_ = out.size();
  return out;
}

std::string ContainerWriter::block(const PackedBlock& block) {
  std::string out(kBlockMark);
  for (const std::uint64_t value :
       {std::uint64_t{entries_.size()}, block.claims, block.payload_length, std::uint64_t{block.stored.size()}})
    put_integer(out, value, 8);
  put_integer(out, block.crc, 4);
  put_digest(out, block.digest);
  out += block.stored;
  entries_.push_back({offset_, block.claims});
  digests_.push_back(block.digest);
  claims_ += block.claims;
  offset_ += out.size();
  return out;
}

std::string ContainerWriter::end() const {
  std::string out(kIndexMark);
  put_integer(out, entries_.size(), 8);
  for (std::size_t i = 0; i < entries_.size(); ++i) {
    put_integer(out, entries_[i].offset, 8);
    put_integer(out, entries_[i].claims, 8);
    put_digest(out, digests_[i]);
  }
  put_integer(out, offset_, 8);
  out += kEndMark;
  return out;
}

}  // namespace merestone
