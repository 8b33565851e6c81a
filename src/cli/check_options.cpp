#include "cli/check_options.hpp"

#include <algorithm>
#include <limits>

#include "format/shown.hpp"

namespace merestone {

namespace {

constexpr std::uint64_t kMostWork = 1'000'000'000'000'000'000;

constexpr const char* kDescription =
    R"(Establishes anew, with enclosures, every claim that certificates make about the Mandelbrot set M.

A certificate holds claims (this parameter, or every parameter of this region, lies outside M; in the interior of M;
in M; leaves the disc of this radius at exactly this step; or this region meets the boundary of M, or contains exactly
one nucleus or Misiurewicz point of this type) and hints for their proofs. Nothing in it is believed: each
claim is established from its exact numbers by the theorem that its rule names, in arithmetic whose rounding errors are
bounded. A claim that is not established is reported; that does not say that it is false.

This program shares no code with the search that found the claims.
)";

constexpr const char* kFooter = R"(Examples:
  merestone-check list.mere.json
      every claim in words, with the figures that prove it; the exit code is the answer
  merestone-check supplement/*.mere.json supplement/*.mere
      several files, small certificates and containers, one verdict each
  merestone-check --all list.mere > list.txt
      each of many claims in words
  merestone-check --json list.mere | grep '"not established"'
      a JSON object a line; claims that are not established always have theirs
  merestone-check --statement tex nucleus.mere.json > nucleus.tex
      each established claim as a paragraph that a paper can \input or quote, with its proof and \bibitem lines
  merestone-check --statement text list.mere.json
      the same as plain text; claims that are not established are named on standard error and yield no sentence
  merestone-check --sample 10000 list.mere
      a first look at a large container: all of it is read, 10,000 claims drawn at random are established
  some-program | merestone-check --quiet - && echo "all of it is established"
      for scripts: nothing is printed unless something is wrong

Limits:
  A unit of work is one step of an orbit in 64 bits, at most about 0.3 microseconds; steps in more bits and arithmetic
  with long numbers count for more. With the default --max-work a claim takes 5 minutes of one processor at most, and a
  file 50. What a claim implies is read off it beforehand: claims that go over a limit are refused and reported, the
  others are established.

JSON objects:
  of a claim  file, claim (its position, from 0), words, request, outcome, rule, rule_words; proved, figures and
              lemmas, or reason
  of a file   file, claims, sample, established, not_established, over_limit, claims_digest, exit; it stands last
  of a file that could not be read to its end   file, fault (malformed, newer, input), message, exit

Exit codes:
  0  every claim was established
  1  a claim was not established; which, by which rule, which inequality failed
  2  usage, or a certificate that is malformed, damaged or of a newer version
  3  a claim was refused because it goes over --max-work or --max-bits
  4  a file could not be read, or the output not written
  5  established on a sample only, or but for blocks that are absent
  With several files the first of 4, 2, 1, 3, 5, 0 that occurs.
)";

StatementForm statement_form(const std::string& word) {
  if (word == "text") return StatementForm::text;
  if (word == "tex") return StatementForm::tex;
  throw CLI::ValidationError("--statement", shown(word) + " is not one of text, tex");
}

void add_output(CLI::App& program, CheckWords& words) {
  program.add_flag("--json", words.json, "Answer with a JSON object a line");
  program.add_flag("--all", words.all, "Show each claim also of files with more than 20");
  program
      .add_option_function<std::string>(
          "--statement", [&words](const std::string& form) { words.statement = statement_form(form); },
          "Print the established claims as sentences to quote, theorems cited; tex is for LaTeX")
      ->type_name("{text,tex}");
  program.add_flag("--quiet", words.quiet, "Print errors only; the exit code is the answer");
}

void add_limits(CLI::App& program, CheckWords& words) {
  program
      .add_option("--max-work", words.limits.work,
                  "Most work that one claim may imply; all of a file may imply 10 times as much, of an area 100 times")
      ->type_name("N")
      ->check(CLI::Range(std::uint64_t{1}, kMostWork).description(""))
      ->capture_default_str();
  program.add_option("--max-bits", words.limits.bits, "Most bits of working precision")
      ->type_name("N")
      ->check(CLI::Range(2U, std::numeric_limits<std::uint32_t>::max()).description(""))
      ->capture_default_str();
  program.add_option("--threads", words.threads, "Threads; all that the process may use by default")
      ->type_name("N")
      ->check(CLI::Range(1U, 4096U).description(""));
}

void add_sampling(CLI::App& program, CheckWords& words) {
  auto* const sample =
      program.add_option("--sample", words.sample, "Establish only N claims of each file, drawn at random");
  sample->type_name("N")->check(CLI::Range(std::uint64_t{1}, std::uint64_t{1} << 53).description(""));
  program.add_option("--seed", words.seed, "Repeat the draw that was printed with this seed; a fresh one by default")
      ->type_name("S")
      ->check(CLI::Range(std::uint64_t{0}, kLargestSeed).description(""));
  program.add_flag("--exact", words.exact,
                   "Establish every mark of an area's certificate in ball arithmetic: about twenty times slower than the default, "
                   "double precision with tracked errors and balls for a sample");
}

}  // namespace

void add_check_options(CLI::App& program, CheckWords& words) {
  program.description(kDescription);
  program.footer(kFooter);
  program.add_option("FILE", words.files, "Certificates (.mere.json) and containers (.mere); - is standard input")
      ->type_name("");
  add_output(program, words);
  add_limits(program, words);
  add_sampling(program, words);
}

std::optional<Failure> problem_of(const CheckWords& words) {
  if (words.files.empty())
    return Failure{"no file was given; name a certificate, such as list.mere.json, or - for standard input"};
  if (std::count(words.files.begin(), words.files.end(), "-") > 1)
    return Failure{"standard input (-) is given twice and can be read once; name files instead"};
  if (words.quiet && (words.json || words.all))
    return Failure{std::string("--quiet prints no claims and ") + (words.json ? "--json" : "--all") +
                   " does; give one of them"};
  if (words.statement && (words.json || words.all || words.quiet))
    return Failure{std::string("--statement prints sentences in place of the report that ") +
                   (words.json  ? "--json"
                    : words.all ? "--all"
                                : "--quiet") +
                   " shapes; give one of them"};
  return std::nullopt;
}

}  // namespace merestone
