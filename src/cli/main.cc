#include <CLI/CLI.hpp>
#include <cstdio>
#include <new>
#include <string>

#include "cli/act_command.h"
#include "cli/check_command.h"
#include "cli/log_command.h"
#include "cli/new_command.h"
#include "cli/next_command.h"
#include "cli/tally_command.h"

namespace {

// One line, and exit 2: wrong usage. Asking for help or the version is none.
int usage_error(const CLI::App& program, const CLI::ParseError& error) {
  if (error.get_exit_code() == static_cast<int>(CLI::ExitCodes::Success)) return program.exit(error);
  std::string line = error.what();
  for (char& letter : line) {
    if (letter == '\n') letter = ' ';
  }
  std::fprintf(stderr, "nearpit: %s; see 'nearpit --help'\n", line.c_str());
  return nearpit::cli::kWrongUsage;
}

int run_program(int argc, char** argv) {
  CLI::App program{"Nearpit: shovel test pits on a grid - which pit is next, and what may be claimed"};
  program.require_subcommand(1);
  program.set_version_flag("--version", std::string("nearpit ") + NEARPIT_VERSION);
  nearpit::cli::Run run;
  nearpit::cli::add_new(program, &run);
  nearpit::cli::add_next(program, &run);
  nearpit::cli::add_log(program, &run);
  nearpit::cli::add_act(program, &run);
  nearpit::cli::add_tally(program, &run);
  nearpit::cli::add_check(program, &run);
  try {
    program.parse(argc, argv);
  } catch (const CLI::ParseError& error) {
    return usage_error(program, error);
  }
  return run();
}

}  // namespace

int main(int argc, char** argv) {
  try {
    return run_program(argc, argv);
  } catch (const std::bad_alloc&) {
    std::fprintf(stderr, "nearpit: out of memory; nothing more was saved\n");
  } catch (const std::exception& error) {
    std::fprintf(stderr, "nearpit: an error of the program itself: %s; nothing more was saved\n", error.what());
  }
  return nearpit::cli::kFailed;
}
