#include "cli/check_source.hpp"

namespace merestone {

ClaimSource::Next DocumentSource::next() {
  std::vector<Claim>& claims = certificate_.claims;
  if (position_ == claims.size()) return CertificateEnd{claims.size(), certificate_.digest};
  Batch batch;
  batch.first = position_;
  batch.claims.push_back(std::move(claims[position_++]));
  batch.chosen = selection_.next(1);
  batch.of_few = claims.size() <= kFewClaims;
  return batch;
}

ClaimSource::Next ContainerSource::next() {
  ListReader::Next read = reader_.next();
  if (const auto* end = std::get_if<ListEnd>(&read)) return CertificateEnd{end->claims, end->digest};
  if (const auto* fault = std::get_if<ReadFault>(&read)) return *fault;
  auto& block = std::get<StoredBlock>(read);
  Batch batch;
  batch.first = position_;
  position_ += block.entries;
  batch.chosen = selection_.next(static_cast<std::uint32_t>(block.entries));
  // no further block may follow one that has fewer claims than a full one
  batch.of_few = block.ordinal == 0 && block.entries <= kFewClaims;
  if (open_all_ || !batch.chosen.empty()) batch.stored = std::move(block);
  return batch;
}

}  // namespace merestone
