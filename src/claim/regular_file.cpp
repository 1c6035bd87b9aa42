// From a path to bytes.
//
// Invariant: nothing here waits. A pipe is opened without waiting for its other end, and what the
// descriptor is, not what the path was a moment ago, decides whether it is read.
#include "claim/regular_file.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <cstring>

#include "claim/source.hpp"

namespace sumwright::claim {

namespace {

/// An open file; closed at the end.
class Input {
 public:
  explicit Input(const std::filesystem::path& path)
      : name_(path.string()), fd_(::open(path.c_str(), O_RDONLY | O_NONBLOCK | O_CLOEXEC)) {
    if (fd_ < 0) fail("cannot be opened");
  }
  Input(const Input&) = delete;
  Input& operator=(const Input&) = delete;
  ~Input() {
    if (fd_ >= 0) ::close(fd_);
  }

  void check_kind() const {
    struct stat status {};
    if (::fstat(fd_, &status) != 0) fail("cannot be read");
    if (S_ISDIR(status.st_mode)) throw InputError(name_, "this is a directory, not a file");
    if (!S_ISREG(status.st_mode)) {
      throw InputError(name_,
                       "not a regular file; what comes from a pipe or a device has to be put "
                       "into a file first");
    }
  }

  [[nodiscard]] std::string text(std::size_t most) const {
    std::string out;
    char block[std::size_t{1} << 16U];
    while (out.size() <= most) {
      const ssize_t count = ::read(fd_, block, std::min(sizeof block, most + 1 - out.size()));
      if (count < 0 && errno == EINTR) continue;
      if (count < 0) fail("cannot be read");
      if (count == 0) break;
      out.append(block, static_cast<std::size_t>(count));
    }
    return out;
  }

 private:
  [[noreturn]] void fail(const char* what) const {
    throw InputError(name_, fmt::format("{}: {}", what, std::strerror(errno)));
  }

  std::string name_;
  int fd_;
};

}  // namespace

std::string read_regular_file(const std::filesystem::path& path, std::size_t most) {
  const Input input(path);
  input.check_kind();
  return input.text(most);
}

}  // namespace sumwright::claim
