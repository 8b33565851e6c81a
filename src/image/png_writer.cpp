#include "image/png_writer.hpp"

#include <png.h>

#include <csetjmp>

namespace merestone {

namespace {

void append(png_structp png, png_bytep bytes, png_size_t count) {
  static_cast<std::string*>(png_get_io_ptr(png))->append(reinterpret_cast<const char*>(bytes), count);
}

std::vector<png_text> text_chunks(const std::vector<std::pair<std::string, std::string>>& texts) {
  std::vector<png_text> chunks;
  for (const auto& [keyword, text] : texts) {
    png_text chunk{};
    chunk.compression = PNG_TEXT_COMPRESSION_NONE;
    chunk.key = const_cast<char*>(keyword.c_str());  // the library only reads
    chunk.text = const_cast<char*>(text.c_str());
    chunks.push_back(chunk);
  }
  return chunks;
}

// Everything that must survive the library's longjmp is in the caller's hands.
bool write(png_structp png, png_infop info, const Picture& picture, std::vector<png_text>& texts, std::string& out) {
  if (setjmp(png_jmpbuf(png)) != 0) return false;
  png_set_write_fn(png, &out, append, nullptr);
  png_set_IHDR(png, info, static_cast<png_uint_32>(picture.width()), static_cast<png_uint_32>(picture.height()), 8,
               PNG_COLOR_TYPE_RGB, PNG_INTERLACE_NONE, PNG_COMPRESSION_TYPE_DEFAULT, PNG_FILTER_TYPE_DEFAULT);
  png_set_text(png, info, texts.data(), static_cast<int>(texts.size()));
  png_write_info(png, info);
  for (std::size_t row = 0; row < picture.height(); ++row)
    png_write_row(png, reinterpret_cast<png_const_bytep>(picture.row(row)));
  png_write_end(png, nullptr);
  return true;
}

}  // namespace

std::string png_of(const Picture& picture, const std::vector<std::pair<std::string, std::string>>& texts) {
  static_assert(sizeof(Colour) == 3);
  png_structp png = png_create_write_struct(PNG_LIBPNG_VER_STRING, nullptr, nullptr, nullptr);
  png_infop info = png != nullptr ? png_create_info_struct(png) : nullptr;
  std::string out;
  std::vector<png_text> chunks = text_chunks(texts);
  const bool done = info != nullptr && write(png, info, picture, chunks, out);
  png_destroy_write_struct(&png, &info);
  return done ? out : std::string();
}

}  // namespace merestone
