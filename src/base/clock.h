// Wall time, read in one place. Times are milliseconds since 1970-01-01T00:00:00Z plus the offset from UTC at which
// they were read, so that a screen can show local time and a file keeps both.
#ifndef NEARPIT_BASE_CLOCK_H_
#define NEARPIT_BASE_CLOCK_H_

#include <cstdint>
#include <memory>
#include <optional>
#include <string>
#include <string_view>

#include "base/status.h"

namespace nearpit {

struct WallTime {
  std::int64_t utc_ms = 0;
  int offset_min = 0;  // east of UTC, -1080 .. 1080
  friend bool operator==(const WallTime&, const WallTime&) = default;
};

// A named time zone of the system's database (such as "America/New_York"), or UTC.
class TimeZone {
 public:
  static Result<TimeZone> named(const std::string& name);
  static TimeZone utc();
  // The offset in force at an instant, minutes east of UTC.
  int offset_min_at(std::int64_t utc_ms) const;
  // The instant of a local civil time (milliseconds as if it were UTC); in a gap or overlap the earlier offset holds.
  std::int64_t utc_ms_of_local(std::int64_t local_ms) const;

 private:
  const void* zone_ = nullptr;  // null: UTC
};

// ISO 8601 as this program takes it: 2026-05-04, 2026-05-04T10:20, 2026-05-04T10:20:30, with Z, +hh:mm or nothing (then
// `zone` decides). Fractions of a second are read to the millisecond. A date alone is its local midnight and sets date_only.
struct ParsedTime {
  WallTime time;
  bool date_only = false;
};
std::optional<ParsedTime> parse_time(std::string_view text, const TimeZone& zone);

// 2026-05-04T10:20:30.000-04:00 (the time's own offset); and in UTC as GeoPackage wants it: 2026-05-04T14:20:30.000Z.
std::string format_time(const WallTime& time);
std::string format_time_utc(const WallTime& time);
// 2026-05-04, the calendar day in the time's own offset.
std::string format_date(const WallTime& time);
// A real calendar date written 2026-05-04.
bool is_date(std::string_view text);

class Clock {
 public:
  virtual ~Clock() = default;
  virtual WallTime now() = 0;
};
// The system's clock; the environment variable NEARPIT_CLOCK (ISO 8601 with an offset) stands in for it where demos and
// tests must give the same days everywhere. An unreadable value is an error, never ignored.
Result<std::unique_ptr<Clock>> system_clock();
// The same instant in another zone's offset.
WallTime in_zone(const WallTime& time, const TimeZone& zone);

}  // namespace nearpit

#endif  // NEARPIT_BASE_CLOCK_H_
