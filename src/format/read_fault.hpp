#pragma once
#include <string>
#include <variant>

#include "kernel/result.hpp"

namespace merestone {

/// Why a certificate could not be read. The kind tells a program what to answer.
struct ReadFault {
  enum class Kind {
    malformed,  // syntax, schema, a damaged block
    newer,      // well-formed, but of a version that this reader does not know
    input,      // the bytes could not be had
  };
  Kind kind;
  std::string message;
};

inline ReadFault malformed(const Failure& why) { return {ReadFault::Kind::malformed, why.message}; }

/// A value or the fault.
template <class T>
using Read = std::variant<T, ReadFault>;

template <class T>
const ReadFault* fault_of(const Read<T>& read) {
  return std::get_if<ReadFault>(&read);
}

}  // namespace merestone
