#include "base/numbers.h"

#include <algorithm>
#include <array>
#include <cassert>
#include <charconv>
#include <cmath>
#include <system_error>

namespace nearpit {
namespace {

// The longest double in fixed notation has 309 digits before the point.
constexpr int kMostDecimals = 100;
using Buffer = std::array<char, 512>;

template <class Number>
std::optional<Number> parse_whole(std::string_view text) {
  Number number{};
  const char* end = text.data() + text.size();
  const auto [stopped, error] = std::from_chars(text.data(), end, number);
  if (error != std::errc{} || stopped != end) return std::nullopt;
  return number;
}

std::string write(double value, std::chars_format format, int precision) {
  assert(precision >= 0 && precision <= kMostDecimals);
  Buffer buffer;
  const auto [end, error] = std::to_chars(buffer.data(), buffer.data() + buffer.size(), value, format, precision);
  assert(error == std::errc{});
  std::string text(buffer.data(), end);
  if (text.starts_with('-') && text.find_first_not_of("-0.") == std::string::npos) text.erase(0, 1);
  return text;
}

std::string without_trailing_zeros(std::string text) {
  if (text.find('.') == std::string::npos) return text;
  text.erase(text.find_last_not_of('0') + 1);
  if (text.ends_with('.')) text.pop_back();
  return text;
}

}  // namespace

std::optional<std::int64_t> parse_int(std::string_view text) { return parse_whole<std::int64_t>(text); }

std::optional<double> parse_double(std::string_view text) {
  const std::optional<double> number = parse_whole<double>(text);
  if (number && !std::isfinite(*number)) return std::nullopt;
  return number;
}

std::string format_double(double value) {
  Buffer buffer;
  const auto [end, error] = std::to_chars(buffer.data(), buffer.data() + buffer.size(), value);
  assert(error == std::errc{});
  return std::string(buffer.data(), end);
}

std::string format_fixed(double value, int decimals) { return write(value, std::chars_format::fixed, decimals); }

std::string format_trimmed(double value, int decimals) { return without_trailing_zeros(format_fixed(value, decimals)); }

std::string format_significant(double value, int digits) {
  assert(digits >= 1);
  if (value == 0) return "0";
  const std::string scientific = write(value, std::chars_format::scientific, digits - 1);
  const auto e = scientific.find('e');
  if (e == std::string::npos) return scientific;  // not finite
  if (const double size = std::abs(value); size < 1e-4 || size >= 1e9) {
    return without_trailing_zeros(scientific.substr(0, e)) + scientific.substr(e);
  }
  const double rounded = parse_double(scientific).value_or(value);
  const std::string_view exponent_text = std::string_view(scientific).substr(scientific[e + 1] == '+' ? e + 2 : e + 1);
  const auto exponent = static_cast<int>(parse_int(exponent_text).value_or(0));
  return format_trimmed(rounded, std::max(0, digits - 1 - exponent));
}

}  // namespace nearpit
