#include "session/environment.h"

#include "store/user_folder.h"

namespace nearpit {

Result<Environment> real_environment() {
  NEARPIT_ASSIGN(clock, system_clock());
  Environment environment;
  environment.clock = std::move(clock);
  environment.device = device_name();
  environment.user_folder = user_folder();
  return environment;
}

}  // namespace nearpit
