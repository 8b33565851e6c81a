#include "format/pretty_json.hpp"

#include <algorithm>
#include <array>
#include <string_view>
#include <vector>

#include "format/digest.hpp"

namespace merestone {

namespace {

using nlohmann::json;

constexpr std::size_t kWidestLine = 100;

constexpr std::array<std::string_view, 17> kOrder = {"format", "version",   "claim",  "bailout", "index",      "region",
                                                     "point",  "segment",   "rule",   "period",  "preperiod",  "disc",
                                                     "bits",   "request",   "by",     "claims",  "provenance"};

std::size_t rank(std::string_view key) {
  return static_cast<std::size_t>(std::find(kOrder.begin(), kOrder.end(), key) - kOrder.begin());
}

std::vector<const json::object_t::value_type*> ordered(const json& object) {
  std::vector<const json::object_t::value_type*> members;
  for (const auto& member : object.get_ref<const json::object_t&>()) members.push_back(&member);
  std::stable_sort(members.begin(), members.end(), [](auto a, auto b) { return rank(a->first) < rank(b->first); });
  return members;
}

// Joins the members as printed by `item`, with the marks of an array or object around them.
template <class Item>
std::string joined(const json& value, const std::string& open, const std::string& between, const std::string& close,
                   Item&& item) {
  std::string out = (value.is_object() ? "{" : "[") + open;
  const std::size_t first = out.size();
  const auto separate = [&] { return out.size() > first ? between : std::string(); };
  if (value.is_object())
    for (const auto* member : ordered(value))
      out += separate() + canonical_json(member->first) + ": " + item(member->second);
  else
    for (const json& element : value) out += separate() + item(element);
  return out + close + (value.is_object() ? "}" : "]");
}

std::string one_line(const json& value) {
  if (!value.is_structured() || value.empty()) return canonical_json(value);
  const std::string space = value.is_object() ? " " : "";
  return joined(value, space, ", ", space, one_line);
}

std::string print(const json& value, std::size_t indent) {
  if (indent > 0 && canonical_json(value).size() + indent <= kWidestLine) return one_line(value);
  if (!value.is_structured() || value.empty()) return canonical_json(value);
  const std::string line = "\n" + std::string(indent, ' ');
  return joined(value, line + "  ", "," + line + "  ", line,
                [indent](const json& item) { return print(item, indent + 2); });
}

}  // namespace

std::string pretty_json(const json& value) { return print(value, 0) + "\n"; }

}  // namespace merestone
