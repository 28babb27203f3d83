// nearpit new PLAN.json FILE: make the survey file and draw the first sample.
#ifndef NEARPIT_CLI_NEW_COMMAND_H_
#define NEARPIT_CLI_NEW_COMMAND_H_

#include "cli/command_line.h"

namespace nearpit::cli {

void add_new(CommandLine& line);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_NEW_COMMAND_H_
