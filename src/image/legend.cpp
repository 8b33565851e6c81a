#include <algorithm>
#include <array>

#include "image/picture.hpp"

namespace merestone {

namespace {

constexpr std::size_t kGlyphWidth = 5, kGlyphHeight = 7;

struct Glyph {
  char letter;
  std::array<std::string_view, kGlyphHeight> rows;
};

constexpr std::array<Glyph, 9> kGlyphs = {{
    {'c', {"     ", "     ", " ### ", "#    ", "#    ", "#    ", " ### "}},
    {'d', {"    #", "    #", " ####", "#   #", "#   #", "#   #", " ####"}},
    {'e', {"     ", "     ", " ### ", "#   #", "#####", "#    ", " ### "}},
    {'i', {"  #  ", "     ", " ##  ", "  #  ", "  #  ", "  #  ", " ### "}},
    {'n', {"     ", "     ", "# ## ", "##  #", "#   #", "#   #", "#   #"}},
    {'o', {"     ", "     ", " ### ", "#   #", "#   #", "#   #", " ### "}},
    {'s', {"     ", "     ", " ####", "#    ", " ### ", "    #", "#### "}},
    {'t', {" #   ", " #   ", "#### ", " #   ", " #   ", " #  #", "  ## "}},
    {'u', {"     ", "     ", "#   #", "#   #", "#   #", "#  ##", " ## #"}},
}};

void fill(Picture& picture, std::size_t left, std::size_t top, std::size_t size_x, std::size_t size_y, Colour colour) {
  for (std::size_t row = top; row < std::min(top + size_y, picture.height()); ++row)
    for (std::size_t column = left; column < std::min(left + size_x, picture.width()); ++column)
      picture.at(column, row) = colour;
}

// An entry: its swatch, its word and some room, at scale 1.
constexpr std::size_t kSwatch = 11;
std::size_t width_of(const LegendEntry& entry) { return kSwatch + entry.word.size() * (kGlyphWidth + 1) + 6; }

void write(Picture& picture, std::string_view word, std::size_t left, std::size_t top, std::size_t scale) {
  for (const char letter : word) {
    const auto* const glyph = std::ranges::find(kGlyphs, letter, &Glyph::letter);
    if (glyph != kGlyphs.end())
      for (std::size_t y = 0; y < kGlyphHeight; ++y)
        for (std::size_t x = 0; x < kGlyphWidth; ++x)
          if (glyph->rows[y][x] == '#')
            fill(picture, left + x * scale, top + y * scale, scale, scale, okabe_ito::kBlack);
    left += (kGlyphWidth + 1) * scale;
  }
}

}  // namespace

Picture with_legend(const Picture& picture, const std::vector<LegendEntry>& entries) {
  const std::size_t scale = std::clamp<std::size_t>(picture.width() / 400, 1, 6), line = 12 * scale;
  std::size_t needed = 4 * scale;
  for (const LegendEntry& entry : entries) needed += width_of(entry) * scale;
  Picture whole(std::max(picture.width(), needed), picture.height() + line);
  for (std::size_t row = 0; row < picture.height(); ++row)
    std::copy_n(picture.row(row), picture.width(), &whole.at(0, row));
  const std::size_t top = picture.height() + 2 * scale;
  std::size_t left = 4 * scale;
  for (const LegendEntry& entry : entries) {
    fill(whole, left, top, 8 * scale, 8 * scale, okabe_ito::kBlack);
    fill(whole, left + scale, top + scale, 6 * scale, 6 * scale, entry.colour);
    left += kSwatch * scale;
    write(whole, entry.word, left, top, scale);
    left += (width_of(entry) - kSwatch) * scale;
  }
  return whole;
}

}  // namespace merestone
