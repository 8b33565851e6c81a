#pragma once
#include <cstdint>
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "cli/check_quote.hpp"
#include "cli/check_selection.hpp"
#include "cli/check_tally.hpp"
#include "format/certificate.hpp"
#include "format/list_container.hpp"

namespace merestone {

/// A stretch of a certificate's claims on its way from the file to the report.
struct Batch {
  std::uint64_t first = 0;            // position of its first claim
  std::optional<StoredBlock> stored;  // of a container, until it is opened
  std::vector<Claim> claims;
  std::vector<std::uint32_t> chosen;  // which of them are to be established
  bool of_few = false;                // the certificate is known to have few claims
  std::optional<ReadFault> fault;
  std::vector<CheckedClaim> checked;  // one for each chosen claim

  // What the report makes of it.
  Tally tally;
  std::string text;
  std::vector<Quote> quotes;
  std::vector<std::string> failures;
};

/// What is known at the end of a certificate that is whole.
struct CertificateEnd {
  std::uint64_t claims = 0;
  Sha256 digest{};
};

/// Hands out a certificate's claims, a batch at a time.
class ClaimSource {
 public:
  using Next = std::variant<Batch, CertificateEnd, ReadFault>;
  virtual ~ClaimSource() = default;
  /// Not to be called again after the end or a fault.
  virtual Next next() = 0;
  /// How many batches may be on their way at once, for each thread.
  virtual std::size_t batches_for_a_thread() const = 0;
};

/// The claims of a certificate of one document, each a batch: a hard one keeps nobody waiting.
class DocumentSource : public ClaimSource {
 public:
  DocumentSource(Certificate certificate, Selection selection)
      : certificate_(std::move(certificate)), selection_(std::move(selection)) {}
  Next next() override;
  std::size_t batches_for_a_thread() const override { return 256; }

 private:
  Certificate certificate_;
  Selection selection_;
  std::size_t position_ = 0;
};

/// The blocks of a container that is a list, each a batch. A block of which no claim is chosen is opened only when `open_all`.
class ContainerSource : public ClaimSource {
 public:
  ContainerSource(ListReader reader, Selection selection, bool open_all)
      : reader_(std::move(reader)), selection_(std::move(selection)), open_all_(open_all) {}
  Next next() override;
  std::size_t batches_for_a_thread() const override { return 2; }

 private:
  ListReader reader_;
  Selection selection_;
  bool open_all_;
  std::uint64_t position_ = 0;
};

/// Certificates with at most this many claims are shown claim by claim.
inline constexpr std::uint64_t kFewClaims = 20;

}  // namespace merestone
