#include "base/uuid.h"

#include <unistd.h>

#include <algorithm>
#include <array>
#include <cerrno>
#include <system_error>

namespace nearpit {
namespace {

constexpr std::uint16_t kCounterMask = 0x0FFF;
// A fresh counter starts in its lower half, so that one millisecond has room for at least 2048 values.
constexpr std::uint16_t kCounterStartMask = 0x07FF;
constexpr std::int64_t kMostMs = (std::int64_t{1} << 48U) - 1;

std::array<std::uint8_t, 10> random_bytes() {
  std::array<std::uint8_t, 10> bytes{};
  while (getentropy(bytes.data(), bytes.size()) != 0) {
    if (errno != EINTR) throw std::system_error(errno, std::generic_category(), "the system gives no random bytes");
  }
  return bytes;
}

std::string hex_with_hyphens(const std::array<std::uint8_t, 16>& bytes) {
  constexpr std::string_view kDigits = "0123456789abcdef";
  std::string text;
  text.reserve(36);
  for (std::size_t i = 0; i < bytes.size(); ++i) {
    if (i == 4 || i == 6 || i == 8 || i == 10) text += '-';
    text += kDigits[bytes[i] >> 4U];
    text += kDigits[bytes[i] & 15U];
  }
  return text;
}

}  // namespace

// RFC 9562 section 6.2, method 1: rand_a is a counter that starts at random in each millisecond.
std::string UuidSource::next(std::int64_t utc_ms) {
  const std::array<std::uint8_t, 10> random = random_bytes();
  const auto start = static_cast<std::uint16_t>((random[8] << 8U | random[9]) & kCounterStartMask);
  if (const std::int64_t ms = std::clamp<std::int64_t>(utc_ms, 0, kMostMs); ms > last_ms_) {
    last_ms_ = ms;
    counter_ = start;
  } else if (counter_ < kCounterMask) {
    ++counter_;
  } else {
    ++last_ms_;
    counter_ = start;
  }
  std::array<std::uint8_t, 16> bytes{};
  const auto stamp = static_cast<std::uint64_t>(last_ms_);
  for (unsigned i = 0; i < 6; ++i)
    bytes[i] = static_cast<std::uint8_t>(stamp >> (40U - 8U * i));
  bytes[6] = static_cast<std::uint8_t>(0x70U | counter_ >> 8U);
  bytes[7] = static_cast<std::uint8_t>(counter_);
  std::copy_n(random.begin(), 8, bytes.begin() + 8);
  bytes[8] = static_cast<std::uint8_t>(0x80U | (bytes[8] & 0x3FU));
  return hex_with_hyphens(bytes);
}

bool is_uuid(std::string_view text) {
  if (text.size() != 36) return false;
  for (std::size_t i = 0; i < text.size(); ++i) {
    const char c = text[i];
    const bool hyphen_due = i == 8 || i == 13 || i == 18 || i == 23;
    const bool digit = (c >= '0' && c <= '9') || (c >= 'a' && c <= 'f');
    if (hyphen_due ? c != '-' : !digit) return false;
  }
  return true;
}

}  // namespace nearpit
