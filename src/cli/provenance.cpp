#include "cli/provenance.hpp"

#include <fmt/chrono.h>
#include <fmt/format.h>
#include <gmp.h>
#include <mpfr.h>

#include <ctime>

#include "cli/shared_version.hpp"
#include "format/shown.hpp"
#include "kernel/flint.hpp"

namespace merestone {

namespace {

constexpr std::size_t kLongestCommandLine = 1000;

}  // namespace

nlohmann::json provenance(const std::string& command_line) {
  return {{"program", fmt::format("merestone {}", kProgramVersion)},
          {"libraries", fmt::format("FLINT {}, MPFR {}, GMP {}", FLINT_VERSION, mpfr_get_version(), gmp_version)},
          {"compiler", __VERSION__},
          {"command", printable(command_line, kLongestCommandLine)},
          {"written", fmt::format("{:%Y-%m-%dT%H:%M:%SZ}", fmt::gmtime(std::time(nullptr)))}};
}

}  // namespace merestone
