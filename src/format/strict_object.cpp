#include "format/strict_object.hpp"

#include <algorithm>

#include "format/shown.hpp"

namespace merestone {

namespace {

using nlohmann::json;

bool is_among(std::initializer_list<std::string_view> keys, std::string_view key) {
  return std::find(keys.begin(), keys.end(), key) != keys.end();
}

std::string listed(std::initializer_list<std::string_view> required, std::initializer_list<std::string_view> optional) {
  std::string text;
  for (const auto* keys : {&required, &optional})
    for (const std::string_view key : *keys) text += (text.empty() ? "" : ", ") + std::string(key);
  return text;
}

}  // namespace

std::optional<Failure> check_keys(const json& value, const Place& at, std::initializer_list<std::string_view> required,
                                  std::initializer_list<std::string_view> optional) {
  if (!value.is_object()) return at.fault("an object should stand here, with the keys " + listed(required, optional));
  for (const auto& [key, unused] : value.get_ref<const json::object_t&>())
    if (!is_among(required, key) && !is_among(optional, key))
      return Place(at, key).fault("unknown key; the keys here are " + listed(required, optional));
  for (const std::string_view key : required)
    if (!value.contains(key)) return at.fault("the key " + shown(key) + " is missing");
  return std::nullopt;
}

Result<const json*> member(const json& object, const Place& at, std::string_view key) {
  if (!object.is_object()) return at.fault("an object should stand here");
  const auto found = object.find(key);
  if (found == object.end()) return at.fault("the key " + shown(key) + " is missing");
  return &*found;
}

Result<std::string> read_text(const json& object, const Place& at, std::string_view key) {
  const auto value = member(object, at, key);
  if (!value) return value.failure();
  if (!(*value)->is_string()) return Place(at, key).fault("a string should stand here");
  return (*value)->get_ref<const std::string&>();
}

Result<std::uint64_t> read_count(const json& object, const Place& at, std::string_view key, std::uint64_t least,
                                 std::uint64_t most) {
  const auto value = member(object, at, key);
  if (!value) return value.failure();
  const bool fits = (*value)->is_number_unsigned() && (*value)->get<std::uint64_t>() >= least &&
                    (*value)->get<std::uint64_t>() <= most;
  if (!fits)
    return Place(at, key).fault("an integer from " + std::to_string(least) + " to " + std::to_string(most) +
                                " should stand here");
  return (*value)->get<std::uint64_t>();
}

}  // namespace merestone
