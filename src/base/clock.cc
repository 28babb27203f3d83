#include "base/clock.h"

#include <date/tz.h>

#include <cassert>
#include <chrono>
#include <cstdlib>
#include <ctime>
#include <exception>
#include <utility>

#include "base/text.h"

namespace nearpit {
namespace {

using std::chrono::milliseconds;

constexpr std::int64_t kMsPerSecond = 1000;
constexpr std::int64_t kMsPerMinute = 60'000;
constexpr std::int64_t kMsPerHour = 3'600'000;
constexpr int kMostOffset_min = 18 * 60;

// Reads a text from left to right; every step says whether it could.
class Reader {
 public:
  explicit Reader(std::string_view text) : rest_(text) {}

  bool at_end() const { return rest_.empty(); }
  bool take(char c) {
    if (!rest_.starts_with(c)) return false;
    rest_.remove_prefix(1);
    return true;
  }
  // Exactly `digits` digits, at most `most`.
  std::optional<int> number(int digits, int most) {
    int value = 0;
    for (int i = 0; i < digits; ++i) {
      const std::optional<int> next = digit();
      if (!next) return std::nullopt;
      value = value * 10 + *next;
    }
    return value <= most ? std::optional<int>(value) : std::nullopt;
  }
  std::optional<int> digit() {
    if (rest_.empty() || rest_.front() < '0' || rest_.front() > '9') return std::nullopt;
    const int value = rest_.front() - '0';
    rest_.remove_prefix(1);
    return value;
  }

 private:
  std::string_view rest_;
};

// Milliseconds from 1970-01-01 to the day, as if UTC.
std::optional<std::int64_t> read_date(Reader& reader) {
  const std::optional<int> year = reader.number(4, 9999);
  if (!year || *year == 0 || !reader.take('-')) return std::nullopt;
  const std::optional<int> month = reader.number(2, 12);
  if (!month || !reader.take('-')) return std::nullopt;
  const std::optional<int> day = reader.number(2, 31);
  if (!day) return std::nullopt;
  const date::year_month_day calendar{date::year{*year}, date::month{static_cast<unsigned>(*month)},
                                      date::day{static_cast<unsigned>(*day)}};
  if (!calendar.ok()) return std::nullopt;
  return milliseconds(date::sys_days(calendar).time_since_epoch()).count();
}

// What follows the point of the seconds: at least one digit; those below the millisecond are dropped.
std::optional<std::int64_t> read_fraction_ms(Reader& reader) {
  std::optional<int> digit = reader.digit();
  if (!digit) return std::nullopt;
  std::int64_t ms = 0;
  for (std::int64_t worth = 100; digit; worth /= 10, digit = reader.digit())
    ms += worth * *digit;
  return ms;
}

// 10:20, 10:20:30, 10:20:30.25: milliseconds since midnight.
std::optional<std::int64_t> read_time_of_day(Reader& reader) {
  const std::optional<int> hour = reader.number(2, 23);
  if (!hour || !reader.take(':')) return std::nullopt;
  const std::optional<int> minute = reader.number(2, 59);
  if (!minute) return std::nullopt;
  std::int64_t ms = *hour * kMsPerHour + *minute * kMsPerMinute;
  if (!reader.take(':')) return ms;
  const std::optional<int> second = reader.number(2, 59);
  if (!second) return std::nullopt;
  ms += *second * kMsPerSecond;
  if (!reader.take('.')) return ms;
  const std::optional<std::int64_t> fraction = read_fraction_ms(reader);
  if (!fraction) return std::nullopt;
  return ms + *fraction;
}

// Z, +hh:mm or -hh:mm: minutes east of UTC.
std::optional<int> read_offset(Reader& reader) {
  if (reader.take('Z')) return 0;
  const bool west = reader.take('-');
  if (!west && !reader.take('+')) return std::nullopt;
  const std::optional<int> hours = reader.number(2, 18);
  if (!hours || !reader.take(':')) return std::nullopt;
  const std::optional<int> minutes = reader.number(2, 59);
  if (!minutes) return std::nullopt;
  const int offset = *hours * 60 + *minutes;
  if (offset > kMostOffset_min) return std::nullopt;
  return west ? -offset : offset;
}

struct WrittenTime {
  std::int64_t local_ms = 0;
  std::optional<int> offset_min;
  bool date_only = false;
};

std::optional<WrittenTime> read_written(std::string_view text) {
  Reader reader(text);
  const std::optional<std::int64_t> day_ms = read_date(reader);
  if (!day_ms) return std::nullopt;
  if (reader.at_end()) return WrittenTime{*day_ms, std::nullopt, true};
  if (!reader.take('T')) return std::nullopt;
  const std::optional<std::int64_t> ms = read_time_of_day(reader);
  if (!ms) return std::nullopt;
  WrittenTime written{*day_ms + *ms, std::nullopt, false};
  if (reader.at_end()) return written;
  written.offset_min = read_offset(reader);
  if (!written.offset_min || !reader.at_end()) return std::nullopt;
  return written;
}

WallTime at_offset(const WrittenTime& written, int offset_min) {
  return {written.local_ms - offset_min * kMsPerMinute, offset_min};
}

std::string padded(std::int64_t value, std::size_t digits) {
  std::string text = std::to_string(value);
  return text.size() < digits ? std::string(digits - text.size(), '0') + text : text;
}

std::string write_date(date::sys_days day) {
  const date::year_month_day calendar(day);
  return padded(int{calendar.year()}, 4) + '-' + padded(unsigned{calendar.month()}, 2) + '-' +
         padded(unsigned{calendar.day()}, 2);
}

date::sys_time<milliseconds> local_of(const WallTime& time) {
  return date::sys_time<milliseconds>(milliseconds(time.utc_ms + time.offset_min * kMsPerMinute));
}

// 2026-05-04T10:20:30.000, without an offset.
std::string write_local(date::sys_time<milliseconds> local) {
  const date::sys_days day = date::floor<date::days>(local);
  const std::int64_t ms = (local - day).count();
  return write_date(day) + 'T' + padded(ms / kMsPerHour, 2) + ':' + padded(ms / kMsPerMinute % 60, 2) + ':' +
         padded(ms / kMsPerSecond % 60, 2) + '.' + padded(ms % kMsPerSecond, 3);
}

const date::time_zone& as_zone(const void* zone) { return *static_cast<const date::time_zone*>(zone); }

// Old local mean times have offsets with seconds; ours are whole minutes.
int whole_minutes(std::chrono::seconds offset) {
  return static_cast<int>(date::round<std::chrono::minutes>(offset).count());
}

class FixedClock : public Clock {
 public:
  explicit FixedClock(const WallTime& time) : time_(time) {}
  WallTime now() override { return time_; }

 private:
  WallTime time_;
};

class MachineClock : public Clock {
 public:
  MachineClock() { tzset(); }
  WallTime now() override {
    const auto since_epoch = std::chrono::system_clock::now().time_since_epoch();
    const std::int64_t utc_ms = date::floor<milliseconds>(since_epoch).count();
    const auto seconds = static_cast<std::time_t>(date::floor<std::chrono::seconds>(since_epoch).count());
    std::tm local{};
    if (localtime_r(&seconds, &local) == nullptr) return {utc_ms, 0};
    return {utc_ms, whole_minutes(std::chrono::seconds(local.tm_gmtoff))};
  }
};

}  // namespace

Result<TimeZone> TimeZone::named(const std::string& name) {
  TimeZone zone;
  if (name == "UTC") return zone;
  try {
    zone.zone_ = date::locate_zone(name);
  } catch (const std::exception&) {
    return Error(ErrorKind::kNotFound, "time zone " + in_quotes(name) +
                                           " is not in this system's time zone database; write UTC or a name such as "
                                           "America/New_York, or install the database (package tzdata)");
  }
  return zone;
}

TimeZone TimeZone::utc() { return {}; }

int TimeZone::offset_min_at(std::int64_t utc_ms) const {
  if (zone_ == nullptr) return 0;
  const auto instant = date::floor<std::chrono::seconds>(date::sys_time<milliseconds>(milliseconds(utc_ms)));
  return whole_minutes(as_zone(zone_).get_info(instant).offset);
}

std::int64_t TimeZone::utc_ms_of_local(std::int64_t local_ms) const {
  if (zone_ == nullptr) return local_ms;
  const auto local = date::floor<std::chrono::seconds>(date::local_time<milliseconds>(milliseconds(local_ms)));
  return local_ms - whole_minutes(as_zone(zone_).get_info(local).first.offset) * kMsPerMinute;
}

std::optional<ParsedTime> parse_time(std::string_view text, const TimeZone& zone) {
  const std::optional<WrittenTime> written = read_written(text);
  if (!written) return std::nullopt;
  if (written->offset_min) return ParsedTime{at_offset(*written, *written->offset_min), written->date_only};
  const std::int64_t utc_ms = zone.utc_ms_of_local(written->local_ms);
  return ParsedTime{{utc_ms, zone.offset_min_at(utc_ms)}, written->date_only};
}

std::string format_time(const WallTime& time) {
  const int size_min = std::abs(time.offset_min);
  return write_local(local_of(time)) + (time.offset_min < 0 ? '-' : '+') + padded(size_min / 60, 2) + ':' +
         padded(size_min % 60, 2);
}

std::string format_time_utc(const WallTime& time) { return write_local(local_of({time.utc_ms, 0})) + 'Z'; }

std::string format_date(const WallTime& time) { return write_date(date::floor<date::days>(local_of(time))); }

bool is_date(std::string_view text) {
  Reader reader(text);
  return read_date(reader) && reader.at_end();
}

Result<std::unique_ptr<Clock>> system_clock() {
  const char* set = std::getenv("NEARPIT_CLOCK");
  if (set == nullptr) return std::unique_ptr<Clock>(std::make_unique<MachineClock>());
  const std::optional<WrittenTime> written = read_written(set);
  if (!written || !written->offset_min) {
    return Error(ErrorKind::kBadInput,
                 "the environment variable NEARPIT_CLOCK is " + in_quotes(set) +
                     "; write a time with its offset, such as 2026-05-04T08:00:00-04:00, or unset it");
  }
  return std::unique_ptr<Clock>(std::make_unique<FixedClock>(at_offset(*written, *written->offset_min)));
}

WallTime in_zone(const WallTime& time, const TimeZone& zone) { return {time.utc_ms, zone.offset_min_at(time.utc_ms)}; }

}  // namespace nearpit
