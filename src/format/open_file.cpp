#include "format/open_file.hpp"

#include <fcntl.h>
#include <sys/file.h>
#include <sys/stat.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <system_error>

namespace merestone {

namespace {

Failure failure_of(const std::string& path, const char* what, int error) {
  return {path + ": " + what + ": " + std::generic_category().message(error)};
}

}  // namespace

Failure OpenFile::failed(const char* what) const { return failure_of(path_, what, errno); }

Result<OpenFile> OpenFile::locked(const std::string& path, int flags, const char* what) {
  const int descriptor = ::open(path.c_str(), flags | O_RDWR | O_APPEND | O_CLOEXEC, 0666);
  if (descriptor < 0) return failure_of(path, what, errno);
  OpenFile file(path, descriptor);
  struct stat status {};
  if (::fstat(descriptor, &status) != 0) return file.failed(what);
  if (!S_ISREG(status.st_mode)) return Failure{path + ": is not a regular file; name a file to write"};
  if (::flock(descriptor, LOCK_EX | LOCK_NB) != 0)
    return errno == EWOULDBLOCK
               ? Failure{path + ": another run has it in use; wait until that ends, or name another file"}
               : file.failed("cannot be locked");
  return file;
}

Result<OpenFile> OpenFile::create(const std::string& path) {
  return locked(path, O_CREAT | O_EXCL, "cannot be created");
}

Result<OpenFile> OpenFile::open(const std::string& path) { return locked(path, 0, "cannot be opened"); }

OpenFile::~OpenFile() {
  if (descriptor_ >= 0) ::close(descriptor_);
}

Result<std::uint64_t> OpenFile::length() const {
  struct stat status {};
  if (::fstat(descriptor_, &status) != 0) return failed("reading failed");
  return static_cast<std::uint64_t>(status.st_size);
}

Result<std::string> OpenFile::read(std::uint64_t offset, std::uint64_t length) const {
  const Result<std::uint64_t> end = this->length();
  if (!end) return end.failure();
  std::string bytes(std::min(length, *end - std::min(offset, *end)), '\0');  // never more memory than there are bytes
  std::size_t had = 0;
  while (had < bytes.size()) {
    const ssize_t got = ::pread(descriptor_, bytes.data() + had, bytes.size() - had, static_cast<off_t>(offset + had));
    if (got < 0 && errno == EINTR) continue;
    if (got < 0) return failed("reading failed");
    if (got == 0) break;
    had += static_cast<std::size_t>(got);
  }
  bytes.resize(had);
  return bytes;
}

std::optional<Failure> OpenFile::append(std::string_view bytes) {
  while (!bytes.empty()) {
    const ssize_t put = ::write(descriptor_, bytes.data(), bytes.size());
    if (put < 0 && errno == EINTR) continue;
    if (put < 0) return failed("writing failed");
    bytes.remove_prefix(static_cast<std::size_t>(put));
  }
  return std::nullopt;
}

std::optional<Failure> OpenFile::truncate(std::uint64_t length) {
  if (::ftruncate(descriptor_, static_cast<off_t>(length)) != 0) return failed("cannot be shortened");
  return std::nullopt;
}

std::optional<Failure> OpenFile::sync() {
  if (::fdatasync(descriptor_) != 0) return failed("writing failed");
  return std::nullopt;
}

std::optional<Failure> OpenFile::remove() {
  if (::unlink(path_.c_str()) != 0) return failed("cannot be removed");
  return std::nullopt;
}

}  // namespace merestone
