#include "format/region_json.hpp"

#include <array>
#include <string>
#include <variant>

#include "format/spelling.hpp"
#include "format/strict_object.hpp"

namespace merestone {

namespace {

using nlohmann::json;

struct ToJson {
  json operator()(const Point& point) const { return {{"point", json::array({spell(point.at.re), spell(point.at.im)})}}; }
  json operator()(const Segment& segment) const {
    return {{"segment", json::array({spell(segment.lo), spell(segment.hi)})}};
  }
  json operator()(const Disc& disc) const { return {{"disc", to_json(disc)}}; }
};

template <class Number>
Result<Number> read_number(const json& value, const Place& at, Result<Number> (*read)(std::string_view)) {
  if (!value.is_string()) return at.fault("a number should stand here, spelled as a string");
  const Result<Number> number = read(value.get_ref<const std::string&>());
  if (!number) return at.fault(number.failure().message);
  return number;
}

template <class Number>
Result<std::array<Number, 2>> read_pair(const json& value, const Place& at, Result<Number> (*read)(std::string_view)) {
  if (!value.is_array() || value.size() != 2) return at.fault("an array of two numbers should stand here");
  Result<Number> first = read_number(value[0], Place(at, std::size_t{0}), read);
  if (!first) return first.failure();
  Result<Number> second = read_number(value[1], Place(at, std::size_t{1}), read);
  if (!second) return second.failure();
  return std::array<Number, 2>{std::move(first.value()), std::move(second.value())};
}

Result<Region> read_point(const json& value, const Place& at) {
  auto pair = read_pair<Rational>(value, at, read_rational);
  if (!pair) return pair.failure();
  return Region(Point{{std::move(pair.value()[0]), std::move(pair.value()[1])}});
}

Result<Region> read_segment(const json& value, const Place& at) {
  auto pair = read_pair<Dyadic>(value, at, read_dyadic);
  if (!pair) return pair.failure();
  if (!(pair.value()[0] < pair.value()[1])) return at.fault("the first end of a segment is less than the second");
  return Region(Segment{std::move(pair.value()[0]), std::move(pair.value()[1])});
}

}  // namespace

json to_json(const Disc& disc) {
  return {{"centre", json::array({spell(disc.centre.re), spell(disc.centre.im)})}, {"radius", spell(disc.radius)}};
}

json to_json(const Region& region) { return std::visit(ToJson{}, region); }

Result<Dyadic> read_dyadic_value(const json& value, const Place& at) { return read_number<Dyadic>(value, at, read_dyadic); }

Result<Disc> read_disc(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"centre", "radius"})) return *problem;
  auto centre = read_pair<Dyadic>(value["centre"], Place(at, "centre"), read_dyadic);
  if (!centre) return centre.failure();
  const Place radius_at(at, "radius");
  auto radius = read_dyadic_value(value["radius"], radius_at);
  if (!radius) return radius.failure();
  if (radius->sign() <= 0) return radius_at.fault("the radius of a disc is positive");
  return Disc{{std::move(centre.value()[0]), std::move(centre.value()[1])}, std::move(radius.value())};
}

Result<Region> read_region(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {}, {"point", "segment", "disc"})) return *problem;
  if (value.size() != 1) return at.fault("a region has exactly one of the keys point, segment, disc");
  const std::string& kind = value.begin().key();
  const Place inner(at, kind);
  if (kind == "point") return read_point(value.front(), inner);
  if (kind == "segment") return read_segment(value.front(), inner);
  const Result<Disc> disc = read_disc(value.front(), inner);
  if (!disc) return disc.failure();
  return Region(*disc);
}

}  // namespace merestone
