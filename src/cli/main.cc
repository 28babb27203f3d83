#include <CLI/CLI.hpp>
#include <cstdio>
#include <new>
#include <string>
#include <vector>

#include "base/text.h"
#include "cli/act_command.h"
#include "cli/check_command.h"
#include "cli/log_command.h"
#include "cli/new_command.h"
#include "cli/next_command.h"
#include "cli/tally_command.h"

namespace {

// What stands where a command should.
std::string no_command(const CLI::App& program) {
  std::vector<std::string> commands;
  for (const CLI::App* command : program.get_subcommands([](const CLI::App*) { return true; }))
    commands.push_back(command->get_name());
  const std::vector<std::string> found = program.remaining();
  return (found.empty() ? "no command" : nearpit::in_quotes(found.front()) + " is no command") +
         "; legal: " + nearpit::join(commands, ", ");
}

// One line, and exit 2: wrong usage. Asking for help or the version is none.
int usage_error(const CLI::App& program, const CLI::ParseError& error) {
  if (error.get_exit_code() == static_cast<int>(CLI::ExitCodes::Success)) return program.exit(error);
  const std::vector<CLI::App*> commands = program.get_subcommands();
  const std::string command = commands.empty() ? "nearpit" : "nearpit " + commands.front()->get_name();
  std::string line = commands.empty() ? no_command(program) : error.what();
  for (char& letter : line) {
    if (letter == '\n') letter = ' ';
  }
  std::fprintf(stderr, "%s: %s; see '%s --help'\n", command.c_str(), line.c_str(), command.c_str());
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
