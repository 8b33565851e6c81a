#include "catch.hpp"
#include "format/certificate.hpp"
#include "format/strict_json.hpp"

using namespace merestone;

namespace {

std::string refusal(std::string_view text) {
  const auto read = read_strict_json(text);
  return read ? "" : read.failure().message;
}

}  // namespace

TEST_CASE("what RFC 8259 allows and a certificate does not") {
  CHECK(refusal(R"({"a":1,"a":2})").find("/a: this key occurs twice") == 0);
  CHECK(refusal(R"({"a":{"b":[0,{"c":1,"c":1}]}})").find("/a/b/1/c: this key occurs twice") == 0);
  CHECK_FALSE(refusal(R"({"a":1.5})").empty());
  CHECK_FALSE(refusal(R"({"a":1e3})").empty());
  CHECK_FALSE(refusal("\xEF\xBB\xBF{}").empty());
  CHECK_FALSE(refusal(std::string_view("{}\0", 3)).empty());
  CHECK(refusal(R"({"provenance":{"seconds":1.5}})").empty());
}

TEST_CASE("what is no JSON is refused") {
  for (const char* text : {"", "{", "[1,]", "{\"a\"}", "{} {}", "nul", "[1 2]", "{'a':1}", "[01]", "[+1]", "[NaN]", "\"\xff\"",
                           "[\"\\x\"]", "[1]//", "\"a\nb\"", "[99999999999999999999]"})
    CHECK_FALSE(refusal(text).empty());
}

TEST_CASE("nesting is limited without recursion") {
  CHECK(refusal(std::string(32, '[') + std::string(32, ']')).empty());
  CHECK_FALSE(refusal(std::string(33, '[') + std::string(33, ']')).empty());
  CHECK_FALSE(refusal(std::string(10'000'000, '[')).empty());
}

TEST_CASE("a key that looks like a pointer is escaped in messages") {
  CHECK(refusal(R"({"a/b~":1,"a/b~":2})").find("/a~1b~0:") == 0);  // RFC 6901
}

TEST_CASE("a newer version is reported as newer, not as malformed") {
  const auto read = read_certificate(R"({"format":"merestone-certificate","version":2,"claims":[],"more":1})");
  REQUIRE(fault_of(read) != nullptr);
  CHECK(fault_of(read)->kind == ReadFault::Kind::newer);
}
