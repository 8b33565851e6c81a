#include "cli/area_options.hpp"

#include <fmt/format.h>

#include <cmath>

#include "cli/region_words.hpp"
#include "cli/shared_arguments.hpp"
#include "cover/trunk.hpp"
#include "kernel/typed_region.hpp"
#include "search/catalogue/catalogue.hpp"

namespace merestone {

namespace {

constexpr double kDefaultSeconds = 60;

constexpr const char* kFooter = R"(Examples:
  merestone area
      what a minute proves of the area of M, from both sides
  merestone area --depth 16 --out area16.mere
      the same blocks on every machine, whatever the threads; with the certificate
  merestone-check area16.mere
      what the colleague runs: it computes both bounds anew
  merestone area --seconds 7200 --out area.mere
  merestone area --seconds 7200 --out area.mere --resume
      a long run, and how it goes on after it was killed: what was finished is in area.mere.journal
  merestone area --within -0.8+0.05i -0.7+0.15i --depth 12 --picture strait.png
      the area of M in a box, and a picture of what is proved there

How it is proved:
  At least: hyperbolic components do not overlap; the first coefficients of the map of the unit disc
  onto each bound its area from below (Lemma A2). With --within: cells proved inside.
  At most: discs proved outside M are painted on a fine grid; what they leave is all that M can
  have (Lemma A1). Both are exact: the digits printed are rounded outward.

Exit codes:
  0  both bounds are proved
  2  usage, or a malformed box
  4  a file could not be read or written; what was finished is kept for --resume
  128 + signal: interrupted; what was finished is kept for --resume if there is --out
)";

void add_effort(CLI::App& command, AreaWords& words) {
  CLI::Option* depth =
      command
          .add_option("--depth", words.depth, "Halve cells so often; the result is the same wherever it is computed")
          ->type_name("N")
          ->check(CLI::Range(kSmallestDepth, kLargestDepth));
  command.add_option("--seconds", words.seconds, "Go as deep as the time allows; 60 unless --depth is given")
      ->type_name("S")
      ->check(CLI::Range(1.0, 1e7))
      ->excludes(depth);
  command
      .add_option("--resolution", words.resolution,
                  "Look for components of a conformal radius down to 2^-N; by default what suits the depth")
      ->type_name("N")
      ->check(CLI::Range(1, kFinestResolution));
  command.add_option("--rules", words.rules, "elementary: cells are proved outside by arithmetic and |z| > 2 alone")
      ->check(CLI::IsMember({"all", "elementary"}))
      ->capture_default_str();
  command.add_option("--threads", words.threads, "Threads; all that the process may use by default")
      ->type_name("N")
      ->check(CLI::Range(1U, 4096U));
  command.add_option("--lanes", words.lanes, "Vector instructions to use, by their name; the widest by default")
      ->type_name("NAME");
}

}  // namespace

CLI::App* add_area_command(CLI::App& program, AreaWords& words) {
  CLI::App* command =
      program.add_subcommand("area", "Prove that the area of M, or of its part in a box, lies between two numbers");
  command->add_option("--within", words.within, "Only what M has in the box between two opposite corners")
      ->type_name("CORNER CORNER")
      ->check(CLI::Validator(
          [](std::string& corner) { return corner.empty() ? std::string("a corner is empty") : std::string(); }, ""));
  add_effort(*command, words);
  CLI::Option* out =
      command->add_option("--out", words.out, "Write a certificate, NAME.mere; NAME.mere.journal grows meanwhile")
          ->type_name("FILE");
  command->add_flag("--resume", words.resume, "Go on with the journal of an earlier run of the same words")->needs(out);
  command
      ->add_flag("--outline", words.outline, "Write the blocks by their digests alone: a small file, to be regenerated")
      ->needs(out);
  CLI::Option* picture =
      command->add_option("--picture", words.picture, "Also draw what is proved, as a PNG picture")->type_name("FILE");
  command->add_option("--pixels", words.pixels, "Width of the picture")
      ->type_name("N")
      ->check(CLI::Range(64U, 16384U))
      ->capture_default_str()
      ->needs(picture);
  command->add_flag("--json", words.json, "Answer with a JSON object");
  command->footer(kFooter);
  return command;
}

Result<RationalBox> read_box(const std::string& command, const std::pair<std::string, std::string>& corners) {
  const std::string typed = "box " + packed(corners.first) + " " + packed(corners.second);
  const Result<Shape> region = parse_region(typed);
  if (!region) return Failure{command + ": " + fault_of_region(typed, region.failure()).message};
  const Rectangle box = bounding_rectangle(*region);
  return RationalBox{{box.x_lo, box.y_lo}, {box.x_hi, box.y_hi}};
}

std::optional<Failure> check_container_name(const std::string& path) {
  constexpr std::string_view kEnding = ".mere";
  if (path.size() > kEnding.size() && std::string_view(path).substr(path.size() - kEnding.size()) == kEnding)
    return std::nullopt;
  return Failure{"--out " + path + ": a certificate of this kind is a container; give a name that ends in .mere"};
}

Result<AreaRequest> read_area_words(const AreaWords& words) {
  AreaRequest request;
  if (!words.within.first.empty()) {
    const Result<RationalBox> box = read_box("area", words.within);
    if (!box) return box.failure();
    if (words.resolution)
      return Failure{"area: --resolution is for all of M; with --within cells inside bound the area from below"};
    request.within = *box;
  }
  if (!words.out.empty())
    if (auto problem = check_container_name(words.out)) return *problem;
  if (words.seconds && std::isnan(*words.seconds)) return Failure{"--seconds nan: give a number of seconds"};
  if (!words.depth) request.seconds = words.seconds.value_or(kDefaultSeconds);
  request.depth = words.depth ? *words.depth : depth_for_seconds(*request.seconds);
  if (!request.within) request.resolution = words.resolution.value_or(resolution_for_depth(request.depth));
  if (words.rules == "elementary") request.rules = CoverRules::elementary;
  if (const Result<AreaCover> cover = cover_of(request); !cover) {
    const auto& [corner, opposite] = words.within;  // all of M can be cut to any depth
    return Failure{fmt::format("area: --within {} {}: {}", packed(corner), packed(opposite), cover.failure().message)};
  }
  return request;
}

}  // namespace merestone
