// From texts to the two standard streams.
#include "cli/output.hpp"

#include <fcntl.h>
#include <fmt/format.h>

#include <cerrno>
#include <cstdio>
#include <cstring>

#include "cli/status.hpp"

namespace sumwright::cli {

void print_result(const std::string& text) {
  json_is_due = false;
  errno = 0;
  const bool written = std::fwrite(text.data(), 1, text.size(), stdout) == text.size();
  if (!written || std::fflush(stdout) != 0) {
    throw Unusable(fmt::format("standard output: {}", std::strerror(errno)));
  }
}

void say(std::string_view text) {
  const std::size_t ignored = std::fwrite(text.data(), 1, text.size(), stderr);
  (void)ignored;
  std::fflush(stderr);
}

void reserve_standard_streams() {
  // Opened the wrong way round, so that reading stdin and writing stdout fail; stderr is dropped.
  constexpr int flags[] = {O_WRONLY, O_RDONLY, O_WRONLY};
  for (int fd = 0; fd <= 2; ++fd) {
    if (::fcntl(fd, F_GETFD) >= 0 || errno != EBADF) continue;
    const int opened = ::open("/dev/null", flags[fd]);  // the lowest that is free: fd itself
    (void)opened;
  }
}

}  // namespace sumwright::cli
