#pragma once
#include <nlohmann/json.hpp>
#include <string>

namespace merestone {

/// Where a certificate comes from: program, version, libraries, command line, time. Nothing rests on it.
nlohmann::json provenance(const std::string& command_line);

}  // namespace merestone
