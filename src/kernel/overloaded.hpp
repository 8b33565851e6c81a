#pragma once

namespace merestone {

/// Several functions as one, for std::visit.
template <class... Fs>
struct Overloaded : Fs... {
  using Fs::operator()...;
};
// deduced without help by newer compilers
template <class... Fs>
Overloaded(Fs...) -> Overloaded<Fs...>;

}  // namespace merestone
