#include "cli/components_run.hpp"

#include <fmt/format.h>
#include <tbb/global_control.h>

#include <algorithm>
#include <mutex>

#include "cli/components_text.hpp"
#include "cli/exit_code.hpp"
#include "cli/interruption.hpp"
#include "cli/refuse.hpp"
#include "cli/shared_output.hpp"
#include "cli/shared_progress.hpp"
#include "cli/shared_threads.hpp"
#include "kernel/component_list.hpp"

namespace merestone {

namespace {

// The progress of a catalogue, told by its threads and read by that of the terminal.
class Watch {
 public:
  bool take(const CatalogueProgress& at) {
    const std::lock_guard lock(mutex_);
    at_ = {std::max(at.scanned, at_.scanned), at.rows, std::max(at.candidates, at_.candidates),
           std::max(at.proved, at_.proved)};
    return Interruption::signal() == 0;
  }

  std::string line(double seconds) {
    const std::lock_guard lock(mutex_);
    const std::size_t percent = at_.rows > 0 ? 100 * at_.scanned / at_.rows : 100;
    return fmt::format("{} % searched, {} candidates, {} established ({:.0f} s)", percent, at_.candidates, at_.proved,
                       seconds);
  }

 private:
  std::mutex mutex_;
  CatalogueProgress at_;
};

std::vector<CatalogueEntry> watched_catalogue(const CatalogueOptions& options) {
  Watch watch;
  const Progress progress([&watch](double seconds) { return watch.line(seconds); });
  return catalogue(options, [&watch](const CatalogueProgress& at) { return watch.take(at); });
}

std::optional<Failure> fault_of(const std::vector<CatalogueEntry>& entries) {
  std::vector<Component> components;
  for (const CatalogueEntry& entry : entries) components.push_back(entry.component);
  return check_distinct(components);
}

void keep_largest(std::vector<CatalogueEntry>& entries, std::uint64_t most) {
  std::stable_sort(entries.begin(), entries.end(),
                   [](const CatalogueEntry& a, const CatalogueEntry& b) { return a.proved.lower > b.proved.lower; });
  if (most > 0 && entries.size() > most) entries.resize(most);
}

int finish(const ComponentsTotal& total, std::uint32_t asked, const Output& output) {
  if (output.failed()) return refuse(ExitCode::io_failed, {"standard output cannot be written"});
  if (const int signal = Interruption::signal(); signal != 0) {
    fmt::print(stderr, "merestone: interrupted; what is listed is proved, but not all was looked for\n");
    return 128 + signal;
  }
  if (total.complete_to < asked)
    return refuse(
        ExitCode::undecided,
        {fmt::format("components: not all of period {} were found; what is listed is proved", total.complete_to + 1)});
  return static_cast<int>(ExitCode::established);
}

}  // namespace

int run_components(const ComponentsWords& words) {
  const CatalogueOptions options = read_components_words(words);
  const unsigned threads = words.threads > 0 ? words.threads : allowed_threads();
  const tbb::global_control control(tbb::global_control::max_allowed_parallelism, threads);
  const Interruption interruption;
  std::vector<CatalogueEntry> entries = watched_catalogue(options);
  if (const auto fault = fault_of(entries))
    return refuse(ExitCode::undecided,
                  {"components: the list is not proved to be of distinct components: " + fault->message});
  const ComponentsTotal total = ComponentsTotal::of(entries, options.complete_to);
  keep_largest(entries, words.most);
  const ComponentsForm form = words.csv    ? ComponentsForm::csv
                              : words.json ? ComponentsForm::json
                                           : ComponentsForm::table;
  Output output;
  output.write(components_heading(form, words.digits));
  for (const CatalogueEntry& entry : entries) {
    if (output.failed()) break;
    output.write(component_line(entry, form, words.digits));
  }
  output.write(total_lines(total, form, words.digits));
  return finish(total, options.complete_to, output);
}

}  // namespace merestone
