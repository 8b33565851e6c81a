// Any bytes as a small certificate: read or refused, and what is read is written and read again as the same claims.
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "format/certificate.hpp"
#include "format/claim_json.hpp"
#include "kernel/check.hpp"

using namespace merestone;

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const auto read = read_certificate(std::string_view(reinterpret_cast<const char*>(data), size));
  const auto* certificate = std::get_if<Certificate>(&read);
  if (certificate == nullptr) return 0;
  nlohmann::json claims = nlohmann::json::array();
  for (const Claim& claim : certificate->claims) {
    (void)establish(claim, Limits{100'000, 4096});
    claims.push_back(to_json(claim));
  }
  const auto again = read_certificate(write_certificate(claims, certificate->provenance));
  const auto* same = std::get_if<Certificate>(&again);
  if (same == nullptr || !(same->claims == certificate->claims) || same->digest != certificate->digest) std::abort();
  return 0;
}
