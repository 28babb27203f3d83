// UUID version 7 (RFC 9562 section 5.7): 48 bits of Unix milliseconds, then random bits from the system. Within one
// process the values only rise, also when the clock is set back.
#ifndef NEARPIT_BASE_UUID_H_
#define NEARPIT_BASE_UUID_H_

#include <cstdint>
#include <string>
#include <string_view>

namespace nearpit {

class UuidSource {
 public:
  // Lower-case text with hyphens, 36 characters.
  std::string next(std::int64_t utc_ms);

 private:
  std::int64_t last_ms_ = 0;
  std::uint16_t counter_ = 0;
};

// 36 characters, hyphens in place, lower-case hexadecimal.
bool is_uuid(std::string_view text);

}  // namespace nearpit

#endif  // NEARPIT_BASE_UUID_H_
