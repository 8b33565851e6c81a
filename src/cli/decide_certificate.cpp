#include "cli/decide_certificate.hpp"

#include <fmt/format.h>

#include "format/certificate.hpp"

namespace merestone {

namespace {

constexpr std::string_view kContainerEnding = ".mere", kDocumentEnding = ".mere.json";

bool ends_in(const std::string& text, std::string_view end) {
  return text.size() > end.size() && text.compare(text.size() - end.size(), end.size(), end) == 0;
}

Failure too_many(const std::string& path) {
  return {path + ": a certificate of this form holds at most 10,000 claims; name it *.mere to write a container"};
}

}  // namespace

std::string written_line(const WrittenCertificate& written, bool json) {
  if (json)
    return nlohmann::ordered_json{{"certificate", written.path}, {"claims", written.claims},
                                  {"claims_digest", written.digest}}.dump() + "\n";
  return fmt::format("{}: {} {}, claims-digest {}\n", written.path, written.claims,
                     written.claims == 1 ? "claim" : "claims", written.digest);
}

std::optional<Failure> check_certificate_name(const std::string& path) {
  if (ends_in(path, kContainerEnding) || ends_in(path, kDocumentEnding)) return std::nullopt;
  return Failure{path + ": name the certificate *.mere.json (up to 10,000 claims) or *.mere (any number)"};
}

Result<CertificateFile> CertificateFile::create(const std::string& path, const nlohmann::json& provenance) {
  const bool is_container = ends_in(path, kContainerEnding);
  Result<AtomicFile> file = AtomicFile::create(path);
  if (!file) return file.failure();
  CertificateFile certificate(std::move(file.value()), is_container, provenance);
  if (is_container)
    if (auto problem = certificate.file_.write(certificate.container_.header(provenance))) return *problem;
  return certificate;
}

std::optional<Failure> CertificateFile::add(nlohmann::json claim) {
  claims_.push_back(std::move(claim));
  if (is_container_) return claims_.size() == kClaimsOfBlock ? write_block() : std::nullopt;
  if (claims_.size() > kMostClaimsOfDocument) return too_many(file_.path());
  return std::nullopt;
}

std::optional<Failure> CertificateFile::write_block() {
  const Result<PackedBlock> block = pack_claims(claims_);
  if (!block) return Failure{file_.path() + ": " + block.failure().message};
  claims_.clear();
  return file_.write(container_.block(*block));
}

WrittenCertificate CertificateFile::written(std::uint64_t claims, const Sha256& digest) const {
  return {file_.path(), claims, hexadecimal(digest)};
}

Result<WrittenCertificate> CertificateFile::finish() {
  if (is_container_ && !claims_.empty())
    if (auto problem = write_block()) return *problem;
  if (claims_.empty() && container_.claims() == 0)
    return Failure{file_.path() + ": not written, since nothing was proved"};
  const std::string rest = is_container_ ? container_.end() : write_certificate(claims_, provenance_);
  if (auto problem = file_.write(rest)) return *problem;
  if (auto problem = file_.commit()) return *problem;
  return is_container_ ? written(container_.claims(), container_.digest())
                       : written(claims_.size(), claims_digest(claims_));
}

}  // namespace merestone
