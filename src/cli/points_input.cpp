#include "cli/points_input.hpp"

#include <fcntl.h>
#include <poll.h>
#include <sys/stat.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <cstring>
#include <string_view>

#include "cli/interruption.hpp"
#include "cli/shared_arguments.hpp"
#include "kernel/typed_number.hpp"

namespace merestone {

namespace {

constexpr std::size_t kReadAtOnce = 1 << 16;
constexpr int kLookAfterMilliseconds = 200;
constexpr std::size_t kLongestLine = 2 * kLongestTypedNumber + 1024;

Failure system_failure(const std::string& name) { return {name + ": " + std::strerror(errno)}; }

}  // namespace

Result<PointsInput> PointsInput::open(const std::string& path) {
  if (path == "-") return PointsInput(STDIN_FILENO, "standard input");
  const int descriptor = ::open(path.c_str(), O_RDONLY | O_CLOEXEC);
  if (descriptor < 0) return system_failure(path);
  PointsInput input(descriptor, path);
  struct stat status {};
  if (::fstat(descriptor, &status) == 0 && S_ISDIR(status.st_mode))
    return Failure{path + ": is a directory; give a text file with one parameter a line"};
  return input;
}

PointsInput::PointsInput(PointsInput&& other) noexcept
    : descriptor_(std::exchange(other.descriptor_, -1)),
      name_(std::move(other.name_)),
      buffer_(std::move(other.buffer_)),
      consumed_(other.consumed_),
      line_(other.line_),
      ended_(other.ended_) {}

PointsInput::~PointsInput() {
  if (descriptor_ > STDIN_FILENO) ::close(descriptor_);
}

void PointsInput::take_line(std::string_view text, std::vector<PointLine>& lines) {
  ++line_;
  std::string content = plain_text(text.substr(0, text.find('#')));
  if (!content.empty()) lines.push_back({line_, std::move(content)});
}

void PointsInput::take_lines(std::vector<PointLine>& lines, std::size_t most) {
  while (lines.size() < most) {
    const std::size_t end = buffer_.find('\n', consumed_);
    if (end == std::string::npos) break;
    take_line(std::string_view(buffer_).substr(consumed_, end - consumed_), lines);
    consumed_ = end + 1;
  }
  if (ended_ && consumed_ < buffer_.size() && lines.size() < most &&
      buffer_.find('\n', consumed_) == std::string::npos) {
    take_line(std::string_view(buffer_).substr(consumed_), lines);
    consumed_ = buffer_.size();
  }
}

// Of a line that is longer than any number only the beginning is kept, marked so that it is refused.
void PointsInput::cut_long_line() {
  const std::size_t end = std::min(buffer_.find('\n'), buffer_.size());
  if (end > kLongestLine) buffer_.replace(kLongestLine, end - kLongestLine, "?");
}

// Waits until there is something to read; false when the wait was interrupted.
bool PointsInput::wait() const {
  pollfd ready{descriptor_, POLLIN, 0};
  while (Interruption::signal() == 0)
    if (::poll(&ready, 1, kLookAfterMilliseconds) != 0 && (ready.revents != 0 || errno != EINTR)) return true;
  return false;
}

// Reads what there is; false at the end of the input, which an interruption is too.
Result<bool> PointsInput::fill() {
  if (!wait()) return false;
  buffer_.erase(0, consumed_);
  consumed_ = 0;
  const std::size_t before = buffer_.size();
  buffer_.resize(before + kReadAtOnce);
  ssize_t got = 0;
  do {
    got = ::read(descriptor_, buffer_.data() + before, kReadAtOnce);
  } while (got < 0 && errno == EINTR);
  buffer_.resize(before + static_cast<std::size_t>(got > 0 ? got : 0));
  if (got < 0) return system_failure(name_);
  cut_long_line();
  return got > 0;
}

Result<std::vector<PointLine>> PointsInput::next(std::size_t most) {
  std::vector<PointLine> lines;
  take_lines(lines, most);
  while (lines.empty() && !ended_) {
    const Result<bool> more = fill();
    if (!more) return more.failure();
    ended_ = !*more;
    take_lines(lines, most);
  }
  return lines;
}

}  // namespace merestone
