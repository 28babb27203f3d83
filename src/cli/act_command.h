// nearpit act FILE ACTION.json: carry out actions, all or nothing.
#ifndef NEARPIT_CLI_ACT_COMMAND_H_
#define NEARPIT_CLI_ACT_COMMAND_H_

#include "cli/command.h"

namespace nearpit::cli {

void add_act(CLI::App& program, Run* run);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_ACT_COMMAND_H_
