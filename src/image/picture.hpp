#pragma once
#include <cstddef>
#include <cstdint>
#include <string_view>
#include <vector>

namespace merestone {

struct Colour {
  std::uint8_t red = 0, green = 0, blue = 0;
  friend bool operator==(const Colour&, const Colour&) = default;
};

/// The palette of Okabe and Ito, which people with any kind of colour vision can tell apart (M. Okabe, K. Ito, "Color
/// Universal Design", 2008; from memory).
namespace okabe_ito {
inline constexpr Colour kBlack{0, 0, 0}, kOrange{230, 159, 0}, kSkyBlue{86, 180, 233};
}  // namespace okabe_ito

/// A picture of rows from the top, each of pixels from the left.
class Picture {
 public:
  /// All white.
  Picture(std::size_t width, std::size_t height)
      : width_(width), height_(height), pixels_(width * height, Colour{255, 255, 255}) {}

  std::size_t width() const { return width_; }
  std::size_t height() const { return height_; }
  // Require column < width() and row < height().
  Colour& at(std::size_t column, std::size_t row) { return pixels_[row * width_ + column]; }
  const Colour& at(std::size_t column, std::size_t row) const { return pixels_[row * width_ + column]; }
  const Colour* row(std::size_t row) const { return pixels_.data() + row * width_; }

 private:
  std::size_t width_, height_;
  std::vector<Colour> pixels_;
};

/// Adds a strip below, and white at the right where the picture is narrower than that, the picture with a swatch and a
/// word for each colour. Words of the letters c d e i n o s t u.
struct LegendEntry {
  Colour colour;
  std::string_view word;
};
Picture with_legend(const Picture& picture, const std::vector<LegendEntry>& entries);

}  // namespace merestone
