// nearpit tally FILE [--day D] [--json]: the day's figures.
#ifndef NEARPIT_CLI_TALLY_COMMAND_H_
#define NEARPIT_CLI_TALLY_COMMAND_H_

#include "cli/command_line.h"

namespace nearpit::cli {

void add_tally(CommandLine& line);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_TALLY_COMMAND_H_
