#include "cli/locate_options.hpp"

#include "cli/decide_certificate.hpp"
#include "cli/region_words.hpp"
#include "cli/shared_arguments.hpp"
#include "kernel/typed_region.hpp"

namespace merestone {

namespace {

constexpr unsigned kMostDigits = 4000;

constexpr const char* kFooter = R"(Examples:
  merestone locate --disc -1.75 0.02
      the first nuclei and Misiurewicz points in a disc, each with 20 proved decimals
  merestone locate --box -2.1-1.5i 0.6+1.5i --kind nuclei --max-period 6 --most 1000
      all nuclei up to period 6, proved to be all
  merestone locate --disc i 1e-30 --digits 60 --out place.mere.json
      a deep place, quoted with 60 proved decimals, and the certificate for it

What is listed:
  A nucleus of period p is a c for which 0 has exact period p. A Misiurewicz point of preperiod k
  and period p is a c for which z_k is the first point of the orbit of 0 that lies on a cycle,
  whose exact period is p (z_0 = 0, z_1 = c).
  The decimals [a, b] enclose the number. "No other" is proved: the rest of the region has none of
  that type. In a small region, where the first periods are long, points beyond the periods named
  in the last line are listed too, without a proof that there are no more.

Exit codes:
  0  something was found, or it is proved that there is nothing up to --max-period
  2  usage, or a malformed region
  3  nothing was found within the limits
  4  standard output or the certificate could not be written, or there is nothing to certify
)";

std::string packed_region(const char* kind, const std::pair<std::string, std::string>& words) {
  return std::string(kind) + " " + packed(words.first) + " " + packed(words.second);
}

}  // namespace

CLI::App* add_locate_command(CLI::App& program, LocateWords& words) {
  CLI::App* command = program.add_subcommand(
      "locate", "List the nuclei and Misiurewicz points that a region provably contains, with proved decimals");
  CLI::Option* box = command->add_option("--box", words.box, "The box between two opposite corners")
                         ->type_name("CORNER CORNER");
  command->add_option("--disc", words.disc, "The disc about a centre, and its radius")
      ->type_name("CENTRE RADIUS")
      ->excludes(box);
  command->add_option("--kind", words.kind, "What is listed")
      ->check(CLI::IsMember({"nuclei", "misiurewicz", "both"}))
      ->capture_default_str();
  command->add_option("--digits", words.digits, "Decimals after the point")
      ->type_name("N")
      ->check(CLI::Range(1U, kMostDigits))
      ->capture_default_str();
  command->add_option("--most", words.options.most, "Begin no further period once so many of a kind were found")
      ->type_name("N")
      ->check(CLI::Range(std::uint64_t{1}, std::uint64_t{1'000'000}))
      ->capture_default_str();
  command
      ->add_option("--max-period", words.options.max_period,
                   "Largest period of a nucleus; for Misiurewicz points, largest preperiod plus period")
      ->type_name("N")
      ->check(CLI::Range(std::uint64_t{1}, std::uint64_t{1'000'000}))
      ->capture_default_str();
  command->add_option("--time-limit", words.options.seconds, "Most seconds")
      ->type_name("SECONDS")
      ->check(CLI::Range(1e-3, 1e7))
      ->capture_default_str();
  command->add_option("--out", words.out, "Write a certificate: NAME.mere.json (up to 10,000 claims) or NAME.mere")
      ->type_name("FILE");
  command->add_flag("--json", words.json, "Answer with a JSON object a line");
  command->footer(kFooter);
  return command;
}

Result<LocateRequest> read_locate_words(const LocateWords& words) {
  const bool has_box = !words.box.first.empty();
  if (has_box == !words.disc.first.empty())
    return Failure{"locate: give a region, as --box A B or --disc C R"};
  if (!words.out.empty())
    if (auto problem = check_certificate_name(words.out)) return *problem;
  const std::string typed = has_box ? packed_region("box", words.box) : packed_region("disc", words.disc);
  const Result<Shape> region = parse_region(typed);
  if (!region) return Failure{"locate: " + fault_of_region(typed, region.failure()).message};
  LocateRequest request{typed, *region, words.options};
  request.options.nuclei = words.kind != "misiurewicz";
  request.options.misiurewicz = words.kind != "nuclei";
  request.options.isolation.places = static_cast<slong>(words.digits) * 3322 / 1000 + 5;  // 10 < 2^3.322
  return request;
}

}  // namespace merestone
