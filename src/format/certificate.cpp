#include "format/certificate.hpp"

#include "format/claim_json.hpp"
#include "format/pretty_json.hpp"
#include "format/shown.hpp"
#include "format/strict_json.hpp"
#include "format/strict_object.hpp"
#include "format/version.hpp"

namespace merestone {

namespace {

using nlohmann::json;

constexpr std::string_view kFormat = "merestone-certificate";

ReadFault too_large() {
  return malformed({"it is larger than 64 MiB, the most that a certificate of one JSON document may have; "
                    "a container (.mere) holds any number of claims"});
}

// What a container looks like when its first byte, which is not ASCII, was lost or recoded on the way.
std::optional<ReadFault> damaged_container(std::string_view text) {
  if (text.substr(0, 16).find("merestone\r") == text.npos && text.substr(0, 16).find("merestone\n") == text.npos)
    return std::nullopt;
  return malformed({"it is a container whose first bytes are damaged, as a transfer in text mode does; "
                    "transfer it in binary mode"});
}

}  // namespace

Read<Certificate> read_certificate(std::string_view text) {
  if (text.empty()) return malformed({"it is empty"});
  if (text.size() > kLargestDocument) return too_large();
  if (auto fault = damaged_container(text)) return *fault;
  Result<json> document = read_strict_json(text);
  if (!document) return malformed(document.failure());
  const Place at;
  if (auto fault = check_format(*document, at, kFormat)) return *fault;
  if (auto problem = check_keys(*document, at, {"format", "version", "claims"}, {"provenance"}))
    return malformed(*problem);
  const json& claims_json = std::as_const(document.value())["claims"];
  Result<std::vector<Claim>> claims = read_claims(claims_json, Place(at, "claims"), kMostClaimsOfDocument);
  if (!claims) return malformed(claims.failure());
  Result<std::optional<json>> provenance = take_provenance(document.value(), at);
  if (!provenance) return malformed(provenance.failure());
  return Certificate{std::move(claims.value()), std::move(provenance.value()), claims_digest(claims_json)};
}

Read<Certificate> read_certificate(ByteSource& source) {
  std::string text;
  if (auto fault = source.read(text, kLargestDocument + 1)) return *fault;
  return read_certificate(text);
}

std::string write_certificate(const json& claims, const std::optional<json>& provenance) {
  json document = {{"format", kFormat}, {"version", kVersion}, {"claims", claims}};
  if (provenance) document["provenance"] = *provenance;
  return pretty_json(document);
}

}  // namespace merestone
