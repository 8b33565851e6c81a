#include "format/version.hpp"

#include <string>

#include "format/certificate.hpp"
#include "format/shown.hpp"
#include "format/strict_object.hpp"

namespace merestone {

using nlohmann::json;

std::optional<ReadFault> check_format(const json& document, const Place& at, std::string_view format) {
  const Result<std::string> said = read_text(document, at, "format");
  if (!said) return malformed(said.failure());
  if (*said != format)
    return malformed(Place(at, "format").fault("the format " + shown(*said) + " is not " + shown(format)));
  const Result<std::uint64_t> version = read_count(document, at, "version", 1);
  if (!version) return malformed(version.failure());
  if (*version > kVersion)
    return ReadFault{ReadFault::Kind::newer,
                     Place(at, "version").fault("version " + std::to_string(*version) + " is newer than version " +
                                                std::to_string(kVersion) +
                                                ", the newest that this program reads; use a newer merestone").message};
  return std::nullopt;
}

Result<std::optional<json>> take_provenance(json& document, const Place& at) {
  const auto found = document.find("provenance");
  if (found == document.end()) return std::optional<json>();
  if (!found->is_object()) return Place(at, "provenance").fault("an object should stand here");
  return std::optional<json>(std::move(*found));
}

}  // namespace merestone
