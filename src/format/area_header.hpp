#pragma once
#include <nlohmann/json.hpp>
#include <optional>
#include <string_view>

#include "kernel/cover_window.hpp"
#include "kernel/exact.hpp"
#include "kernel/result.hpp"

namespace merestone {

inline constexpr std::string_view kAreaContent = "area";

// Squares and their corners are doubles, within these limits.
inline constexpr std::int32_t kLeastSideExponent = -256, kLargestSideExponent = 8;
inline constexpr double kLargestCorner = 256;

/// The square that is covered.
struct AreaCover {
  CoverPlan plan;
  /// The cover is of the upper half; conjugation doubles it. The corner is real then.
  bool mirrored = false;
  /// What a person asked for: the area is that of M in this box. Otherwise it is that of all of M.
  std::optional<RationalBox> within;
};

/// What the header of an area container claims: at_least <= the area <= at_most. There is an upper bound if and only if
/// there is a cover. Whether the root covers what it must is not verified here.
struct AreaHeader {
  std::optional<Dyadic> at_least, at_most;
  std::optional<AreaCover> cover;
};

/// As it stands in the header, without format, version and provenance: what enters the claims-digest.
/// Requires finite numbers.
nlohmann::json to_json(const AreaHeader& header);

/// Reads the header of a container, every key checked but "format" and "version", whose values the frame verifies.
/// On failure: the JSON pointer and the reason.
Result<AreaHeader> read_area_header(nlohmann::json header);

}  // namespace merestone
