#pragma once
#include <cstddef>
#include <nlohmann/json.hpp>
#include <string_view>

#include "kernel/result.hpp"

namespace merestone {

/// Arrays and objects may stand inside each other this many deep, the outermost counted.
inline constexpr std::size_t kDeepestNesting = 32;
/// Values of all kinds in one text. Ten thousand claims have about 200,000; the limit bounds the memory that a hostile
/// text of many tiny values can take.
inline constexpr std::size_t kMostValues = std::size_t{1} << 20;

/// Reads one JSON text (RFC 8259) strictly: no duplicate keys, no fractions or exponents except inside the member
/// "provenance" of the outermost object, no byte-order mark, nothing after the value, valid UTF-8.
/// On failure: the JSON pointer of the place and the reason.
Result<nlohmann::json> read_strict_json(std::string_view text);

}  // namespace merestone
