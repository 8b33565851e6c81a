#include "catch.hpp"
#include "format/digest.hpp"

using namespace merestone;

TEST_CASE("SHA-256 of published messages") {
  // FIPS 180-4 examples (from memory; `printf abc | sha256sum` gives the same)
  CHECK(hexadecimal(sha256("abc")) == "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  CHECK(hexadecimal(sha256("")) == "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
}

TEST_CASE("CRC-32 has the check value of its catalogue entry") {
  // CRC-32/ISO-HDLC: check value of "123456789" (common practice; from memory)
  CHECK(crc32_of("123456789") == 0xCBF43926U);
}

TEST_CASE("canonical JSON sorts keys and escapes as RFC 8785 does") {
  // RFC 8785, section 3.2.2 and 3.2.3: shortest escapes, \u00xx in lower case, keys sorted, no white space (from memory)
  const nlohmann::json value = {{"b", 1}, {"a", {"x/\"\\\n\x01", 9007199254740991}}, {"B", nlohmann::json::object()}};
  CHECK(canonical_json(value) == "{\"B\":{},\"a\":[\"x/\\\"\\\\\\n\\u0001\",9007199254740991],\"b\":1}");
}

TEST_CASE("the digest of claims depends on their order") {
  const nlohmann::json one = {{"x", 1}}, two = {{"x", 2}};
  CHECK(claims_digest(nlohmann::json::array({one, two})) != claims_digest(nlohmann::json::array({two, one})));
  CHECK(claims_digest(std::vector{sha256("1"), sha256("2")}) != claims_digest(std::vector{sha256("2"), sha256("1")}));
}
