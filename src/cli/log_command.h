// nearpit log FILE PITS.csv: record pits from a table, all or nothing.
#ifndef NEARPIT_CLI_LOG_COMMAND_H_
#define NEARPIT_CLI_LOG_COMMAND_H_

#include "cli/command_line.h"

namespace nearpit::cli {

void add_log(CommandLine& line);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_LOG_COMMAND_H_
