#include "format/strict_json.hpp"

#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "format/place.hpp"
#include "format/shown.hpp"

namespace merestone {

namespace {

using nlohmann::json;

// Builds the tree from the parser's events. The parser keeps its own stack on the heap and stops at the first event
// that is refused, so nesting costs neither recursion nor memory beyond the limit.
class TreeBuilder : public nlohmann::json_sax<json> {
 public:
  json take() { return std::move(root_); }
  const std::optional<Failure>& failure() const { return failure_; }

  bool null() override { return add(nullptr); }
  bool boolean(bool value) override { return add(value); }
  bool number_integer(number_integer_t value) override { return add(value); }
  bool number_unsigned(number_unsigned_t value) override { return add(value); }
  bool number_float(number_float_t value, const string_t& text) override {
    if (in_provenance()) return add(value);
    return refuse("the number " + printable(text, 40) + " is not an integer below 2^64 written without fraction or exponent");
  }
  bool string(string_t& value) override { return add(std::move(value)); }
  bool binary(binary_t&) override { return refuse("binary data"); }

  bool start_object(std::size_t) override { return open(json::object()); }
  bool start_array(std::size_t) override { return open(json::array()); }
  bool end_object() override { return close(); }
  bool end_array() override { return close(); }

  bool key(string_t& name) override {
    Frame& frame = frames_.back();
    const auto [member, is_new] = frame.container->get_ref<json::object_t&>().try_emplace(std::move(name));
    frame.member = &*member;
    return is_new || refuse("this key occurs twice");
  }

  bool parse_error(std::size_t, const std::string&, const nlohmann::detail::exception& what) override {
    std::string_view reason = what.what();
    // The library's messages begin with "[json.exception.parse_error.101] parse error at ".
    if (const std::size_t end = reason.find("] "); end != reason.npos) reason.remove_prefix(end + 2);
    return refuse(printable(reason, 200));
  }

 private:
  struct Frame {
    json* container;
    json::object_t::value_type* member = nullptr;  // of an object: where the next value goes
  };

  bool in_provenance() const {
    return !frames_.empty() && frames_.front().member != nullptr && frames_.front().member->first == "provenance";
  }

  std::string pointer() const {
    std::string text;
    for (const Frame& frame : frames_) {
      const bool innermost = &frame == &frames_.back();
      if (frame.member != nullptr)
        text += pointer_step(frame.member->first);
      else if (frame.container->is_array())
        text += "/" + std::to_string(frame.container->size() - (innermost ? 0 : 1));
    }
    return text;
  }

  bool refuse(std::string_view reason) {
    failure_ = fault_at(pointer(), reason);
    return false;
  }

  json* place(json value) {
    if (frames_.empty()) return &(root_ = std::move(value));
    Frame& frame = frames_.back();
    if (frame.member != nullptr) return &(frame.member->second = std::move(value));
    return &frame.container->get_ref<json::array_t&>().emplace_back(std::move(value));
  }

  bool add(json value) {
    if (++values_ > kMostValues) return refuse("there are more than " + grouped(kMostValues) + " values");
    place(std::move(value));
    return true;
  }

  bool open(json empty) {
    if (frames_.size() == kDeepestNesting)
      return refuse("arrays and objects are nested deeper than " + std::to_string(kDeepestNesting));
    if (++values_ > kMostValues) return refuse("there are more than " + grouped(kMostValues) + " values");
    frames_.push_back({place(std::move(empty))});
    return true;
  }

  bool close() {
    frames_.pop_back();
    return true;
  }

  json root_;
  std::vector<Frame> frames_;
  std::size_t values_ = 0;
  std::optional<Failure> failure_;
};

}  // namespace

Result<json> read_strict_json(std::string_view text) {
  // The library skips a byte-order mark and takes a NUL for the end of the text; both are refused here.
  if (text.substr(0, 3) == "\xEF\xBB\xBF") return fault_at("", "it begins with a byte-order mark");
  if (const std::size_t nul = text.find('\0'); nul != text.npos)
    return fault_at("", "byte " + std::to_string(nul) + " is NUL, which JSON does not contain");
  TreeBuilder builder;
  const bool whole = json::sax_parse(text.data(), text.data() + text.size(), &builder);
  if (builder.failure()) return *builder.failure();
  if (!whole) return fault_at("", "it is not JSON");
  return builder.take();
}

}  // namespace merestone
