// What kind of file the user named.
#pragma once

#include <filesystem>

namespace sumwright::cli {

/// Whether the file begins as obligation files do, of whatever format, behind a byte-order mark or
/// not. Throws claim::InputError when it cannot be read.
[[nodiscard]] bool is_obligations_file(const std::filesystem::path& path);

}  // namespace sumwright::cli
