// nearpit check FILE [--json]: is the file whole, is the record complete (exit 1 if not whole).
#ifndef NEARPIT_CLI_CHECK_COMMAND_H_
#define NEARPIT_CLI_CHECK_COMMAND_H_

#include "cli/command_line.h"

namespace nearpit::cli {

void add_check(CommandLine& line);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_CHECK_COMMAND_H_
