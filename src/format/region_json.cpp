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
  json operator()(const Box& box) const {
    return {{"box", {{"re", json::array({spell(box.lo.re), spell(box.hi.re)})},
                     {"im", json::array({spell(box.lo.im), spell(box.hi.im)})}}}};
  }
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

// Two ends in order.
Result<std::array<Dyadic, 2>> read_ends(const json& value, const Place& at, std::string_view of_what) {
  auto pair = read_pair<Dyadic>(value, at, read_dyadic);
  if (pair && !(pair.value()[0] < pair.value()[1]))
    return at.fault("the first end of " + std::string(of_what) + " is less than the second");
  return pair;
}

Result<Region> read_segment(const json& value, const Place& at) {
  auto ends = read_ends(value, at, "a segment");
  if (!ends) return ends.failure();
  return Region(Segment{std::move(ends.value()[0]), std::move(ends.value()[1])});
}

Result<Region> read_box(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"re", "im"})) return *problem;
  auto re = read_ends(value["re"], Place(at, "re"), "a box's side");
  if (!re) return re.failure();
  auto im = read_ends(value["im"], Place(at, "im"), "a box's side");
  if (!im) return im.failure();
  return Region(Box{{std::move(re.value()[0]), std::move(im.value()[0])},
                    {std::move(re.value()[1]), std::move(im.value()[1])}});
}

}  // namespace

json to_json(const ComplexDyadic& z) { return json::array({spell(z.re), spell(z.im)}); }

json to_json(const Disc& disc) { return {{"centre", to_json(disc.centre)}, {"radius", spell(disc.radius)}}; }

json to_json(const Region& region) { return std::visit(ToJson{}, region); }

Result<Dyadic> read_dyadic_value(const json& value, const Place& at) { return read_number<Dyadic>(value, at, read_dyadic); }

Result<std::array<Dyadic, 2>> read_dyadic_pair(const json& value, const Place& at) {
  return read_pair<Dyadic>(value, at, read_dyadic);
}

Result<std::array<Rational, 2>> read_rational_pair(const json& value, const Place& at) {
  return read_pair<Rational>(value, at, read_rational);
}

Result<ComplexDyadic> read_centre(const json& value, const Place& at) {
  auto pair = read_pair<Dyadic>(value["centre"], Place(at, "centre"), read_dyadic);
  if (!pair) return pair.failure();
  return ComplexDyadic{std::move(pair.value()[0]), std::move(pair.value()[1])};
}

Result<Disc> read_disc(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {"centre", "radius"})) return *problem;
  Result<ComplexDyadic> centre = read_centre(value, at);
  if (!centre) return centre.failure();
  const Place radius_at(at, "radius");
  auto radius = read_dyadic_value(value["radius"], radius_at);
  if (!radius) return radius.failure();
  if (radius->sign() <= 0) return radius_at.fault("the radius of a disc is positive");
  return Disc{std::move(centre.value()), std::move(radius.value())};
}

Result<Region> read_region(const json& value, const Place& at) {
  if (auto problem = check_keys(value, at, {}, {"point", "segment", "disc", "box"})) return *problem;
  if (value.size() != 1) return at.fault("a region has exactly one of the keys point, segment, disc, box");
  const std::string& kind = value.begin().key();
  const Place inner(at, kind);
  if (kind == "point") return read_point(value.front(), inner);
  if (kind == "segment") return read_segment(value.front(), inner);
  if (kind == "box") return read_box(value.front(), inner);
  const Result<Disc> disc = read_disc(value.front(), inner);
  if (!disc) return disc.failure();
  return Region(*disc);
}

}  // namespace merestone
