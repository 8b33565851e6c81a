#include "cli/area_command.hpp"

#include <fmt/format.h>

#include "cli/area_job.hpp"
#include "cli/provenance.hpp"
#include "cli/refuse.hpp"
#include "cli/shared_arguments.hpp"
#include "cli/shared_output.hpp"
#include "cover/area_picture.hpp"
#include "format/atomic_file.hpp"
#include "format/digest.hpp"
#include "format/literal.hpp"
#include "format/spelling.hpp"
#include "image/png_writer.hpp"
#include "lanes/exterior_batch.hpp"

namespace merestone {

namespace {

using Json = nlohmann::ordered_json;
constexpr int kDigits = 8;

std::string depth_in_words(const AreaResult& result) {
  const unsigned least = result.least_depth, largest = result.largest_depth;
  return least == largest ? fmt::format("depth {}", least) : fmt::format("depth {} to {}", least, largest);
}

std::string in_words(const AreaResult& result, const AreaWords& words) {
  const AreaHeader& header = result.header;
  const bool is_whole = !header.cover->within;
  std::string text = fmt::format(
      "the area of M{} is in {}\n",
      is_whole ? "" : fmt::format(" in the box {} {}", packed(words.within.first), packed(words.within.second)),
      interval_literal(header.at_least, header.at_most, kDigits));
  text += is_whole ? fmt::format("  at least: {} components on or above the real axis, each with a proved nucleus\n",
                                 result.components.size())
                   : std::string("  at least: cells that are proved inside\n");
  text += fmt::format("  at most: what discs outside M leave of {} blocks, cut to {}\n", result.trunk.places.size(),
                      depth_in_words(result));
  if (result.resumed_blocks > 0)
    text += fmt::format("  {} of the blocks are from the journal\n", result.resumed_blocks);
  return text;
}

Json as_json(const AreaResult& result, const std::optional<WrittenArea>& written, const AreaWords& words) {
  const AreaHeader& header = result.header;
  Json json{{"at_least", spell(*header.at_least)},
            {"at_most", spell(*header.at_most)},
            {"interval", interval_literal(header.at_least, header.at_most, kDigits)},
            {"blocks", result.trunk.places.size()},
            {"depth", {result.least_depth, result.largest_depth}},
            {"components", result.components.size()},
            {"resumed_blocks", result.resumed_blocks}};
  if (header.cover->within) json["within"] = {packed(words.within.first), packed(words.within.second)};
  if (written)
    json["certificate"] = {{"file", words.out}, {"bytes", written->bytes}, {"digest", hexadecimal(written->digest)}};
  return json;
}

// Draws the picture; the exit code when that failed.
std::optional<int> draw(const AreaWords& words, const AreaRequest& request) {
  const Result<Picture> picture = draw_area(request.within, request.rules, words.pixels);
  if (!picture) return refuse(ExitCode::malformed, picture.failure());
  const std::string png = png_of(
      *picture,
      {{"Software", "merestone"}, {"Comment", "sky blue: proved outside M; black: proved inside; orange: undecided"}});
  Result<AtomicFile> file = AtomicFile::create(words.picture);
  if (!file) return refuse(ExitCode::io_failed, file.failure());
  if (auto problem = file.value().write(png)) return refuse(ExitCode::io_failed, *problem);
  if (auto problem = file.value().commit()) return refuse(ExitCode::io_failed, *problem);
  return std::nullopt;
}

}  // namespace

int run_area_command(const AreaWords& words, const std::string& command_line) {
  const Result<AreaRequest> request = read_area_words(words);
  if (!request) return refuse(ExitCode::malformed, request.failure());
  if (!words.lanes.empty() && !use_lane_target(words.lanes))
    return refuse(ExitCode::malformed,
                  {fmt::format("--lanes {}: this machine has {}", words.lanes, fmt::join(lane_targets(), ", "))});
  if (!words.picture.empty())
    if (const auto code = draw(words, *request)) return *code;
  const AreaOutcome outcome =
      run_area_job({*request, words.out, words.resume, words.outline, words.threads, provenance(command_line)});
  if (!outcome.result) return outcome.code;
  Output output;
  if (words.json) {
    output.write(as_json(*outcome.result, outcome.written, words).dump() + "\n");
  } else {
    output.write(in_words(*outcome.result, words));
    if (outcome.written)
      output.write(fmt::format("{}: certificate of {} bytes{}, digest {}\n", words.out, outcome.written->bytes,
                               words.outline ? ", an outline" : "", hexadecimal(outcome.written->digest)));
  }
  if (output.failed()) return refuse(ExitCode::io_failed, {"standard output cannot be written"});
  return outcome.code;
}

}  // namespace merestone
