#pragma once
#include <cstddef>
#include <string>
#include <string_view>

#include "kernel/result.hpp"

namespace merestone {

/// A place in a JSON document, as a chain of references to the enclosing places: it costs nothing until it is named.
/// A place must not outlive its parent or the key it was made with.
class Place {
 public:
  /// The whole document.
  Place() = default;
  Place(const Place& parent, std::string_view key) : parent_(&parent), key_(key) {}
  Place(const Place& parent, std::size_t index) : parent_(&parent), index_(index), is_index_(true) {}

  /// The JSON pointer (RFC 6901); empty for the document.
  std::string pointer() const;
  /// "POINTER: reason", or "the document: reason".
  Failure fault(std::string_view reason) const;

 private:
  const Place* parent_ = nullptr;
  std::string_view key_;
  std::size_t index_ = 0;
  bool is_index_ = false;
};

/// A key as a step of a JSON pointer: '~' and '/' are escaped, what is not printable ASCII becomes '?'.
std::string pointer_step(std::string_view key);

/// "POINTER: reason" for a pointer that is already text.
Failure fault_at(const std::string& pointer, std::string_view reason);

}  // namespace merestone
