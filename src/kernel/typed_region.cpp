#include "kernel/typed_region.hpp"

#include <algorithm>
#include <utility>
#include <vector>

#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

constexpr std::string_view kBlanks = " \t";

std::vector<std::string_view> words_of(std::string_view text) {
  std::vector<std::string_view> words;
  for (std::size_t begin = text.find_first_not_of(kBlanks); begin != text.npos;) {
    const std::size_t end = std::min(text.find_first_of(kBlanks, begin), text.size());
    words.push_back(text.substr(begin, end - begin));
    begin = text.find_first_not_of(kBlanks, end);
  }
  return words;
}

Result<Shape> read_box(std::string_view first, std::string_view second) {
  const Result<ComplexRational> a = parse_complex(first);
  if (!a) return a.failure();
  const Result<ComplexRational> b = parse_complex(second);
  if (!b) return b.failure();
  const auto [x_lo, x_hi] = std::minmax(a->re, b->re);
  const auto [y_lo, y_hi] = std::minmax(a->im, b->im);
  if (x_lo == x_hi || y_lo == y_hi)
    return Failure{"the box has no width or no height; give two corners that are diagonally opposite"};
  return Shape(Rectangle{x_lo, x_hi, y_lo, y_hi});
}

Result<Shape> read_disc(std::string_view first, std::string_view second) {
  const Result<ComplexRational> centre = parse_complex(first);
  if (!centre) return centre.failure();
  const Result<Rational> radius = parse_real(second);
  if (!radius) return radius.failure();
  if (radius->sign() <= 0) return Failure{"the radius of a disc is a number above 0"};
  return Shape(Round{*centre, *radius});
}

}  // namespace

bool is_typed_region(std::string_view text) {
  const std::size_t begin = text.find_first_not_of(kBlanks);
  if (begin == text.npos) return false;
  const std::string_view word = text.substr(begin, text.find_first_of(kBlanks, begin) - begin);
  return word == "box" || word == "disc";
}

Result<Shape> parse_region(std::string_view text) {
  if (!is_typed_region(text)) {
    const Result<ComplexRational> c = parse_complex(text);
    if (!c) return c.failure();
    return Shape(shape_of(*c));
  }
  const std::vector<std::string_view> words = words_of(text);
  const bool is_box = words[0] == "box";
  if (words.size() != 3)
    return Failure{is_box ? "a box is written: box A B, with two opposite corners such as -0.76+0.09i, each without blanks"
                          : "a disc is written: disc C R, with a centre such as -0.76+0.09i and a radius, without blanks"};
  return is_box ? read_box(words[1], words[2]) : read_disc(words[1], words[2]);
}

}  // namespace merestone
