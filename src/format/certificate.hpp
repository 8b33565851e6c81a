#pragma once
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "format/byte_source.hpp"
#include "format/digest.hpp"
#include "format/read_fault.hpp"
#include "kernel/claim.hpp"

namespace merestone {

inline constexpr std::uint64_t kVersion = 1;
inline constexpr std::size_t kMostClaimsOfDocument = 10'000;
inline constexpr std::size_t kLargestDocument = std::size_t{64} << 20;

/// The small form: one strict JSON document.
struct Certificate {
  std::vector<Claim> claims;
  /// An object, free-form; nothing rests on it.
  std::optional<nlohmann::json> provenance;
  /// The claims-digest.
  Sha256 digest{};
};

/// Reads a small certificate. A fault names the JSON pointer; a newer version is reported as newer.
Read<Certificate> read_certificate(std::string_view text);
/// The same from the rest of a source.
Read<Certificate> read_certificate(ByteSource& source);

/// The text of a small certificate: deterministic, indented for people, ending in a line feed.
std::string write_certificate(const nlohmann::json& claims, const std::optional<nlohmann::json>& provenance);

}  // namespace merestone
