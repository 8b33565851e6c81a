#include "format/digest.hpp"

#include <openssl/evp.h>
#include <zlib.h>

#include <new>

namespace merestone {

Sha256 sha256(std::string_view bytes) {
  Sha256 digest{};
  if (EVP_Digest(bytes.data(), bytes.size(), digest.data(), nullptr, EVP_sha256(), nullptr) != 1)
    throw std::bad_alloc();  // the only way in which hashing memory can fail
  return digest;
}

std::string hexadecimal(const Sha256& digest) {
  constexpr std::string_view kDigits = "0123456789abcdef";
  std::string text;
  for (const unsigned char byte : digest) {
    text += kDigits[byte >> 4];
    text += kDigits[byte & 15];
  }
  return text;
}

std::uint32_t crc32_of(std::string_view bytes) {
  return static_cast<std::uint32_t>(crc32_z(0, reinterpret_cast<const Bytef*>(bytes.data()), bytes.size()));
}

// RFC 8785 asks for no white space, keys sorted by UTF-16 code units, the shortest escapes with \u00xx in lower case,
// and numbers as ECMAScript prints them. The library's dump has no white space and the same escapes; its objects are
// sorted by bytes, which for ASCII keys is the same order; and integers below 2^53 print alike.
std::string canonical_json(const nlohmann::json& value) {
  return value.dump(-1, ' ', false, nlohmann::json::error_handler_t::replace);
}

Sha256 claims_digest(const nlohmann::json& claims) { return sha256(canonical_json(claims)); }

Sha256 container_digest(nlohmann::json header, const std::vector<Sha256>& blocks) {
  header["format"] = "merestone-container";
  header["version"] = 1;
  nlohmann::json& list = header["blocks"] = nlohmann::json::array();
  for (const Sha256& block : blocks) list.push_back(hexadecimal(block));
  return sha256(canonical_json(header));
}

Sha256 claims_digest(const std::vector<Sha256>& blocks) { return container_digest({{"content", "list"}}, blocks); }

}  // namespace merestone
