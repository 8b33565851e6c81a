#pragma once
#include <nlohmann/json.hpp>
#include <optional>
#include <string>

#include "cli/exit_code.hpp"
#include "cover/area_assembly.hpp"

namespace merestone {

/// What a command that bounds an area needs beside the request.
struct AreaJob {
  AreaRequest request;
  std::string out;  // the certificate, or empty
  bool resume = false, outline = false;
  unsigned threads = 0;
  nlohmann::json provenance;
};

/// How it went.
struct AreaOutcome {
  std::optional<AreaResult> result;  // nothing: the run failed, or was interrupted
  std::optional<WrittenArea> written;
  int code = 0;  // of the program
};

/// Runs the job with progress on the terminal, keeping finished blocks in a journal beside the certificate. Failures
/// and interruptions are said on standard error.
AreaOutcome run_area_job(const AreaJob& job);

}  // namespace merestone
