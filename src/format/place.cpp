#include "format/place.hpp"

#include "format/shown.hpp"

namespace merestone {

std::string pointer_step(std::string_view key) {
  std::string step = "/";
  for (const char c : printable(key, 60)) {
    if (c == '~')
      step += "~0";
    else if (c == '/')
      step += "~1";
    else
      step += c;
  }
  return step;
}

Failure fault_at(const std::string& pointer, std::string_view reason) {
  return {(pointer.empty() ? "the document" : pointer) + ": " + std::string(reason)};
}

std::string Place::pointer() const {
  if (parent_ == nullptr) return "";
  return parent_->pointer() + (is_index_ ? "/" + std::to_string(index_) : pointer_step(key_));
}

Failure Place::fault(std::string_view reason) const { return fault_at(pointer(), reason); }

}  // namespace merestone
