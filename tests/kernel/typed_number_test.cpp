// Parameters as people type them, against the grammar in kernel/typed_number.hpp and GMP's own reading of digits.

#include "kernel/typed_number.hpp"

#include <clocale>
#include <locale>
#include <string>

#include "catch.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"
#include "reference/published.hpp"

using merestone::parse_complex;
using merestone::parse_real;
using reference::Complex;
using reference::exact;
using reference::ratio;

namespace {

struct Spelling {
  const char* text;
  Complex value;
};

const std::vector<Spelling>& accepted() {
  static const std::vector<Spelling> all = {
      {"0", {0, 0}},
      {"-0", {0, 0}},
      {"+0", {0, 0}},
      {"0.0", {0, 0}},
      {"0i", {0, 0}},
      {"0e5", {0, 0}},
      {"1", {1, 0}},
      {"007", {7, 0}},
      {"-2", {-2, 0}},
      {"1.", {1, 0}},
      {".25", {ratio(1, 4), 0}},
      {"0.25", {ratio(1, 4), 0}},
      {"-.5", {ratio(-1, 2), 0}},
      {"25e-2", {ratio(1, 4), 0}},
      {"2.5E1", {25, 0}},
      {"1e+3", {1000, 0}},
      {"1e-0", {1, 0}},
      {"1e0003", {1000, 0}},
      {"1/4", {ratio(1, 4), 0}},
      {"-3/4", {ratio(-3, 4), 0}},
      {"2/8", {ratio(1, 4), 0}},
      {"0/7", {0, 0}},
      {"0x1p-2", {ratio(1, 4), 0}},
      {"0x3p-2", {ratio(3, 4), 0}},
      {"-0x3P-2", {ratio(-3, 4), 0}},
      {"0X.8", {ratio(1, 2), 0}},
      {"0x0.4", {ratio(1, 4), 0}},
      {"0x1.8p1", {3, 0}},
      {"0xAbC", {2748, 0}},
      {"0x1e5", {485, 0}},
      {"0x10p+4", {256, 0}},
      {"i", {0, 1}},
      {"-i", {0, -1}},
      {"+i", {0, 1}},
      {"2i", {0, 2}},
      {"-.5i", {0, ratio(-1, 2)}},
      {"1/2i", {0, ratio(1, 2)}},
      {"0x3p-2i", {0, ratio(3, 4)}},
      {"1e-3i", {0, ratio(1, 1000)}},
      {"-0.75+0.1i", {ratio(-3, 4), ratio(1, 10)}},
      {"-3/4+1/10i", {ratio(-3, 4), ratio(1, 10)}},
      {"1/2+3i", {ratio(1, 2), 3}},
      {"3i+1/2", {ratio(1, 2), 3}},
      {"-i-1", {-1, -1}},
      {"1-i", {1, -1}},
      {"-0.75,0.1", {ratio(-3, 4), ratio(1, 10)}},
      {"1,-2", {1, -2}},
      {"1,+2", {1, 2}},
      {"1/3,2/3", {ratio(1, 3), ratio(2, 3)}},
      {" 1 + 2 i ", {1, 2}},
      {"\t1\t,\t2\t", {1, 2}},
      {"- 1 - i", {-1, -1}},
      {"-17/20+1/5 i", {ratio(-17, 20), ratio(1, 5)}},
  };
  return all;
}

const std::vector<std::string>& refused() {
  static const std::vector<std::string> all = {
      "",
      " ",
      "+",
      "-",
      ".",
      "e5",
      "1e",
      "1e+",
      "1e5.5",
      "1e5e5",
      "1.2.3",
      "1..2",
      ".e1",
      "1/0",
      "0/0",
      "1/00",
      "1/",
      "/2",
      "1/2/3",
      "1/2.5",
      "1.5/2",
      "1/-2",
      "1/2e3",
      "1e2/3",
      "--1",
      "+-1",
      "1+",
      "1-",
      "1+-2i",
      "1++2i",
      "1+2",
      "i+2i",
      "1+2i+3",
      "1+2i+3i",
      "1,2,3",
      "1,2i",
      "i,2",
      ",1",
      "1,",
      "1 2",
      "1 i 2",
      "ii",
      "i2",
      "2*i",
      "1+2j",
      "(1,2)",
      "[1]",
      "1;2",
      "1_000",
      "1'000",
      "$1",
      "0b1",
      "nan",
      "NaN",
      "inf",
      "-inf",
      "Infinity",
      "1e1e",
      "0x",
      "0xg",
      "0x1p",
      "0x1p+",
      "0x.p1",
      "0x1/2",
      "1/0x2",
      "x1",
      "1\n",
      "\n1",
      "1\r",
      "1\v",
      "\xC2\xA0"
      "1",
      "\xE2\x88\x92"
      "1",
      "\xEF\xBC\x91",
      "\xC2\xBD",
      "1\xE2\x80\xA6",
      std::string("1\0", 2),
      std::string("\0", 1),
      std::string("1\0i", 3),
      std::string("0x1\0p1", 6),
      "1e100001",
      "1e-100001",
      "0x1p100001",
      "0x1p-100001",
      "1e99999999999999999999999",
      "-1e-99999999999999999999999i",
  };
  return all;
}

// The message names the problem in one sentence and ends in the remedy.
void require_refused(const std::string& text) {
  INFO("text: " << text);
  const auto result = parse_complex(text);
  REQUIRE_FALSE(result.ok());
  REQUIRE(result.failure().message.find("write a parameter as -0.75+0.1i") != std::string::npos);
}

void require_all_spellings() {
  for (const Spelling& s : accepted()) {
    INFO("text: " << s.text);
    const auto result = parse_complex(s.text);
    REQUIRE(result.ok());
    REQUIRE(exact(*result) == s.value);
  }
  for (const std::string& text : refused()) require_refused(text);
}

std::string random_digits(reference::PointSource& source, std::uint64_t most) {
  std::string digits;
  for (std::uint64_t k = source.below(most) + 1; k > 0; --k) digits += static_cast<char>('0' + source.below(10));
  return digits;
}

class CommaForPoint : public std::numpunct<char> {
 protected:
  char do_decimal_point() const override { return ','; }
  char do_thousands_sep() const override { return '.'; }
  std::string do_grouping() const override { return "\3"; }
};

}  // namespace

TEST_CASE("every spelling of the grammar is read exactly, and no other") { require_all_spellings(); }

TEST_CASE("a real number is read by the same grammar without i and comma") {
  for (const Spelling& s : accepted()) {
    const std::string text = s.text;
    const bool real = text.find_first_of("i,") == std::string::npos;
    INFO("text: " << text);
    REQUIRE(parse_real(text).ok() == real);
    if (real) REQUIRE(exact(*parse_real(text)) == s.value.re);
  }
  for (const std::string& text : refused()) {
    INFO("text: " << text);
    REQUIRE_FALSE(parse_real(text).ok());
  }
}

TEST_CASE("random decimals, fractions and dyadics have the value that GMP reads") {
  reference::PointSource source(901);
  for (std::uint64_t k = 0; k < reference::repeats(3000); ++k) {
    const std::string sign = source.one_in(2) ? "-" : "";
    const std::string whole = random_digits(source, 30), places = random_digits(source, 40);
    const long exponent = source.between(-60, 60);
    mpz_class power;
    mpz_ui_pow_ui(power.get_mpz_t(), 10, static_cast<unsigned long>(std::abs(exponent)));
    const mpq_class unscaled = reference::decimal(sign + whole + "." + places);
    const mpq_class scaled = exponent < 0 ? mpq_class(unscaled / power) : mpq_class(unscaled * power);
    REQUIRE(exact(*parse_real(sign + whole + "." + places + "e" + std::to_string(exponent))) == scaled);
    mpq_class fraction(sign + whole + "/1" + places, 10);
    fraction.canonicalize();
    REQUIRE(exact(*parse_real(sign + whole + "/1" + places)) == fraction);
    const mpq_class hexadecimal = mpq_class(mpz_class(whole + places, 16)) *
                                  reference::power_of_two(exponent - 4 * static_cast<long>(places.size()));
    REQUIRE(exact(*parse_real("0x" + whole + "." + places + "p" + std::to_string(exponent))) == hexadecimal);
  }
}

TEST_CASE("numbers are read up to 100,000 characters, and no farther") {
  const std::string longest = "0." + std::string(99'997, '0') + "7";
  REQUIRE(longest.size() == merestone::kLongestTypedNumber);
  mpz_class power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, 99'998);
  REQUIRE(parse_complex(longest).ok());
  CHECK(exact(parse_complex(longest)->re) == mpq_class(mpz_class(7), power));
  CHECK(exact(*parse_real(std::string(100'000, '9'))) + 1 == mpq_class(power * 100));
  for (const auto& failure : {parse_complex(longest + "1").failure(), parse_real(longest + "1").failure()})
    CHECK(failure.message == "a number of 100001 characters: at most 100000 are read");
  CHECK_FALSE(parse_complex(std::string(50'000'000, '1')).ok());
  CHECK_FALSE(parse_complex(std::string(100'000, '-')).ok());
  CHECK_FALSE(parse_complex(std::string(100'000, ' ')).ok());
}

TEST_CASE("exponents are read up to 100,000 in size, and no farther") {
  mpz_class power;
  mpz_ui_pow_ui(power.get_mpz_t(), 10, 100'000);
  CHECK(exact(*parse_real("1e100000")) == mpq_class(power));
  CHECK(exact(*parse_real("-1e-100000")) == mpq_class(mpz_class(-1), power));
  CHECK(exact(*parse_real("0x1p100000")) == reference::power_of_two(100'000));
  CHECK(exact(*parse_real("0x.1p-100000")) == reference::power_of_two(-100'004));
  CHECK(exact(*parse_real("0e100000")) == 0);
  for (const char* text : {"1e100001", "1e-100001", "0x1p100001", "1e18446744073709551617"})
    CHECK(parse_real(text).failure().message.find("the exponent is larger than 100000") != std::string::npos);
}

TEST_CASE("a refusal names the place") {
  CHECK(parse_complex("1+2ix").failure().message.find("'x' stands at character 5") != std::string::npos);
  CHECK(parse_complex("1+").failure().message.find("the text ends at character 3") != std::string::npos);
  CHECK(parse_complex("\xE2\x88\x92"
                      "1")
            .failure()
            .message.find("an unprintable character stands at character 1") != std::string::npos);
  CHECK(parse_complex("1+2").failure().message.find("two real parts") != std::string::npos);
  CHECK(parse_complex("i-i").failure().message.find("two imaginary parts") != std::string::npos);
  CHECK(parse_complex("1/0").failure().message.find("the denominator is zero") != std::string::npos);
  CHECK(parse_complex(std::string(90'000, '7') + "x").failure().message.size() < 300);
}

TEST_CASE("reading does not depend on the locale") {
  const std::locale before = std::locale::global(std::locale(std::locale::classic(), new CommaForPoint));
  require_all_spellings();
  std::locale::global(before);
  // whichever of these the machine has
  for (const char* name : {"de_DE.UTF-8", "de_DE.utf8", "de_DE", "fr_FR.UTF-8", "C.UTF-8", "tr_TR.UTF-8"})
    if (std::setlocale(LC_ALL, name) != nullptr) require_all_spellings();
  std::setlocale(LC_ALL, "C");
}
