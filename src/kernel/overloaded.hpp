#pragma once

namespace merestone {

/// Several functions as one, for std::visit.
template <class... Fs>
struct Overloaded : Fs... {
  using Fs::operator()...;
};

}  // namespace merestone
