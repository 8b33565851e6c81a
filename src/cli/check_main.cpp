#include <exception>
#include <new>

#include "cli/check_memory.hpp"
#include "cli/check_message.hpp"
#include "cli/check_options.hpp"
#include "cli/check_run.hpp"
#include "cli/exit_code.hpp"
#include "cli/shared_manual.hpp"
#include "cli/shared_output.hpp"
#include "cli/shared_parse.hpp"
#include "cli/shared_version.hpp"

namespace {

using namespace merestone;

ExitCode print(std::string_view text) {
  Output output;
  output.write(text);
  return output.failed() ? ExitCode::io_failed : ExitCode::established;
}

ExitCode run(int count, char** words) {
  CLI::App program("", "merestone-check");
  program.set_version_flag("--version", std::string("merestone-check ") + kProgramVersion,
                           "Print the version and exit");
  program.set_help_flag("-h,--help", "Print this help and exit");
  CheckWords check_words;
  add_check_options(program, check_words);
  ManualFormat format{};
  const CLI::Option* const manual_option =
      program.add_option("--manual", format, "Print the manual page or the completion for a shell, and exit")
          ->transform(CLI::CheckedTransformer(manual_formats()).description(""))
          ->type_name("{man,bash,zsh,fish}");
  if (const auto code = parse_words(program, {words + 1, words + count})) return *code;
  if (manual_option->count() > 0) return print(manual(program, format));
  if (const auto problem = problem_of(check_words)) {
    complain(problem->message + "; 'merestone-check --help' explains");
    return ExitCode::malformed;
  }
  return run_check(check_words);
}

}  // namespace

int main(int count, char** words) {
  end_when_memory_ends();
  try {
    return static_cast<int>(run(count, words));
  } catch (const std::bad_alloc&) {
    out_of_memory();
  } catch (const std::exception& error) {
    complain(error.what());
  }
  return static_cast<int>(ExitCode::io_failed);
}
