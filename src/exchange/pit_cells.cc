#include "exchange/pit_cells.h"

#include <cmath>

#include "base/numbers.h"
#include "base/text.h"

namespace nearpit {
namespace {

constexpr std::size_t kMostNameCharacters = 200;
constexpr std::size_t kMostNoteCharacters = 4'000;
constexpr std::int64_t kMostCount = 1'000'000;
constexpr double kMostGrams = 1e9;

// A decimal comma, such as 3,5.
std::string comma_hint(std::string_view cell) {
  return cell.find(',') == std::string_view::npos ? "" : "; write a point as the decimal mark";
}

std::string with_line_feeds(std::string_view text) {
  std::string out;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if (text[i] == '\r' && i + 1 < text.size() && text[i + 1] == '\n') continue;
    out += text[i];
  }
  return out;
}

// 12 and, as some programs write whole numbers, 12.0.
std::optional<std::int64_t> whole_in(double number) {
  if (std::trunc(number) != number || std::abs(number) > 9e15) return std::nullopt;
  return static_cast<std::int64_t>(number);
}

}  // namespace

std::string PitCells::in_quotes_of(std::string_view cell) { return in_quotes(cell); }

std::string_view PitCells::text(PitColumn column) const {
  const auto field = columns_.field(column);
  return field ? trimmed(row_.fields[*field]) : std::string_view();
}

std::optional<double> PitCells::number_in(std::string_view cell, const std::string& column,
                                          const NumberRange& range) const {
  const auto number = parse_double(cell);
  if (number && range.holds(*number)) return number;
  const std::string wrong = number ? " is out of range" : " is not a number";
  refuse(column, in_quotes(cell) + wrong + "; legal: " + range.in_words() + (number ? "" : comma_hint(cell)));
  return std::nullopt;
}

Given<double> PitCells::number(PitColumn column, const NumberRange& range) const {
  return given<double>(column,
                       [&](std::string_view cell) { return number_in(cell, std::string(word(column)), range); });
}

Given<std::string> PitCells::name(PitColumn column) const {
  return given<std::string>(column, [&](std::string_view cell) -> std::optional<std::string> {
    if (is_name(cell, kMostNameCharacters)) return std::string(cell);
    refuse(column, in_quotes(cell) + " is no such text; legal: one line of 1 to 200 characters");
    return std::nullopt;
  });
}

Given<std::string> PitCells::note(PitColumn column) const {
  return given<std::string>(column, [&](std::string_view) -> std::optional<std::string> {
    std::string whole = with_line_feeds(row_.fields[*columns_.field(column)]);
    if (is_note(whole, kMostNoteCharacters)) return whole;
    refuse(column, in_quotes(whole) +
                       " is no such text; legal: 1 to 4000 characters, line breaks but no tabs or other "
                       "control characters");
    return std::nullopt;
  });
}

Given<PitTime> PitCells::time(PitColumn column) const {
  return given<PitTime>(column, [&](std::string_view cell) -> std::optional<PitTime> {
    const auto parsed = parse_time(cell, zone_);
    if (parsed) return PitTime{*parsed, parsed->date_only ? std::string(cell) : format_time(parsed->time)};
    refuse(column, in_quotes(cell) +
                       " is no time; legal: ISO 8601 such as 2026-05-04, 2026-05-04T10:20 or "
                       "2026-05-04T10:20:30-04:00");
    return std::nullopt;
  });
}

Given<std::uint32_t> PitCells::count(std::size_t field, const std::string& column) const {
  return given_in<std::uint32_t>(
      trimmed(row_.fields[field]), [&](std::string_view cell) -> std::optional<std::uint32_t> {
        const auto number = parse_double(cell);
        const auto whole = number ? whole_in(*number) : std::nullopt;
        const bool exponent = cell.find_first_of("eE") != std::string_view::npos;  // 1e3: digits may have been lost
        if (whole && !exponent && *whole >= 0 && *whole <= kMostCount) return static_cast<std::uint32_t>(*whole);
        const std::string wrong = !number                                     ? " is not a number"
                                  : exponent                                  ? " is written with an exponent"
                                  : *number < 0                               ? " is below zero"
                                  : *number > static_cast<double>(kMostCount) ? " is too large"
                                                                              : " is not a whole number";
        refuse(column, in_quotes(cell) + wrong + "; legal: a whole number from 0 to " + std::to_string(kMostCount));
        return std::nullopt;
      });
}

Given<double> PitCells::weight(std::size_t field, const std::string& column) const {
  return given_in<double>(trimmed(row_.fields[field]), [&](std::string_view cell) {
    return number_in(cell, column, {0, kMostGrams});
  });
}

}  // namespace nearpit
