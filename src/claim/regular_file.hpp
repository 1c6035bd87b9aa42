// Bytes of a file that a user named.
#pragma once

#include <cstddef>
#include <filesystem>
#include <string>

namespace sumwright::claim {

/// The file's bytes, at most `most` + 1 of them, so that a longer file is noticed and not read.
/// Only regular files: a pipe or a device is refused without waiting for it. Throws InputError.
[[nodiscard]] std::string read_regular_file(const std::filesystem::path& path, std::size_t most);

}  // namespace sumwright::claim
