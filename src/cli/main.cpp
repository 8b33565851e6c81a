#include <CLI/CLI.hpp>
#include <cstdio>
#include <new>

#include "cli/components_options.hpp"
#include "cli/components_run.hpp"
#include "cli/area_command.hpp"
#include "cli/decide_options.hpp"
#include "cli/decide_run.hpp"
#include "cli/locate_options.hpp"
#include "cli/locate_run.hpp"
#include "cli/shared_arguments.hpp"
#include "cli/shared_manual.hpp"
#include "cli/shared_output.hpp"
#include "cli/shared_parse.hpp"
#include "cli/shared_version.hpp"

namespace {

using namespace merestone;

constexpr const char* kDescription =
    "Proved statements about the Mandelbrot set M, the set of the parameters c for which z -> z^2 + c, started at 0, "
    "stays bounded. What is printed as a verdict has been proved with enclosures; what is not proved is called "
    "undecided";

constexpr const char* kFooter = R"(Start with:
  merestone decide -0.75+0.1i           a verdict, with its proof in a line
  merestone decide --box A B            a verdict about every parameter of a box
  merestone locate --disc C R           what the disc contains, with proved decimals
  merestone area                        two numbers between which the area of M lies
  merestone components                  the largest hyperbolic components, with proved nuclei
  merestone components --max-period 6   hyperbolic components with their areas
  merestone decide --help               parameters, regions, lists, limits, certificates
  merestone-check FILE                  what a colleague runs on a certificate

Files of this program: docs/proofs.md has the lemmas, docs/trust.md says what a verdict rests on.
)";

std::string joined(int count, char** words) {
  std::string line;
  for (int i = 0; i < count; ++i) line += (i > 0 ? " " : "") + std::string(words[i]);
  return line;
}

int run(int count, char** words) {
  CLI::App program(kDescription, "merestone");
  program.set_version_flag("--version", std::string("merestone ") + kProgramVersion, "Print the version and exit");
  program.set_help_flag("-h,--help", "Print this help and exit");
  program.footer(kFooter);
  program.require_subcommand(1);
  DecideWords decide_words;
  const CLI::App* decide = add_decide_command(program, decide_words);
  LocateWords locate_words;
  const CLI::App* locate = add_locate_command(program, locate_words);
  ComponentsWords components_words;
  const CLI::App* components = add_components_command(program, components_words);
  AreaWords area_words;
  const CLI::App* area = add_area_command(program, area_words);
  ManualFormat format{};
  CLI::App* manual_command =
      program.add_subcommand("manual", "Print the manual page or the completion for a shell");
  manual_command->add_option("--format", format, "man, or the shell: bash, zsh, fish")
      ->transform(CLI::CheckedTransformer(manual_formats()).description(""))
      ->type_name("{man,bash,zsh,fish}");
  if (const auto code = parse_words(program, arguments(count, words))) return static_cast<int>(*code);
  if (decide->parsed()) return run_decide(decide_words, joined(count, words));
  if (locate->parsed()) return run_locate(locate_words, joined(count, words));
  if (components->parsed()) return run_components(components_words);
  if (area->parsed()) return run_area_command(area_words, joined(count, words));
  Output output;
  output.write(manual(program, format));
  return static_cast<int>(output.failed() ? ExitCode::io_failed : ExitCode::established);
}

}  // namespace

int main(int count, char** words) {
  try {
    return run(count, words);
  } catch (const std::bad_alloc&) {
    std::fputs("merestone: out of memory; lower --bits or --threads\n", stderr);
    return static_cast<int>(ExitCode::io_failed);
  }
}
