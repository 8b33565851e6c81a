#include "cli/check_file.hpp"

#include <fmt/format.h>

#include <filesystem>
#include <random>

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
      : path_(path), words_(words), threads_(threads), report_(path, words, console) {}

  ExitCode run();

 private:
  using Ended = std::optional<CertificateEnded>;

  Read<ByteSource> open() const;
  Ended check_document(ByteSource source);
  Ended check_container(ByteSource source);
  Ended check_container_sample(ByteSource source);
  std::optional<Selection> draw(const CertificateEnd& end);
  bool deliver(const Batch& batch);
  Ended establish_all(ClaimSource& source);
  Ended read_only(ClaimSource& source) const;

  const std::string& path_;
  const CheckWords& words_;
  unsigned threads_;
  FileReport report_;
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

// The claims to be established, when that is a sample: nothing when the sample would be the whole.
std::optional<Selection> FileCheck::draw(const CertificateEnd& end) {
  if (!words_.sample || *words_.sample >= end.claims) return std::nullopt;
  const auto fresh = [] {
    std::random_device device;
    return (std::uint64_t{device()} << 32 | device()) & kLargestSeed;
  };
  const std::uint64_t seed = words_.seed ? *words_.seed : fresh();
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

FileCheck::Ended FileCheck::check_container(ByteSource source) {
  if (words_.sample) return check_container_sample(std::move(source));
  Read<ContainerReader> reader = ContainerReader::open(std::move(source));
  if (const ReadFault* fault = fault_of(reader)) return *fault;
  ContainerSource claims(std::move(std::get<ContainerReader>(reader)), Selection::everything(), true);
  return establish_all(claims);
}

// Reads and verifies all of it first, for the number of claims and the digest; then again for the claims drawn.
FileCheck::Ended FileCheck::check_container_sample(ByteSource source) {
  std::error_code ignored;
  if (path_ == "-" || !fs::is_regular_file(path_, ignored))
    return input_fault("--sample reads a container twice and this can be read only once; save it to a file first");
  Read<ContainerReader> first_reader = ContainerReader::open(std::move(source));
  if (const ReadFault* fault = fault_of(first_reader)) return *fault;
  ContainerSource first(std::move(std::get<ContainerReader>(first_reader)), Selection::nothing(), true);
  const Ended first_ended = read_only(first);
  const auto* const end = std::get_if<CertificateEnd>(&*first_ended);
  if (end == nullptr) return first_ended;
  const std::optional<Selection> drawn = draw(*end);
  Read<ByteSource> again = open();
  if (const ReadFault* fault = fault_of(again)) return *fault;
  Read<ContainerReader> reader = ContainerReader::open(std::move(std::get<ByteSource>(again)));
  if (const ReadFault* fault = fault_of(reader)) return *fault;
  ContainerSource claims(std::move(std::get<ContainerReader>(reader)), drawn.value_or(Selection::everything()), false);
  const Ended ended = establish_all(claims);
  const auto* const second_end = ended ? std::get_if<CertificateEnd>(&*ended) : nullptr;
  if (second_end != nullptr && second_end->digest != end->digest)
    return input_fault("it was changed while it was being read; check it again");
  return ended;
}

ExitCode FileCheck::run() {
  Read<ByteSource> opened = open();
  if (const ReadFault* fault = fault_of(opened)) return report_.finish(*fault);
  auto& source = std::get<ByteSource>(opened);
  const bool is_container = source.peek() == static_cast<unsigned char>(kContainerMagic.front());
  progress_.emplace([this](double seconds) {
    const std::uint64_t done = report_.claims_done();
    return fmt::format("{}: {}, {:.0f} s", file_in_words(path_), done == 0 ? "reading" : grouped(done) + " claims",
                       seconds);
  });
  const Ended ended = is_container ? check_container(std::move(source)) : check_document(std::move(source));
  progress_.reset();
  return ended ? report_.finish(*ended) : ExitCode::io_failed;
}

}  // namespace

ExitCode check_file(const std::string& path, const CheckWords& words, unsigned threads, Console& console) {
  return FileCheck(path, words, threads, console).run();
}

}  // namespace merestone
