// nearpit tally FILE [--day D] [--json]: the day's figures.
#ifndef NEARPIT_CLI_TALLY_COMMAND_H_
#define NEARPIT_CLI_TALLY_COMMAND_H_

#include "cli/command.h"

namespace nearpit::cli {

void add_tally(CLI::App& program, Run* run);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_TALLY_COMMAND_H_
