// From a text to one file by way of a temporary name, and back.
#include "cli/single_file.hpp"

#include <fmt/format.h>
#include <unistd.h>

#include <cerrno>
#include <cstring>
#include <fstream>
#include <iterator>

#include "claim/text.hpp"
#include "cli/session.hpp"
#include "cli/status.hpp"
#include "writers/output_folder.hpp"

namespace sumwright::cli {

namespace fs = std::filesystem;

void write_single_file(const fs::path& path, const std::string& text) {
  const std::string shown = claim::printable(path.string());
  std::error_code code;
  const fs::file_status status = fs::symlink_status(path, code);
  if (fs::exists(status) && !fs::is_regular_file(status)) {
    throw writers::OutputError(shown + ": exists and is not a regular file");
  }
  const fs::path temporary =
      path.parent_path() / fmt::format(".{}.part-{}", path.filename().string(), ::getpid());
  const SignalShield shield;
  try {
    writers::FileSink().write(temporary, text);
    fs::rename(temporary, path, code);
    if (code) throw writers::OutputError(fmt::format("{}: {}", shown, code.message()));
  } catch (const writers::OutputError&) {
    fs::remove(temporary, code);
    throw;
  }
}

std::string read_whole_file(const fs::path& path, std::size_t most) {
  const std::string shown = claim::printable(path.string());
  std::error_code code;
  if (!fs::is_regular_file(path, code)) {
    throw Unusable(fmt::format("{}: {}", shown, code ? code.message() : "not a regular file"));
  }
  const auto size = fs::file_size(path, code);
  if (code) throw Unusable(fmt::format("{}: {}", shown, code.message()));
  if (size > most) throw Unusable(fmt::format("{}: larger than {} bytes", shown, most));
  std::ifstream in(path, std::ios::binary);
  std::string text{std::istreambuf_iterator<char>(in), std::istreambuf_iterator<char>()};
  if (!in) throw Unusable(shown + ": cannot be read");
  return text;
}

}  // namespace sumwright::cli
