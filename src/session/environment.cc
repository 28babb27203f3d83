#include "session/environment.h"

namespace nearpit {

Result<Environment> real_environment() {
  NEARPIT_ASSIGN(clock, system_clock());
  Environment environment;
  environment.clock = std::move(clock);
  environment.device = device_name();
  return environment;
}

}  // namespace nearpit
