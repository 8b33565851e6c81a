#pragma once
#include <string>
#include <utility>
#include <variant>

namespace merestone {

/// Why an input could not be taken: a sentence that names the offending text and, where there is one, the remedy.
struct Failure {
  std::string message;
};

/// A value or the reason why there is none. The library throws nothing and prints nothing.
template <class T>
class [[nodiscard]] Result {
 public:
  Result(T value) : held_(std::move(value)) {}
  Result(Failure failure) : held_(std::move(failure)) {}

  bool ok() const { return held_.index() == 0; }
  explicit operator bool() const { return ok(); }

  /// Requires ok().
  const T& value() const { return std::get<0>(held_); }
  T& value() { return std::get<0>(held_); }
  const T* operator->() const { return &value(); }
  const T& operator*() const { return value(); }

  /// Requires !ok().
  const Failure& failure() const { return std::get<1>(held_); }

 private:
  std::variant<T, Failure> held_;
};

}  // namespace merestone
