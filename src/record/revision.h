// One entry of the append-only log: a whole new state of one object, who wrote it, when, why, and which revisions it
// replaces. Nothing is ever overwritten; a correction is a new revision that names its parent.
#ifndef NEARPIT_RECORD_REVISION_H_
#define NEARPIT_RECORD_REVISION_H_

#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

#include "base/clock.h"

namespace nearpit {

struct Revision {
  std::string id;          // UUIDv7
  std::string writer;      // UUID of the writer: a device and a random id
  std::int64_t seq = 0;    // 1, 2, 3 … of its writer, no gaps
  std::int64_t clock = 0;  // hybrid logical clock (Kulkarni et al. 2014): milliseconds * 65536 + counter
  std::string by;          // who
  WallTime at;             // the wall clock when it was written
  std::string object;      // "pit/T7-12", "pit/J1", "area/<uuid>", "stop/<uuid>"
  std::string body;        // the whole record as JSON
  std::string why;
  std::vector<std::string> parents;  // ids it replaces, ascending
  std::string hash;                  // chain_hash of this and the writer's last
};

// What the chain of every writer begins with: SHA-256 over the survey's id, the plan's text and the drawn units of each area, so that neither can
// be changed under the records. Frozen.
std::string start_hash(const std::string& survey_id, const std::string& plan,
                       const std::vector<std::vector<std::uint32_t>>& drawn);

// SHA-256 over the previous hash of the writer (start_hash for its first) and every field, each led by its length in bytes, so that no two
// revisions have the same input. Frozen.
std::string chain_hash(const std::string& previous, const Revision& revision);

// The next value of a hybrid logical clock: never below the wall clock, always above `last` (the largest one seen).
std::int64_t next_clock(std::int64_t last, std::int64_t wall_ms);

// Objects. Pits of the lattice always stand under their transect label, whatever labels the plan writes.
std::string pit_object(const std::string& label);
bool is_pit_object(std::string_view object);
bool is_area_object(std::string_view object);
bool is_stop_object(std::string_view object);
// The part behind the slash.
std::string_view object_name(std::string_view object);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_REVISION_H_
