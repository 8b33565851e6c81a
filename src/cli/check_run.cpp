#include "cli/check_run.hpp"

#include <fmt/format.h>

#include <map>

#include "cli/check_file.hpp"
#include "cli/check_message.hpp"
#include "cli/shared_threads.hpp"

namespace merestone {

namespace {

std::string_view fate(ExitCode code) {
  switch (code) {
    case ExitCode::established:
      return "established";
    case ExitCode::sample_only:
      return "established on a sample only";
    case ExitCode::refuted:
      return "NOT ESTABLISHED";
    case ExitCode::undecided:
      return "REFUSED over the limit";
    case ExitCode::malformed:
      return "MALFORMED";
    case ExitCode::io_failed:
      break;
  }
  return "NOT READ";
}

std::string total_line(const std::map<ExitCode, std::size_t>& files) {
  std::size_t all = 0;
  std::string fates;
  for (const auto& [code, count] : files) {
    all += count;
    fates += fmt::format("{} {} {}", fates.empty() ? "" : ",", count, fate(code));
  }
  return fmt::format("\n{} files:{}\n", all, fates);
}

}  // namespace

ExitCode run_check(const CheckWords& words) {
  const unsigned threads = words.threads != 0 ? words.threads : allowed_threads();
  Console console;
  ExitCode answer = ExitCode::established;
  std::map<ExitCode, std::size_t> files;
  for (const std::string& path : words.files) {
    const ExitCode code = check_file(path, words, threads, console);
    if (console.output.failed()) break;
    answer = worse(answer, code);
    ++files[code];
  }
  if (words.statement && !console.cited.empty()) console.output.write(bibliography(console.cited, *words.statement));
  if (words.files.size() > 1 && !words.json && !words.quiet && !words.statement)
    console.output.write(total_line(files));
  if (!console.output.failed()) return answer;
  complain("standard output cannot be written");
  return ExitCode::io_failed;
}

}  // namespace merestone
