#pragma once
#include <utility>

#include "kernel/flint.hpp"

namespace merestone {

/// RAII around one of FLINT's one-element-array types: initialised on construction, cleared on destruction.
template <class Struct, void (*Init)(Struct*), void (*Clear)(Struct*), void (*Set)(Struct*, const Struct*)>
class Handle {
 public:
  Handle() { Init(&held_); }
  Handle(const Handle& other) {
    Init(&held_);
    Set(&held_, &other.held_);
  }
  Handle(Handle&& other) noexcept {
    Init(&held_);
    std::swap(held_, other.held_);
  }
  Handle& operator=(const Handle& other) {
    if (this != &other) Set(&held_, &other.held_);
    return *this;
  }
  Handle& operator=(Handle&& other) noexcept {
    std::swap(held_, other.held_);
    return *this;
  }
  ~Handle() { Clear(&held_); }

  Struct* raw() { return &held_; }
  const Struct* raw() const { return &held_; }
  operator Struct*() { return &held_; }
  operator const Struct*() const { return &held_; }

 private:
  Struct held_;
};

namespace detail {
inline void set_arf(arf_struct* to, const arf_struct* from) { arf_set(to, from); }
inline void set_mag(mag_struct* to, const mag_struct* from) { mag_set(to, from); }
inline void init_arf(arf_struct* x) { arf_init(x); }
inline void clear_arf(arf_struct* x) { arf_clear(x); }
inline void init_mag(mag_struct* x) { mag_init(x); }
inline void clear_mag(mag_struct* x) { mag_clear(x); }
inline void init_fmpz(fmpz* x) { fmpz_init(x); }
inline void clear_fmpz(fmpz* x) { fmpz_clear(x); }
inline void set_fmpz(fmpz* to, const fmpz* from) { fmpz_set(to, from); }
inline void init_fmpq(fmpq* x) { fmpq_init(x); }
inline void clear_fmpq(fmpq* x) { fmpq_clear(x); }
inline void set_fmpq(fmpq* to, const fmpq* from) { fmpq_set(to, from); }
inline void init_arb(arb_struct* x) { arb_init(x); }
inline void clear_arb(arb_struct* x) { arb_clear(x); }
inline void set_arb(arb_struct* to, const arb_struct* from) { arb_set(to, from); }
inline void init_acb(acb_struct* x) { acb_init(x); }
inline void clear_acb(acb_struct* x) { acb_clear(x); }
inline void set_acb(acb_struct* to, const acb_struct* from) { acb_set(to, from); }
}  // namespace detail

/// A binary floating-point number of any precision.
using Arf = Handle<arf_struct, detail::init_arf, detail::clear_arf, detail::set_arf>;
/// An upper bound: 30 bits, any exponent, every operation rounds up.
using Mag = Handle<mag_struct, detail::init_mag, detail::clear_mag, detail::set_mag>;
/// An integer of any size.
using Integer = Handle<fmpz, detail::init_fmpz, detail::clear_fmpz, detail::set_fmpz>;
using RationalHandle = Handle<fmpq, detail::init_fmpq, detail::clear_fmpq, detail::set_fmpq>;
/// A real ball.
using Arb = Handle<arb_struct, detail::init_arb, detail::clear_arb, detail::set_arb>;
/// A complex rectangular ball.
using Acb = Handle<acb_struct, detail::init_acb, detail::clear_acb, detail::set_acb>;

}  // namespace merestone
