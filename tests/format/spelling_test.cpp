#include "catch.hpp"
#include "format/spelling.hpp"

using namespace merestone;

TEST_CASE("one spelling each: what is read is spelled the same again") {
  for (const char* text : {"0x0p0", "0x1p0", "-0x3p-2", "0x1p1", "-0x1p100000", "0x1p-100000", "0xdeadbeefp-7",
                           "0x123456789abcdef123456789abcdefp-99"})
    CHECK(spell(*read_dyadic(text)) == text);
  for (const char* text : {"0", "1", "-1", "1/2", "-17/20", "123456789012345678901234567890/11"})
    CHECK(spell(*read_rational(text)) == text);
}

TEST_CASE("dyadic numbers spelled differently are refused") {
  for (const char* text : {"", "0", "0x", "0x0", "0x0p1", "-0x0p0", "0x2p0", "0x01p0", "0x1p+1", "0x1p01", "0x1p", "0x1p-0", "0X1p0",
                           "0xAp0", "0xBp0", "+0x1p0", " 0x1p0", "0x1p0 ", "0x1.8p0", "0x1p100001", "0x1p-100001",
                           "0x1p99999999999999999999", "1p0", "0x1P0", "--0x1p0"})
    CHECK_FALSE(read_dyadic(text));
  CHECK_FALSE(read_dyadic("0x" + std::string(100'000, '1') + "1p0"));
  CHECK(read_dyadic("0x" + std::string(99'999, '1') + "1p0"));
}

TEST_CASE("rational numbers spelled differently are refused") {
  for (const char* text : {"", "-0", "00", "01", "1/1", "2/4", "1/0", "0/1", "1/-2", "-1/-2", "+1", "1/02", "1.0", "1e0", " 1", "1 ",
                           "1/", "/2", "0x1", "1/2/3", "--1"})
    CHECK_FALSE(read_rational(text));
  CHECK_FALSE(read_rational(std::string(200'001, '1')));
}

TEST_CASE("numbers are what they say") {
  CHECK(read_dyadic("-0x3p-2")->to_rational() == Rational(-3, 4));
  CHECK(read_dyadic("0xffp1")->to_rational() == Rational(510));
  CHECK(*read_rational("-17/20") == Rational(-17, 20));
}
