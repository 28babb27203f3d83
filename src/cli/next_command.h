// nearpit next FILE [--crew NAME] [--from X,Y] [--json]: pits to dig, in walking order, with why.
#ifndef NEARPIT_CLI_NEXT_COMMAND_H_
#define NEARPIT_CLI_NEXT_COMMAND_H_

#include "cli/command_line.h"

namespace nearpit::cli {

void add_next(CommandLine& line);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_NEXT_COMMAND_H_
