#pragma once
#include <array>
#include <nlohmann/json.hpp>

#include "format/place.hpp"
#include "kernel/region.hpp"

namespace merestone {

nlohmann::json to_json(const Region& region);
/// The value of the key "disc".
nlohmann::json to_json(const ComplexDyadic& z);
nlohmann::json to_json(const Disc& disc);

/// Reads a region as docs/certificate-format.md describes it. On failure: the JSON pointer and the reason.
Result<Region> read_region(const nlohmann::json& value, const Place& at);
/// Reads the value of a key "disc"; the radius must be positive.
/// Reads the member "centre" of an object that has one.
Result<ComplexDyadic> read_centre(const nlohmann::json& object, const Place& at);
Result<Disc> read_disc(const nlohmann::json& value, const Place& at);
/// Reads an array of two numbers in their spelling.
Result<std::array<Dyadic, 2>> read_dyadic_pair(const nlohmann::json& value, const Place& at);
Result<std::array<Rational, 2>> read_rational_pair(const nlohmann::json& value, const Place& at);
/// Reads a dyadic number in its spelling.
Result<Dyadic> read_dyadic_value(const nlohmann::json& value, const Place& at);

}  // namespace merestone
