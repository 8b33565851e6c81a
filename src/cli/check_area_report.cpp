#include "cli/check_area_report.hpp"

#include <fmt/format.h>

#include <nlohmann/json.hpp>

#include "cli/check_message.hpp"
#include "cli/check_notation.hpp"
#include "cli/check_text.hpp"
#include "cli/shared_version.hpp"
#include "format/digest.hpp"
#include "format/literal.hpp"
#include "format/shown.hpp"
#include "format/spelling.hpp"

namespace merestone {

namespace {

using Json = nlohmann::ordered_json;
constexpr int kDigits = 10;
constexpr std::size_t kLongestList = 200;  // characters, of absent blocks

ExitCode exit_code_of(const AreaVerdict& verdict) {
  if (verdict.fault) return verdict.fault->kind == ReadFault::Kind::input ? ExitCode::io_failed : ExitCode::malformed;
  if (verdict.failed > 0) return ExitCode::refuted;
  if (verdict.over_limit) return ExitCode::undecided;
  return verdict.absent > 0 ? ExitCode::sample_only : ExitCode::established;
}

std::string place_in_words(const AreaHeader& header, const Notation& n = Notation(StatementForm::text)) {
  if (!header.cover || !header.cover->within) return n.formula("M");
  const RationalBox& box = *header.cover->within;
  const std::string sides = fmt::format("[{}, {}] {} [{}, {}]", spell(box.lo.re), spell(box.hi.re),
                                        n.pick("x", "\\times"), spell(box.lo.im), spell(box.hi.im));
  return n.formula("M") + " in the box " + n.formula(sides);
}

std::string interval(const std::optional<Dyadic>& lower, const std::optional<Dyadic>& upper) {
  return interval_literal(lower ? *lower : Dyadic(), upper, kDigits);
}

std::string verdict_in_words(const AreaVerdict& verdict) {
  if (verdict.fault) return "no verdict, the certificate is malformed, damaged or could not be read";
  if (verdict.failed > 0) return "NOT ESTABLISHED";
  if (verdict.over_limit) return "REFUSED over the limit";
  if (verdict.absent > 0)
    return fmt::format("established in part: {} of {} blocks are absent", grouped(verdict.absent),
                       grouped(verdict.blocks));
  return "established";
}

// Which blocks are absent.
std::string absent_in_words(const AreaVerdict& verdict) {
  std::string text;
  std::uint64_t named = 0;
  for (const auto& [first, last] : verdict.absent_runs) {
    if (named > 0 && text.size() > kLongestList) break;
    text += fmt::format("{}{}", text.empty() ? "" : ", ",
                        first == last ? grouped(first) : grouped(first) + " to " + grouped(last));
    named += last - first + 1;
  }
  return text + (named < verdict.absent ? fmt::format(" and {} more", grouped(verdict.absent - named)) : "");
}

std::string counts_in_words(const AreaVerdict& verdict) {
  std::string text;
  if (verdict.claimed.cover)
    text += fmt::format("  at most: a cover with {} discs or cells outside M and {} inside (Lemma A1)\n",
                        grouped(verdict.outside_marks), grouped(verdict.inside_marks));
  if (verdict.components > 0)
    text += fmt::format("  at least: {} hyperbolic components (Lemma A2)\n", grouped(verdict.components));
  return text + fmt::format("  established in balls too: {} marks; in balls alone: {}\n", grouped(verdict.sampled),
                            grouped(verdict.fallbacks));
}

std::string in_words(const std::string& path, const AreaVerdict& verdict, std::uint64_t seed) {
  std::string text =
      fmt::format("{}\n  claim: the area of {} is in {}\n", file_in_words(path), place_in_words(verdict.claimed),
                  interval(verdict.claimed.at_least, verdict.claimed.at_most));
  for (const std::string& failure : verdict.failures) text += "  " + failure + "\n";
  if (verdict.over_limit) text += "  " + *verdict.over_limit + "\n";
  if (verdict.absent > 0)
    text += fmt::format("  absent, not established: block{} {}\n", verdict.absent == 1 ? "" : "s",
                        absent_in_words(verdict));
  if (!verdict.fault && verdict.failed == 0 && !verdict.over_limit) {
    text += fmt::format("  computed here{}: {}\n", verdict.absent > 0 ? ", from what absent blocks claim too" : "",
                        interval(verdict.at_least, verdict.at_most));
    text += counts_in_words(verdict);
    text += fmt::format("  drawn with --seed {}; claims-digest {}\n", seed, hexadecimal(verdict.end->digest));
  }
  return text + fmt::format("{}: {}\n", file_in_words(path), verdict_in_words(verdict));
}

Json as_json(const std::string& path, const AreaVerdict& verdict, std::uint64_t seed) {
  Json json{{"file", path}, {"content", "area"}, {"area_of", place_in_words(verdict.claimed)}};
  const auto put = [&](const char* key, const std::optional<Dyadic>& value) {
    if (value) json[key] = spell(*value);
  };
  put("at_least", verdict.claimed.at_least), put("at_most", verdict.claimed.at_most);
  put("computed_at_least", verdict.at_least), put("computed_at_most", verdict.at_most);
  json["verdict"] = verdict_in_words(verdict);
  json["blocks"] = verdict.blocks, json["absent"] = verdict.absent, json["absent_blocks"] = verdict.absent_runs;
  json["components"] = verdict.components;
  json["outside_marks"] = verdict.outside_marks, json["inside_marks"] = verdict.inside_marks;
  json["sampled"] = verdict.sampled, json["fallbacks"] = verdict.fallbacks, json["seed"] = seed;
  json["failures"] = verdict.failures;
  if (verdict.over_limit) json["over_limit"] = *verdict.over_limit;
  if (verdict.fault) json["message"] = verdict.fault->message;
  if (verdict.end && !verdict.fault) json["claims_digest"] = hexadecimal(verdict.end->digest);
  json["exit"] = static_cast<int>(exit_code_of(verdict));
  return json;
}

// How each end is proved.
std::string proof_in_words(const AreaVerdict& verdict, const Notation& n) {
  const std::string lower = verdict.components > 0 ? "a sum of lower bounds of the areas of hyperbolic components"
                                                   : "the area of cells proved inside " + n.formula("M");
  if (!verdict.at_most) return fmt::format("The lower end is {}; it is", lower);
  const std::string upper = "the area of a cover less discs and cells proved outside " + n.formula("M");
  if (!verdict.at_least) return fmt::format("The upper end is {}; it is", upper);
  return fmt::format("The lower end is {}, the upper end {}; both are", lower, upper);
}

std::string sentence(const AreaVerdict& verdict, StatementForm form) {
  const Notation n(form);
  const std::string ends = interval(verdict.claimed.at_least, verdict.claimed.at_most);
  return fmt::format(
      "The area of {} lies in {}. {} established by merestone-check {} from the certificate with claims-digest {}.\n",
      place_in_words(verdict.claimed, n), n.formula(ends), proof_in_words(verdict, n), kProgramVersion,
      n.digest(hexadecimal(verdict.end->digest)));
}

void complain_of(const std::string& path, const AreaVerdict& verdict) {
  if (verdict.fault) complain(file_in_words(path) + ": " + verdict.fault->message);
  if (verdict.over_limit) complain(file_in_words(path) + ": " + *verdict.over_limit);
  for (const std::string& failure : verdict.failures) complain(file_in_words(path) + ": " + failure);
  if (verdict.absent > 0 && verdict.failed == 0 && !verdict.fault)
    complain(fmt::format("{}: absent and not established: {} of {} blocks, namely {}", file_in_words(path),
                         grouped(verdict.absent), grouped(verdict.blocks), absent_in_words(verdict)));
}

}  // namespace

ExitCode report_area(const std::string& path, const AreaVerdict& verdict, const CheckWords& words, std::uint64_t seed,
                     Console& console) {
  const ExitCode code = exit_code_of(verdict);
  if (words.json) {
    console.output.write(as_json(path, verdict, seed).dump(-1, ' ', false, Json::error_handler_t::replace) + "\n");
  } else if (words.quiet || words.statement) {
    complain_of(path, verdict);
    if (words.statement && code == ExitCode::established) console.output.write(sentence(verdict, *words.statement));
  } else {
    if (verdict.fault) complain(file_in_words(path) + ": " + verdict.fault->message);
    if (!console.named_program) console.output.write(program_in_words());
    console.named_program = true;
    console.output.write("\n" + in_words(path, verdict, seed));
  }
  return code;
}

}  // namespace merestone
