#include "cli/decide_cells.hpp"

#include <fmt/format.h>

#include <cmath>

#include "cli/area_job.hpp"
#include "cli/area_options.hpp"
#include "cli/provenance.hpp"
#include "cli/refuse.hpp"
#include "cli/shared_arguments.hpp"
#include "cli/shared_output.hpp"
#include "format/digest.hpp"
#include "format/spelling.hpp"

namespace merestone {

namespace {

using Json = nlohmann::ordered_json;

/// Exact areas of the parts of a box; together they are the box.
struct VerdictAreas {
  Rational outside, inside, undecided, box;
};

VerdictAreas areas_of(const AreaResult& result) {
  const RationalBox& box = *result.header.cover->within;
  const Rational all = (box.hi.re - box.lo.re) * (box.hi.im - box.lo.im);
  const Rational inside = result.header.at_least->to_rational(), left = result.header.at_most->to_rational();
  // fine cells that the box cuts belong to what is left, so that may be more than the box
  const Rational kept = left < all ? left : all;
  return {all - kept, inside, kept - inside, all};
}

double approx(const Rational& value) { return fmpq_get_d(value.raw()); }

std::string row(const char* verdict, const Rational& area, const VerdictAreas& areas) {
  return fmt::format("  {:<10} {:<12.8g} {:6.2f} %  exactly {}\n", verdict, approx(area),
                     100 * approx(area) / approx(areas.box), spell(area));
}

std::string in_words(const AreaResult& result, const VerdictAreas& areas, const std::string& typed) {
  const CoverSquare& root = result.header.cover->plan.root;
  return fmt::format("{}: cut into cells of side 2^{} and less\n", typed,
                     root.side_exponent - static_cast<int>(result.largest_depth)) +
         row("outside", areas.outside, areas) + row("inside", areas.inside, areas) +
         row("undecided", areas.undecided, areas);
}

Json as_json(const VerdictAreas& areas, const std::string& typed, const std::optional<WrittenArea>& written,
             const std::string& out) {
  Json json{{"region", typed}, {"area", spell(areas.box)}};
  for (const auto& [verdict, area] :
       {std::pair("outside", &areas.outside), {"inside", &areas.inside}, {"undecided", &areas.undecided}})
    json[verdict] = {{"area", spell(*area)}, {"share", approx(*area) / approx(areas.box)}};
  if (written)
    json["certificate"] = {{"file", out}, {"bytes", written->bytes}, {"digest", hexadecimal(written->digest)}};
  return json;
}

std::optional<Failure> problem_of(const DecideWords& words) {
  if (words.boxes.size() != 1 || !words.points.empty() || !words.discs.empty() || !words.list.empty())
    return Failure{"decide: --depth cuts up one box; give it as --box A B and nothing else"};
  if (!words.expect.empty())
    return Failure{"decide: --expect asks for one verdict and --depth gives shares of three; leave one of them out"};
  return words.out.empty() ? std::nullopt : check_container_name(words.out);
}

}  // namespace

int run_decide_cells(const DecideWords& words, const std::string& command_line) {
  if (auto problem = problem_of(words)) return refuse(ExitCode::malformed, *problem);
  const Result<RationalBox> box = read_box("decide", words.boxes.front());
  if (!box) return refuse(ExitCode::malformed, box.failure());
  AreaRequest request;
  request.within = *box;
  request.depth = *words.depth;
  if (words.rules == "elementary") request.rules = CoverRules::elementary;
  const AreaOutcome outcome =
      run_area_job({request, words.out, words.resume, false, words.threads, provenance(command_line)});
  if (!outcome.result) return outcome.code;
  const std::string typed = "box " + packed(words.boxes.front().first) + " " + packed(words.boxes.front().second);
  const VerdictAreas areas = areas_of(*outcome.result);
  Output output;
  if (words.json) {
    output.write(as_json(areas, typed, outcome.written, words.out).dump() + "\n");
  } else if (!words.quiet) {
    output.write(in_words(*outcome.result, areas, typed));
    if (outcome.written)
      output.write(fmt::format("{}: certificate of {} bytes, digest {}\n", words.out, outcome.written->bytes,
                               hexadecimal(outcome.written->digest)));
  }
  if (output.failed()) return refuse(ExitCode::io_failed, {"standard output cannot be written"});
  return outcome.code;
}

}  // namespace merestone
