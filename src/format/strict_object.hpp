#pragma once
#include <cstdint>
#include <initializer_list>
#include <nlohmann/json.hpp>
#include <optional>
#include <string>
#include <string_view>

#include "format/place.hpp"

namespace merestone {

/// Counts in a certificate end here, so that every reader of JSON has them exactly.
inline constexpr std::uint64_t kLargestCount = (std::uint64_t{1} << 53) - 1;

/// A failure unless the value is an object whose members are all the required keys and some of the optional ones.
std::optional<Failure> check_keys(const nlohmann::json& value, const Place& at,
                                  std::initializer_list<std::string_view> required,
                                  std::initializer_list<std::string_view> optional = {});

// Members of an object. `at` is the object's place; a missing member is a failure at the object.

Result<const nlohmann::json*> member(const nlohmann::json& object, const Place& at, std::string_view key);
Result<std::string> read_text(const nlohmann::json& object, const Place& at, std::string_view key);
/// An integer from `least` to `most`, written as JSON writes natural numbers.
Result<std::uint64_t> read_count(const nlohmann::json& object, const Place& at, std::string_view key,
                                 std::uint64_t least, std::uint64_t most = kLargestCount);

}  // namespace merestone
