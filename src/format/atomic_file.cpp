#include "format/atomic_file.hpp"

#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <system_error>

namespace merestone {

namespace {

Failure failed(const std::string& path, const std::string& what) {
  return {path + ": " + what + ": " + std::generic_category().message(errno)};
}

// What a new file may be read and written by, as the process's mask has it; mkstemp makes it private.
mode_t usual_mode() {
  const mode_t mask = ::umask(0);
  ::umask(mask);
  return 0666 & ~mask;
}

}  // namespace

Result<AtomicFile> AtomicFile::create(const std::string& path) {
  struct stat status {};
  if (::stat(path.c_str(), &status) == 0 && !S_ISREG(status.st_mode))
    return Failure{path + ": is not a regular file; name a file to write"};
  std::string temporary = path + ".part-" + std::string(6, 'X');
  const int descriptor = ::mkstemp(temporary.data());
  if (descriptor < 0) return failed(path, "cannot be written");
  ::fchmod(descriptor, usual_mode());
  return AtomicFile(path, std::move(temporary), ::fdopen(descriptor, "wb"));
}

AtomicFile::~AtomicFile() {
  if (file_ != nullptr) ::unlink(temporary_.c_str());
}

std::optional<Failure> AtomicFile::write(std::string_view bytes) {
  if (std::fwrite(bytes.data(), 1, bytes.size(), file_.get()) != bytes.size()) return failed(path_, "writing failed");
  return std::nullopt;
}

std::optional<Failure> AtomicFile::commit() {
  if (std::fflush(file_.get()) != 0 || ::fsync(::fileno(file_.get())) != 0) return failed(path_, "writing failed");
  if (std::rename(temporary_.c_str(), path_.c_str()) != 0) return failed(path_, "cannot be put in place");
  file_.reset();
  return std::nullopt;
}

}  // namespace merestone
