#include "cli/components_options.hpp"

namespace merestone {

namespace {

constexpr std::uint32_t kUsualPeriod = 4;  // when neither a period nor a resolution is given

constexpr const char* kFooter = R"(Examples:
  merestone components --max-period 6
      all components up to period 6, proved to be all, the largest first
  merestone components --resolution 14
      the components of a conformal radius of at least 2^-14, as far as they are found; their areas
      together are a lower bound of the area of M
  merestone components --max-period 10 --resolution 12 --most 20
      both; the totals are of all, the 20 largest are listed
  merestone components --max-period 8 --csv > components.csv
      a line each, with a heading, for a spreadsheet; --json for scripts

What is listed:
  A hyperbolic component is a piece of the interior of M where one attracting cycle has a given
  period; its nucleus is the c for which 0 lies on that cycle. Components on the real axis are
  listed once; of each pair of mirror images the upper one is listed, and counts twice in totals.
  The period, the decimals [a, b] that enclose the nucleus, and the area as a lower bound are
  proved (docs/proofs.md, A2). That a component is a satellite of a larger one, or primitive (with
  a cusp, like M itself), is what it appears to be in double precision, and not proved.
  "All" is proved by counting: the number of nuclei of each period is known. A resolution proves
  nothing about what was not found; one step more finds about 2.4 times as many.

Exit codes:
  0  done; all components up to --max-period were found
  2  usage
  3  some period up to --max-period is not complete; the last lines say which
  4  standard output could not be written
)";

}  // namespace

CLI::App* add_components_command(CLI::App& program, ComponentsWords& words) {
  CLI::App* command = program.add_subcommand(
      "components", "List hyperbolic components of M with proved nuclei and lower bounds of their areas");
  command->add_option("--max-period", words.max_period, "All components up to this period; 4 without --resolution")
      ->type_name("N")
      ->check(CLI::Range(std::uint32_t{1}, kLongestCompletePeriod));
  command
      ->add_option("--resolution", words.resolution, "Components of any period whose conformal radius is at least 2^-R")
      ->type_name("R")
      ->check(CLI::Range(1, kFinestResolution));
  command->add_option("--most", words.most, "List the largest only; the totals are of all")
      ->type_name("N")
      ->check(CLI::Range(std::uint64_t{1}, std::uint64_t{1'000'000'000}));
  command->add_option("--digits", words.digits, "Significant decimals, at most")
      ->type_name("N")
      ->check(CLI::Range(3, 60))
      ->capture_default_str();
  CLI::Option* csv = command->add_flag("--csv", words.csv, "Comma-separated values with a heading, without totals");
  command->add_flag("--json", words.json, "A JSON object a line; the last has the totals")->excludes(csv);
  command->add_option("--threads", words.threads, "Threads; all that the process may use by default")
      ->type_name("N")
      ->check(CLI::Range(1U, 4096U));
  command->footer(kFooter);
  return command;
}

CatalogueOptions read_components_words(const ComponentsWords& words) {
  CatalogueOptions options;
  if (words.resolution > 0) options.resolution = words.resolution;
  options.complete_to = words.max_period > 0 || options.resolution ? words.max_period : kUsualPeriod;
  return options;
}

}  // namespace merestone
