// nearpit next FILE [--crew NAME] [--from X,Y] [--json]: pits to dig, in walking order, with why.
#ifndef NEARPIT_CLI_NEXT_COMMAND_H_
#define NEARPIT_CLI_NEXT_COMMAND_H_

#include "cli/command.h"

namespace nearpit::cli {

void add_next(CLI::App& program, Run* run);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_NEXT_COMMAND_H_
