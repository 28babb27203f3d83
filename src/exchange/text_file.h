// A whole file from elsewhere as text, within limits: a regular file (links are followed when reading), at most `most` bytes.
#ifndef NEARPIT_EXCHANGE_TEXT_FILE_H_
#define NEARPIT_EXCHANGE_TEXT_FILE_H_

#include <cstddef>
#include <string>

#include "base/status.h"

namespace nearpit {

// Errors: "FILE: there is no such file", "FILE: is a folder", "FILE: 80 MiB, more than the 64 MiB that …".
Result<std::string> read_text_file(const std::string& path, std::size_t most = 64u << 20);

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_TEXT_FILE_H_
