#include "cli/check_file.hpp"

#include <fmt/format.h>

#include <atomic>
#include <filesystem>
#include <random>

#include "cli/check_area.hpp"
#include "cli/check_area_report.hpp"
#include "cli/check_message.hpp"
#include "cli/check_report.hpp"
#include "cli/shared_progress.hpp"
#include "format/container_layout.hpp"
#include "format/shown.hpp"

namespace merestone {

namespace {

namespace fs = std::filesystem;

class FileCheck {
 public:
  FileCheck(const std::string& path, const CheckWords& words, unsigned threads, Console& console)
      : path_(path), words_(words), threads_(threads), console_(console), report_(path, words, console) {}

  ExitCode run();

 private:
  using Ended = std::optional<CertificateEnded>;

  Read<ByteSource> open() const;
  Ended check_document(ByteSource source);
  Ended check_container(Read<ContainerReader> frame);
  ExitCode check_area_container(Read<ContainerReader> frame);
  Ended check_container_sample(ByteSource source);
  std::optional<Selection> draw(const CertificateEnd& end);
  bool deliver(const Batch& batch);
  Ended establish_all(ClaimSource& source);
  Ended read_only(ClaimSource& source) const;
  std::string progress_line(double seconds) const;

  const std::string& path_;
  const CheckWords& words_;
  unsigned threads_;
  Console& console_;
  FileReport report_;
  std::atomic<std::uint64_t> blocks_done_ = 0;
  std::optional<Progress> progress_;
};

ReadFault input_fault(const std::string& message) { return {ReadFault::Kind::input, message}; }

Read<ByteSource> FileCheck::open() const {
  if (path_ == "-") return ByteSource::standard_input();
  std::error_code ignored;
  if (fs::is_directory(path_, ignored))
    return input_fault("it is a folder; name the certificates in it, such as list.mere.json");
  return ByteSource::open(path_);
}

std::uint64_t fresh_seed() {
  std::random_device device;
  return (std::uint64_t{device()} << 32 | device()) & kLargestSeed;
}

// The claims to be established, when that is a sample: nothing when the sample would be the whole.
std::optional<Selection> FileCheck::draw(const CertificateEnd& end) {
  if (!words_.sample || *words_.sample >= end.claims) return std::nullopt;
  const std::uint64_t seed = words_.seed ? *words_.seed : fresh_seed();
  report_.announce({*words_.sample, seed, !words_.seed});
  return Selection::sample(*words_.sample, end.claims, seed, end.digest);
}

bool FileCheck::deliver(const Batch& batch) {
  if (!batch.text.empty()) progress_->wipe();
  return report_.deliver(batch);
}

FileCheck::Ended FileCheck::establish_all(ClaimSource& source) {
  const BatchReport report{[this](Batch& batch) { report_.prepare(batch); },
                           [this](Batch& batch) { return deliver(batch); }};
  return check_claims(source, words_.limits, threads_, report);
}

FileCheck::Ended FileCheck::read_only(ClaimSource& source) const {
  return check_claims(source, {}, threads_, {[](Batch&) {}, [](Batch&) { return true; }});
}

FileCheck::Ended FileCheck::check_document(ByteSource source) {
  Read<Certificate> read = read_certificate(source);
  if (const ReadFault* fault = fault_of(read)) return *fault;
  auto& certificate = std::get<Certificate>(read);
  const std::optional<Selection> drawn = draw({certificate.claims.size(), certificate.digest});
  DocumentSource claims(std::move(certificate), drawn.value_or(Selection::everything()));
  return establish_all(claims);
}

FileCheck::Ended FileCheck::check_container(Read<ContainerReader> frame) {
  Read<ListReader> reader = ListReader::open(std::move(frame));
  if (const ReadFault* fault = fault_of(reader)) return *fault;
  ContainerSource claims(std::move(std::get<ListReader>(reader)), Selection::everything(), true);
  return establish_all(claims);
}

// Reads and verifies all of it first, for the number of claims and the digest; then again for the claims drawn.
FileCheck::Ended FileCheck::check_container_sample(ByteSource source) {
  std::error_code ignored;
  if (path_ == "-" || !fs::is_regular_file(path_, ignored))
    return input_fault("--sample reads a container twice and this can be read only once; save it to a file first");
  Read<ContainerReader> frame = ContainerReader::open(std::move(source));
  if (const auto* opened = std::get_if<ContainerReader>(&frame); opened != nullptr && opened->content() == kAreaContent)
    return input_fault("--sample draws claims of a list, and this is about an area; leave it out");
  Read<ListReader> first_reader = ListReader::open(std::move(frame));
  if (const ReadFault* fault = fault_of(first_reader)) return *fault;
  ContainerSource first(std::move(std::get<ListReader>(first_reader)), Selection::nothing(), true);
  const Ended first_ended = read_only(first);
  const auto* const end = std::get_if<CertificateEnd>(&*first_ended);
  if (end == nullptr) return first_ended;
  const std::optional<Selection> drawn = draw(*end);
  Read<ByteSource> again = open();
  if (const ReadFault* fault = fault_of(again)) return *fault;
  Read<ListReader> reader = ListReader::open(ContainerReader::open(std::move(std::get<ByteSource>(again))));
  if (const ReadFault* fault = fault_of(reader)) return *fault;
  ContainerSource claims(std::move(std::get<ListReader>(reader)), drawn.value_or(Selection::everything()), false);
  const Ended ended = establish_all(claims);
  const auto* const second_end = ended ? std::get_if<CertificateEnd>(&*ended) : nullptr;
  if (second_end != nullptr && second_end->digest != end->digest)
    return input_fault("it was changed while it was being read; check it again");
  return ended;
}

ExitCode FileCheck::check_area_container(Read<ContainerReader> frame) {
  Read<AreaReader> reader = AreaReader::open(std::move(frame));
  if (const ReadFault* fault = fault_of(reader)) return report_.finish(*fault);
  AreaCheckOptions options{words_.limits, words_.exact, words_.seed ? *words_.seed : fresh_seed(), threads_, {}};
  options.report = [this](std::uint64_t blocks) { blocks_done_ = blocks; };
  const AreaVerdict verdict = check_area(std::move(std::get<AreaReader>(reader)), options);
  progress_.reset();
  return report_area(path_, verdict, words_, options.seed, console_);
}

std::string FileCheck::progress_line(double seconds) const {
  const std::uint64_t claims = report_.claims_done(), blocks = blocks_done_;
  const std::string done = blocks > 0   ? grouped(blocks) + " blocks"
                           : claims > 0 ? grouped(claims) + " claims"
                                        : "reading";
  return fmt::format("{}: {}, {:.0f} s", file_in_words(path_), done, seconds);
}

ExitCode FileCheck::run() {
  Read<ByteSource> opened = open();
  if (const ReadFault* fault = fault_of(opened)) return report_.finish(*fault);
  auto& source = std::get<ByteSource>(opened);
  const bool is_container = source.peek() == static_cast<unsigned char>(kContainerMagic.front());
  progress_.emplace([this](double seconds) { return progress_line(seconds); });
  Ended ended;
  if (!is_container) {
    ended = check_document(std::move(source));
  } else if (words_.sample) {
    ended = check_container_sample(std::move(source));
  } else {
    Read<ContainerReader> frame = ContainerReader::open(std::move(source));
    const auto* const opened_frame = std::get_if<ContainerReader>(&frame);
    if (opened_frame != nullptr && opened_frame->content() == kAreaContent)
      return check_area_container(std::move(frame));
    ended = check_container(std::move(frame));
  }
  progress_.reset();
  return ended ? report_.finish(*ended) : ExitCode::io_failed;
}

}  // namespace

ExitCode check_file(const std::string& path, const CheckWords& words, unsigned threads, Console& console) {
  return FileCheck(path, words, threads, console).run();
}

}  // namespace merestone
