// nearpit act FILE ACTION.json: carry out actions, all or nothing.
#ifndef NEARPIT_CLI_ACT_COMMAND_H_
#define NEARPIT_CLI_ACT_COMMAND_H_

#include "cli/command_line.h"

namespace nearpit::cli {

void add_act(CommandLine& line);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_ACT_COMMAND_H_
