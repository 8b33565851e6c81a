#include "kernel/canvas.hpp"

#include <algorithm>
#include <cmath>

namespace merestone {

namespace {

constexpr double kShrink = 0x1p-20;  // far above the rounding below (Lemma N2)

std::size_t words_of_row(unsigned grade) { return std::size_t{1} << (grade > 6 ? grade - 6 : 0); }

// bits first, …, end - 1 of a word, 0 <= first < end <= 64
std::uint64_t run_mask(unsigned first, unsigned end) {
  const std::uint64_t above = ~std::uint64_t{0} << first;
  return end == 64 ? above : above & ((std::uint64_t{1} << end) - 1);
}

// The bits of the mask that were not set.
std::uint64_t set_bits(std::uint64_t& word, std::uint64_t mask) {
  const std::uint64_t fresh = mask & ~word;
  word |= mask;
  return fresh;
}

// std::popcount is a call where the instruction set has none; this is inlined and vectorised.
std::uint64_t bit_count(std::uint64_t word) {
  word -= (word >> 1) & 0x5555555555555555;
  word = (word & 0x3333333333333333) + ((word >> 2) & 0x3333333333333333);
  word = (word + (word >> 4)) & 0x0f0f0f0f0f0f0f0f;
  word += word >> 8;
  word += word >> 16;
  return (word + (word >> 32)) & 0x7f;
}

// Rounding in a baseline instruction set; 0 <= v <= 2^13.
std::uint32_t floor_of(double v) { return static_cast<std::uint32_t>(static_cast<std::int32_t>(v)); }
std::uint32_t ceil_of(double v) {
  const std::uint32_t below = floor_of(v);
  return below + (below < v);
}

}  // namespace

Canvas::Canvas(unsigned grade)
    : grade_(grade), stride_(words_of_row(grade) + (grade > 8 ? 8 : 0)), words_(stride_ << grade, 0) {}

bool Canvas::paint_run(std::uint32_t row, std::uint32_t first, std::uint32_t end) {
  std::uint64_t* words = row_words(row);
  const std::uint32_t first_word = first / 64, last_word = (end - 1) / 64;
  if (first_word == last_word) return set_bits(words[first_word], run_mask(first % 64, (end - 1) % 64 + 1)) != 0;
  std::uint64_t fresh = set_bits(words[first_word], run_mask(first % 64, 64));
  for (std::uint32_t w = first_word + 1; w < last_word; ++w) fresh |= set_bits(words[w], ~std::uint64_t{0});
  return (fresh | set_bits(words[last_word], run_mask(0, (end - 1) % 64 + 1))) != 0;
}

bool Canvas::paint_disc(double x, double y, double radius) {
  const double size = side();
  const double r = std::min(radius, 8 * size) - kShrink;
  if (!(r > 0 && std::abs(x) <= 4 * size && std::abs(y) <= 4 * size)) return false;
  const auto clamped = [size](double v) { return std::clamp(v, 0.0, size); };
  const double r_squared = r * r;
  const std::uint32_t lowest = ceil_of(clamped(y - r)), above = floor_of(clamped(y + r));
  bool is_fresh = false;
  for (std::uint32_t row = lowest; row < above; ++row) {
    const double reach = std::max(std::abs(y - row), std::abs(row + 1.0 - y));
    const double square = r_squared - reach * reach;
    if (!(square > 0)) continue;
    const double half = std::sqrt(square);
    const std::uint32_t first = ceil_of(clamped(x - half)), end = floor_of(clamped(x + half));
    if (first < end) is_fresh |= paint_run(row, first, end);
  }
  return is_fresh;
}

bool Canvas::paint_square(std::uint32_t column, std::uint32_t row, std::uint32_t size) {
  bool is_fresh = false;
  for (std::uint32_t k = 0; k < size; ++k) is_fresh |= paint_run(row + k, column, column + size);
  return is_fresh;
}

bool Canvas::is_painted(std::uint32_t column, std::uint32_t row) const {
  return (row_words(row)[column / 64] >> (column % 64) & 1) != 0;
}

std::uint64_t Canvas::painted() const {
  std::uint64_t count = 0;
  for (const std::uint64_t word : words_) count += bit_count(word);
  return count;
}

std::uint64_t Canvas::painted_in(const CellRange& range) const {
  std::uint64_t count = 0;
  if (range.cells() == 0) return count;
  const std::uint32_t first_word = range.first_column / 64, last_word = (range.end_column - 1) / 64;
  for (std::uint32_t k = range.first_row; k < range.end_row; ++k) {
    const std::uint64_t* words = row_words(k);
    for (std::uint32_t w = first_word; w <= last_word; ++w) {
      const std::uint32_t first = w == first_word ? range.first_column % 64 : 0;
      const std::uint32_t end = w == last_word ? (range.end_column - 1) % 64 + 1 : 64;
      count += bit_count(words[w] & run_mask(first, end));
    }
  }
  return count;
}

bool Canvas::is_full_with(const Canvas& other, std::uint32_t column, std::uint32_t row, std::uint32_t size) const {
  const std::uint64_t wanted = run_mask(column % 64, column % 64 + std::min(size, 64U));
  const std::size_t words = std::max(size / 64, 1U);
  for (std::uint32_t k = row; k < row + size; ++k) {
    const std::uint64_t *here = row_words(k) + column / 64, *there = other.row_words(k) + column / 64;
    for (std::size_t w = 0; w < words; ++w)
      if (((here[w] | there[w]) & wanted) != wanted) return false;
  }
  return true;
}

bool Canvas::overlaps(const Canvas& other) const {
  for (std::size_t k = 0; k < words_.size(); ++k)
    if ((words_[k] & other.words_[k]) != 0) return true;
  return false;
}

}  // namespace merestone
