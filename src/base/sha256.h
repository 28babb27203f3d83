// SHA-256 (FIPS 180-4) through libcrypto.
#ifndef NEARPIT_BASE_SHA256_H_
#define NEARPIT_BASE_SHA256_H_

#include <string>
#include <string_view>

namespace nearpit {

// 64 lower-case hexadecimal digits.
std::string sha256_hex(std::string_view bytes);

}  // namespace nearpit

#endif  // NEARPIT_BASE_SHA256_H_
