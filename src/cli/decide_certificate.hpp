#pragma once
#include <nlohmann/json.hpp>
#include <optional>
#include <string>

#include "format/atomic_file.hpp"
#include "format/list_container.hpp"

namespace merestone {

/// What was written, for the reader of the output.
struct WrittenCertificate {
  std::string path;
  std::uint64_t claims = 0;
  std::string digest;
};

/// The line that says so: a JSON object, or words. Ends in a newline.
std::string written_line(const WrittenCertificate& written, bool json);

/// Refuses names that do not say which form of certificate is meant.
std::optional<Failure> check_certificate_name(const std::string& path);

/// The certificate that `merestone decide --out` writes: the small form for *.mere.json, a container for *.mere. The
/// file appears when it is finished, whole.
class CertificateFile {
 public:
  /// Requires a name that check_certificate_name takes. On failure: the path cannot be written.
  static Result<CertificateFile> create(const std::string& path, const nlohmann::json& provenance);

  std::optional<Failure> add(nlohmann::json claim);
  /// On failure: no claim was added, or writing failed. Nothing is left behind then.
  Result<WrittenCertificate> finish();

 private:
  CertificateFile(AtomicFile file, bool is_container, const nlohmann::json& provenance)
      : file_(std::move(file)), is_container_(is_container), provenance_(provenance) {}

  std::optional<Failure> write_block();
  WrittenCertificate written(std::uint64_t claims, const Sha256& digest) const;

  AtomicFile file_;
  bool is_container_;
  nlohmann::json provenance_;
  nlohmann::json claims_ = nlohmann::json::array();  // of the document, or of the block in hand
  ListWriter container_;
};

}  // namespace merestone
