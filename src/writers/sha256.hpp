// SHA-256 of a text (FIPS 180-4), by OpenSSL's libcrypto.
//
// libcrypto is in every Debian installation's reach (libssl-dev), its licence is permissive
// (Apache 2.0), and one call does the work; the archive's checksums come from it as well.
#pragma once

#include <string>
#include <string_view>

namespace sumwright::writers {

/// The digest as 64 lower-case hexadecimal digits. Throws std::runtime_error when the library
/// offers no SHA-256.
[[nodiscard]] std::string sha256(std::string_view text);

}  // namespace sumwright::writers
