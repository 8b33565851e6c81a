#include "format/area_header.hpp"

#include <array>
#include <cmath>
#include <string>

#include "format/region_json.hpp"
#include "format/shown.hpp"
#include "format/spelling.hpp"
#include "format/strict_object.hpp"
#include "format/version.hpp"

namespace merestone {

namespace {

using nlohmann::json;

constexpr std::string_view kAllRules = "all", kElementaryRules = "elementary";

json to_json(const RationalBox& box) {
  return {{"re", json::array({spell(box.lo.re), spell(box.hi.re)})},
          {"im", json::array({spell(box.lo.im), spell(box.hi.im)})}};
}

json to_json(const AreaCover& cover) {
  const CoverSquare& root = cover.plan.root;
  json out = {{"mirrored", cover.mirrored},
              {"root",
               {{"corner", json::array({spell(Dyadic(root.x)), spell(Dyadic(root.y))})},
                {"side", spell(Dyadic(1.0).shifted(root.side_exponent))}}},
              {"rules", cover.plan.rules == CoverRules::all ? kAllRules : kElementaryRules},
              {"trunk-grade", root.grade}};
  if (cover.within) out["within"] = to_json(*cover.within);
  return out;
}

Result<std::optional<Dyadic>> read_bound(const json& header, const Place& at, std::string_view key) {
  const auto found = header.find(key);
  if (found == header.end()) return std::optional<Dyadic>();
  const Place here(at, key);
  Result<Dyadic> bound = read_dyadic_value(*found, here);
  if (!bound) return bound.failure();
  if (bound->sign() < 0) return here.fault("an area is not negative");
  return std::optional<Dyadic>(std::move(bound.value()));
}

Result<double> read_coordinate(const Dyadic& value, const Place& at) {
  const bool fits = !(Dyadic(kLargestCorner) < value) && !(value < Dyadic(-kLargestCorner));
  const double number = fits ? arf_get_d(value.raw(), ARF_RND_NEAR) : 0;
  if (!fits || !(Dyadic(number) == value))
    return at.fault("a corner's coordinate should stand here: a double, at most 256 in size");
  return number;
}

Result<std::int32_t> read_side(const json& root, const Place& at) {
  const Place here(at, "side");
  const Result<Dyadic> side = read_dyadic_value(root["side"], here);
  if (!side) return side.failure();
  const Dyadic least = Dyadic(1.0).shifted(kLeastSideExponent), most = Dyadic(1.0).shifted(kLargestSideExponent);
  if (side->bits() != 1 || *side < least || most < *side)
    return here.fault("the side of a square is a power of two from 2^-256 to 2^8");
  return static_cast<std::int32_t>(arf_abs_bound_lt_2exp_si(side->raw()) - 1);
}

Result<CoverSquare> read_root(const json& root, const Place& at) {
  if (auto problem = check_keys(root, at, {"corner", "side"})) return *problem;
  const Place corner_at(at, "corner");
  const auto corner = read_dyadic_pair(root["corner"], corner_at);
  if (!corner) return corner.failure();
  const Result<double> x = read_coordinate((*corner)[0], Place(corner_at, std::size_t{0}));
  if (!x) return x.failure();
  const Result<double> y = read_coordinate((*corner)[1], Place(corner_at, std::size_t{1}));
  if (!y) return y.failure();
  const Result<std::int32_t> side = read_side(root, at);
  if (!side) return side.failure();
  return CoverSquare{*x, *y, *side, 0};
}

Result<std::array<Rational, 2>> read_ends(const json& box, const Place& at, std::string_view key) {
  const Place here(at, key);
  auto ends = read_rational_pair(box[key], here);
  if (ends && !((*ends)[0] < (*ends)[1])) return here.fault("the first end of a box's side is less than the second");
  return ends;
}

Result<std::optional<RationalBox>> read_within(const json& cover, const Place& at) {
  const auto found = cover.find("within");
  if (found == cover.end()) return std::optional<RationalBox>();
  const Place here(at, "within");
  if (auto problem = check_keys(*found, here, {"re", "im"})) return *problem;
  const auto re = read_ends(*found, here, "re");
  if (!re) return re.failure();
  const auto im = read_ends(*found, here, "im");
  if (!im) return im.failure();
  return std::optional<RationalBox>(RationalBox{{(*re)[0], (*im)[0]}, {(*re)[1], (*im)[1]}});
}

Result<CoverRules> read_rules(const json& cover, const Place& at) {
  const Result<std::string> name = read_text(cover, at, "rules");
  if (!name) return name.failure();
  if (*name == kAllRules) return CoverRules::all;
  if (*name == kElementaryRules) return CoverRules::elementary;
  return Place(at, "rules").fault("the rules " + shown(*name) + " are neither 'all' nor 'elementary'");
}

Result<AreaCover> read_cover(const json& cover, const Place& at) {
  if (auto problem = check_keys(cover, at, {"mirrored", "root", "rules", "trunk-grade"}, {"within"})) return *problem;
  if (!cover["mirrored"].is_boolean()) return Place(at, "mirrored").fault("true or false should stand here");
  const Place root_at(at, "root");
  Result<CoverSquare> root = read_root(cover["root"], root_at);
  if (!root) return root.failure();
  const Result<CoverRules> rules = read_rules(cover, at);
  if (!rules) return rules.failure();
  const Result<std::uint64_t> grade = read_count(cover, at, "trunk-grade", 0, Canvas::kLargestGrade);
  if (!grade) return grade.failure();
  root.value().grade = static_cast<std::uint32_t>(*grade);
  const bool mirrored = cover["mirrored"].get<bool>();
  if (mirrored && root->y != 0)
    return Place(root_at, "corner").fault("a mirrored cover stands upon the real axis; its corner is real");
  Result<std::optional<RationalBox>> within = read_within(cover, at);
  if (!within) return within.failure();
  return AreaCover{{*root, *rules}, mirrored, std::move(within.value())};
}

Result<std::optional<AreaCover>> read_optional_cover(const json& header, const Place& at) {
  const auto found = header.find("cover");
  if (found == header.end()) return std::optional<AreaCover>();
  Result<AreaCover> cover = read_cover(*found, Place(at, "cover"));
  if (!cover) return cover.failure();
  return std::optional<AreaCover>(std::move(cover.value()));
}

}  // namespace

json to_json(const AreaHeader& header) {
  json out = {{"content", kAreaContent}};
  if (header.at_least) out["at-least"] = spell(*header.at_least);
  if (header.at_most) out["at-most"] = spell(*header.at_most);
  if (header.cover) out["cover"] = to_json(*header.cover);
  return out;
}

Result<AreaHeader> read_area_header(json header) {
  const Place at;
  const Result<std::string> content = read_text(header, at, "content");
  if (!content) return content.failure();
  if (*content != kAreaContent)
    return Place(at, "content").fault("the content " + shown(*content) + " is not " + shown(kAreaContent));
  if (auto problem =
          check_keys(header, at, {"content", "format", "version"}, {"at-least", "at-most", "cover", "provenance"}))
    return *problem;
  if (const auto provenance = take_provenance(header, at); !provenance) return provenance.failure();
  Result<std::optional<Dyadic>> least = read_bound(header, at, "at-least");
  if (!least) return least.failure();
  Result<std::optional<Dyadic>> most = read_bound(header, at, "at-most");
  if (!most) return most.failure();
  Result<std::optional<AreaCover>> cover = read_optional_cover(header, at);
  if (!cover) return cover.failure();
  if (cover->has_value() != most->has_value())
    return at.fault(most->has_value() ? "an upper bound rests on a cover, and there is none; leave out 'at-most'"
                                      : "there is a cover, and the key 'at-most' is missing");
  return AreaHeader{std::move(least.value()), std::move(most.value()), std::move(cover.value())};
}

}  // namespace merestone
