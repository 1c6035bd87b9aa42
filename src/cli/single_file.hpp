// One file, written whole or not at all.
#pragma once

#include <filesystem>
#include <string>

namespace sumwright::cli {

/// Writes `text` under a temporary name beside `path`, synchronises, then renames; on failure
/// nothing is left and an existing file stays as it was. Symbolic links and anything but a regular
/// file at `path` are refused. Throws writers::OutputError.
void write_single_file(const std::filesystem::path& path, const std::string& text);

/// The whole file. Throws Unusable when it cannot be read or has more than `most` bytes.
[[nodiscard]] std::string read_whole_file(const std::filesystem::path& path, std::size_t most);

}  // namespace sumwright::cli
