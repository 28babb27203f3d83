// Numbers <-> text, in one place and free of any locale: '.' is the decimal mark on every machine.
#ifndef NEARPIT_BASE_NUMBERS_H_
#define NEARPIT_BASE_NUMBERS_H_

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

namespace nearpit {

// The whole text must be the number; no spaces, no leading '+', no hexadecimal, no infinity.
std::optional<std::int64_t> parse_int(std::string_view text);
std::optional<double> parse_double(std::string_view text);

// Shortest text that reads back as the same double.
std::string format_double(double value);
// Fixed point with `decimals` digits; a result of zero never shows a minus sign.
std::string format_fixed(double value, int decimals);
// As format_fixed, with trailing zeros (and a bare point) dropped.
std::string format_trimmed(double value, int decimals);
// `digits` significant figures in plain notation where that is readable (1e-4 <= |v| < 1e9), trailing zeros kept off.
std::string format_significant(double value, int digits);

}  // namespace nearpit

#endif  // NEARPIT_BASE_NUMBERS_H_
