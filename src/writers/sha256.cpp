// From bytes to the hexadecimal digest by which exports name one another.
#include "writers/sha256.hpp"

#include <openssl/evp.h>

#include <array>
#include <stdexcept>

namespace sumwright::writers {

std::string sha256(std::string_view text) {
  std::array<unsigned char, EVP_MAX_MD_SIZE> digest{};
  unsigned int length = 0;
  if (EVP_Digest(text.data(), text.size(), digest.data(), &length, EVP_sha256(), nullptr) != 1 ||
      length != 32) {
    throw std::runtime_error("SHA-256 is not available in this build of libcrypto");
  }
  constexpr std::string_view kDigits = "0123456789abcdef";
  std::string out;
  for (std::size_t i = 0; i < length; ++i) {
    out += kDigits[digest[i] >> 4U];
    out += kDigits[digest[i] & 15U];
  }
  return out;
}

}  // namespace sumwright::writers
