#include "base/sha256.h"

#include <openssl/evp.h>

#include <array>
#include <stdexcept>

namespace nearpit {

std::string sha256_hex(std::string_view bytes) {
  std::array<unsigned char, EVP_MAX_MD_SIZE> digest;
  unsigned int size = 0;
  if (EVP_Digest(bytes.data(), bytes.size(), digest.data(), &size, EVP_sha256(), nullptr) != 1) {
    throw std::runtime_error("the cryptographic library refuses to compute SHA-256");
  }
  constexpr std::string_view kDigits = "0123456789abcdef";
  std::string hex;
  hex.reserve(std::size_t{2} * size);
  for (unsigned int i = 0; i < size; ++i) {
    hex += kDigits[digest[i] >> 4U];
    hex += kDigits[digest[i] & 15U];
  }
  return hex;
}

}  // namespace nearpit
