// Boxes and discs as people type them, against the grammar in kernel/typed_region.hpp.

#include "kernel/typed_region.hpp"

#include <array>
#include <string>

#include "catch.hpp"
#include "kernel/typed_number.hpp"
#include "reference/convert.hpp"
#include "reference/point_source.hpp"

using merestone::parse_region;
using merestone::Rectangle;
using merestone::Round;
using reference::Complex;
using reference::exact;
using reference::ratio;

namespace {

void require_box(const std::string& text, const Complex& lo, const Complex& hi) {
  INFO("text: " << text);
  const auto region = parse_region(text);
  REQUIRE(region.ok());
  const auto* r = std::get_if<Rectangle>(&*region);
  REQUIRE(r != nullptr);
  REQUIRE(exact(r->x_lo) == lo.re);
  REQUIRE(exact(r->x_hi) == hi.re);
  REQUIRE(exact(r->y_lo) == lo.im);
  REQUIRE(exact(r->y_hi) == hi.im);
}

void require_disc(const std::string& text, const Complex& centre, const mpq_class& radius) {
  INFO("text: " << text);
  const auto region = parse_region(text);
  REQUIRE(region.ok());
  const auto* r = std::get_if<Round>(&*region);
  REQUIRE(r != nullptr);
  REQUIRE(exact(r->centre) == centre);
  REQUIRE(exact(r->radius) == radius);
}

std::string failure(const std::string& text) {
  INFO("text: " << text.substr(0, 80));
  const auto region = parse_region(text);
  REQUIRE_FALSE(region.ok());
  const std::string message = region.failure().message;
  REQUIRE_FALSE(message.empty());
  REQUIRE(message.size() < 400);
  REQUIRE(message.find('\n') == std::string::npos);
  return message;
}

std::string spelled(const mpq_class& x) { return x.get_str(); }

std::string spelled(const Complex& z) { return spelled(z.re) + (z.im < 0 ? "" : "+") + spelled(z.im) + "i"; }

}  // namespace

TEST_CASE("a parameter is a region of one point") {
  for (const char* text : {"1/3", " 1 + 2 i ", "-0.75,0.1", "0x1p-2", "i"}) {
    const auto c = merestone::parse_complex(text);
    REQUIRE(c.ok());
    const Complex z = exact(*c);
    require_box(text, z, z);
  }
  CHECK(failure("1+2").find("two real parts") != std::string::npos);
  CHECK(failure("").find("write a parameter as") != std::string::npos);
}

TEST_CASE("a box is given by two opposite corners, whichever come first") {
  const Complex lo{-1, ratio(1, 4)}, hi{ratio(-1, 3), 2};
  for (const char* text : {"box -1+1/4i -1/3+2i", "box -1/3+2i -1+1/4i", "box -1+2i -1/3+1/4i", "box -1/3+0.25i -1+2i",
                           "box -1,1/4 -1/3,2", "  box\t-1+0x1p-2i \t -1/3+2i  ", "box 1/4i-1 2i-1/3"})
    require_box(text, lo, hi);
  require_box("box 0 1+i", {0, 0}, {1, 1});
}

TEST_CASE("a disc is given by its centre and its radius") {
  for (const char* text : {"disc -1+1/4i 1/8", "disc -1,0.25 0.125", "\tdisc  -1+.25i\t0x1p-3 ", "disc 1/4i-1 125e-3"})
    require_disc(text, {-1, ratio(1, 4)}, ratio(1, 8));
  require_disc("disc 0 1/3", {0, 0}, ratio(1, 3));
}

TEST_CASE("random boxes and discs are read exactly") {
  reference::PointSource source(1701);
  for (std::uint64_t k = 0; k < reference::repeats(1000); ++k) {
    const Complex a = ratio(1, 3) * Complex{source.any_dyadic(), source.any_dyadic()}, b = source.biased();
    const mpq_class radius = abs(source.any_dyadic());
    if (radius == 0)
      failure("disc " + spelled(a) + " 0");
    else
      require_disc("disc " + spelled(a) + " " + spelled(radius), a, radius);
    if (a.re == b.re || a.im == b.im)
      failure("box " + spelled(a) + " " + spelled(b));
    else
      require_box("box " + spelled(a) + " " + spelled(b), {std::min(a.re, b.re), std::min(a.im, b.im)},
                  {std::max(a.re, b.re), std::max(a.im, b.im)});
  }
}

TEST_CASE("a box without width or height and a disc without a radius above 0 are refused") {
  for (const char* text : {"box 1 1", "box 0 1", "box 0 i", "box 1/2+i 0.5+2i", "box 1+1/4i 2+0.25i"})
    CHECK(failure(text).find("no width or no height") != std::string::npos);
  for (const char* text : {"disc 0 0", "disc 0 -1", "disc 0 -1/8", "disc i 0.0", "disc 0 -0"})
    CHECK(failure(text) == "the radius of a disc is a number above 0");
}

TEST_CASE("a box or disc of other parts is refused, with the way to write it") {
  for (const char* text : {"box", " box ", "box 1", "box 0 1+i 2", "box 0 1 + i", "box 0 1+i 2 3"})
    CHECK(failure(text).find("a box is written: box A B") == 0);
  for (const char* text : {"disc", "disc 0", "disc 0 1 2", "disc 0 + i 1"})
    CHECK(failure(text).find("a disc is written: disc C R") == 0);
  for (const char* text : {"disc 0 i", "disc 0 1+i", "disc 0 1,2", "disc x 1", "disc 0 x", "disc 1/0 1", "box x 1+i",
                           "box 0 x", "box 1/0 1+i", "box 0 nan", "disc 0 inf", "disc 0 1e100001", "box 0, 1+i"})
    failure(text);
}

TEST_CASE("other words than box and disc begin no region") {
  for (const char* text :
       {"Box 0 1+i", "BOX 0 1+i", "Disc 0 1", "disk 0 1", "boxes 0 1+i", "box0 1+i", "box(0,1+i)", "disc:0 1",
        "square 0 1", "segment 0 1", "box,0,1", "\nbox 0 1+i", "box\n0 1+i", "0 1", "-box 0 1+i"}) {
    CHECK_FALSE(merestone::is_typed_region(text));
    failure(text);
  }
  for (const char* text : {"box", "disc", " \t box 0 1+i", "disc 0 1", "box\tx", "disc nonsense"})
    CHECK(merestone::is_typed_region(text));
  for (const char* text : {"", " ", "\t\t", "1", "b", "d", "bo", "dis", "0 box"})
    CHECK_FALSE(merestone::is_typed_region(text));
}

TEST_CASE("hostile texts are refused or read, at any length") {
  failure(std::string("box 0 1+i\0", 10));
  failure(std::string("box\0 0 1+i", 10));
  failure(std::string("disc 0 1\0", 9));
  failure(
      "disc 0 \xE2\x88\x92"
      "1");
  failure("box 0 1+i\r");
  failure("disc 0 1\v");
  failure(
      "disc\xC2\xA0"
      "0 1");
  failure("box " + std::string(1'000'000, ' '));
  failure("box " + std::string(100'001, '1') + " 0");
  failure("disc 0 0." + std::string(100'000, '1'));
  failure("disc " + std::string(2'000'000, 'x') + " 1");
  std::string words = "box";
  for (int k = 0; k < 300'000; ++k) words += " 1";
  failure(words);
  const std::string far = "0." + std::string(40'000, '0') + "1";
  CHECK(parse_region("disc " + far + " " + far).ok());
  CHECK(parse_region("box -" + far + " " + far + "+" + far + "i").ok());
  require_box(std::string(1000, ' ') + "box" + std::string(1000, '\t') + "0 1+i" + std::string(1000, ' '), {0, 0},
              {1, 1});
  reference::PointSource source(1702);
  static const std::string letters = "box disc 0123456789.,+-/ipPxXeE\t";
  for (std::uint64_t k = 0; k < reference::repeats(20'000); ++k) {
    std::string text = source.one_in(2) ? "box " : "disc ";
    for (std::uint64_t n = source.below(14); n > 0; --n) text += letters[source.below(letters.size())];
    const auto region = parse_region(text);
    if (!region) continue;
    if (const auto* round = std::get_if<Round>(&*region)) REQUIRE(round->radius.sign() > 0);
    if (const auto* r = std::get_if<Rectangle>(&*region)) REQUIRE((r->x_lo < r->x_hi && r->y_lo < r->y_hi));
  }
}
