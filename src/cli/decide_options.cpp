#include "cli/decide_options.hpp"

#include "cli/decide_certificate.hpp"
#include "cover/trunk.hpp"
#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

constexpr const char* kFooter = R"(Examples:
  merestone decide -0.75+0.1i
      one parameter; also 1/4, -17/20+1/5i, 0x3p-2 or -0.75,0.1
  merestone decide --points list.txt --out list.mere.json
      a line each: a parameter, box A B or disc C R; '#' begins a comment; writes a certificate
  merestone-check list.mere.json
      what the colleague runs: it establishes every claim anew
  merestone decide --box -0.76+0.09i -0.74+0.11i
      every parameter of a box; it straddles where it has both a member of M and a parameter outside
  merestone decide --box -0.76+0.09i -0.74+0.11i --depth 10 --out cells.mere
      cuts the box into cells and says what area of it is outside, inside and undecided, exactly
  merestone decide --disc 0.26 0.005 --rules elementary
      a disc, by its centre and radius; proved by arithmetic and attracting cycles only
  merestone decide --expect outside 0.2501 && echo "it is outside"
      for scripts: the exit code is the answer
  some-program | merestone decide --points - --json
      a JSON object a line, as soon as a parameter or region is decided

Verdicts:
  outside     not in M; for a parameter, and where a region has one, with the proved escape index
  inside      in the interior of M; with the period of the attracting cycle
  member      in M; why, and whether it is known to lie on the boundary
  straddles   the region contains boundary points of M; with the witnesses that prove it
  undecided   nothing was proved; which limit ended the attempt

Exit codes:
  0  everything asked was proved, and is as expected
  1  something is proved to be other than expected
  2  usage, or a malformed parameter or region
  3  something is undecided within the limits
  4  a file could not be read or written
)";

void add_input(CLI::App& command, DecideWords& words) {
  command.add_option("point", words.points, "Parameters: decimals, fractions or dyadics of any length, as a+bi or a,b")
      ->type_name("POINT");
  command.add_option("--box", words.boxes, "The box between two opposite corners; may be given again")
      ->type_name("CORNER CORNER")
      ->allow_extra_args(false);
  command.add_option("--disc", words.discs, "The disc about a centre, and its radius; may be given again")
      ->type_name("CENTRE RADIUS")
      ->allow_extra_args(false);
  command
      .add_option("--points,--regions", words.list,
                  "File with a parameter, box A B or disc C R on each line, or - for standard input")
      ->type_name("FILE");
}

void add_limits(CLI::App& command, DecideWords& words) {
  command
      .add_option("--bailout", words.bailout,
                  "Radius for which the escape index of a parameter is proved, from 2 to 2^60; of a region it is 2")
      ->type_name("RADIUS")
      ->capture_default_str();
  command.add_option("--iterations", words.limits.iterations, "Most steps of an orbit")
      ->type_name("N")
      ->check(CLI::Range(std::uint64_t{1}, std::uint64_t{1'000'000'000'000}))
      ->capture_default_str();
  command.add_option("--bits", words.limits.bits, "Most bits of working precision")
      ->type_name("N")
      ->check(CLI::Range(53, 1'048'576))
      ->capture_default_str();
  command.add_option("--time-limit", words.limits.seconds, "Most seconds for one parameter or region")
      ->type_name("SECONDS")
      ->check(CLI::Range(1e-3, 1e7))
      ->capture_default_str();
}

void add_rules(CLI::App& command, DecideWords& words) {
  command.add_option("--cells", words.limits.cells, "Most cells into which a region is cut")
      ->type_name("N")
      ->check(CLI::Range(std::uint64_t{1}, std::uint64_t{1'000'000}))
      ->capture_default_str();
  CLI::Option* depth = command.add_option("--depth", words.depth, "Halve the cells of the one box so often, and say what area has which verdict")
      ->type_name("N")
      ->check(CLI::Range(kSmallestDepth, kLargestDepth));
  command.add_flag("--resume", words.resume, "Go on with the journal beside --out, of an interrupted run with --depth")->needs(depth);
  command
      .add_option("--rules", words.rules,
                  "elementary: regions are decided without the theory of univalent functions, by arithmetic and "
                  "attracting cycles only")
      ->check(CLI::IsMember({"all", "elementary"}))
      ->capture_default_str();
}

void add_output(CLI::App& command, DecideWords& words) {
  command.add_option("--expect", words.expect, "Exit with 1 where something is proved to be other than this")
      ->check(CLI::IsMember({"outside", "inside", "member", "straddles"}));
  command.add_option("--out", words.out,
                     "Write a certificate: NAME.mere.json (up to 10,000 claims) or NAME.mere (any number)")
      ->type_name("FILE");
  command.add_flag("--json", words.json, "Answer with a JSON object a line");
  command.add_flag("--quiet", words.quiet, "Print errors only; the exit code is the answer");
  command.add_option("--threads", words.threads, "Threads for many points; all that the process may use by default")
      ->type_name("N")
      ->check(CLI::Range(1U, 4096U));
}

Result<Dyadic> read_bailout(const std::string& text) {
  const Result<Rational> typed = parse_real(text);
  if (!typed) return typed.failure();
  constexpr slong kBits = 4096;
  Arf radius;
  const bool inexact = arf_fmpz_div_fmpz(radius, typed->numerator(), typed->denominator(), kBits, ARF_RND_DOWN) != 0;
  const Dyadic bailout{radius.raw()};
  if (inexact) return Failure{"--bailout " + text + ": is not a dyadic number; take one such as 2, 2.5 or 1024"};
  if (bailout < Dyadic(2.0) || bailout > Dyadic(0x1p60))
    return Failure{"--bailout " + text + ": must lie between 2 and 2^60"};
  return bailout;
}

}  // namespace

CLI::App* add_decide_command(CLI::App& program, DecideWords& words) {
  CLI::App* command = program.add_subcommand(
      "decide", "Prove where parameters and regions lie: outside the Mandelbrot set M, inside, or across its boundary");
  add_input(*command, words);
  add_limits(*command, words);
  add_rules(*command, words);
  add_output(*command, words);
  command->footer(kFooter);
  return command;
}

Result<DecideRequest> read_decide_words(const DecideWords& words) {
  const bool has_typed = !words.points.empty() || !words.boxes.empty() || !words.discs.empty();
  if (has_typed != words.list.empty())
    return Failure{words.list.empty()
                       ? "decide: nothing was given; write a parameter such as -0.75+0.1i, or --box, --disc, --points"
                       : "decide: give parameters and regions, or --points, not both"};
  if (!words.out.empty())
    if (auto problem = check_certificate_name(words.out)) return *problem;
  const Result<Dyadic> bailout = read_bailout(words.bailout);
  if (!bailout) return bailout.failure();
  DecideRequest request{{*bailout, words.limits}, std::nullopt};
  if (words.expect == "outside") request.expect = Expectation::outside;
  if (words.expect == "inside") request.expect = Expectation::inside;
  if (words.expect == "member") request.expect = Expectation::member;
  if (words.expect == "straddles") request.expect = Expectation::straddles;
  if (words.rules == "elementary") request.options.rules = Rules::elementary;
  return request;
}

}  // namespace merestone
