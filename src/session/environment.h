// The world as a session sees it: clock, random ids, who this device is. Injected, so that a test can set the clock back.
#ifndef NEARPIT_SESSION_ENVIRONMENT_H_
#define NEARPIT_SESSION_ENVIRONMENT_H_

#include <memory>
#include <string>

#include "base/clock.h"
#include "base/status.h"
#include "base/uuid.h"
#include "store/writer_memory.h"

namespace nearpit {

struct Environment {
  std::unique_ptr<Clock> clock;
  UuidSource uuids;
  WriterMemory memory = WriterMemory::of_user();
  std::string device;
  std::string user_folder;  // where a person's preferences and drafts are kept; empty: nowhere

  std::string new_id() { return uuids.next(clock->now().utc_ms); }
};

// The real world. Error: NEARPIT_CLOCK is set to something that is no time.
Result<Environment> real_environment();

}  // namespace nearpit

#endif  // NEARPIT_SESSION_ENVIRONMENT_H_
