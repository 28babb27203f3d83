#include <cstdio>
#include <exception>
#include <new>
#include <string>

#include "cli/act_command.h"
#include "cli/check_command.h"
#include "cli/command.h"
#include "cli/command_line.h"
#include "cli/log_command.h"
#include "cli/new_command.h"
#include "cli/next_command.h"
#include "cli/tally_command.h"
#include "session/environment.h"
#include "window/app_window.h"

namespace {

int open_window(const std::string& file) {
  auto environment = nearpit::real_environment();
  if (!environment) return nearpit::cli::fail(environment.error());
  const nearpit::Status shown = nearpit::ui::run_window(*environment, file);
  return shown ? nearpit::cli::kDone : nearpit::cli::fail(shown.error());
}

int run_program(int argc, char** argv) {
  nearpit::cli::CommandLine line("Nearpit: shovel test pits on a grid - which pit is next, and what may be claimed",
                                 std::string("nearpit ") + NEARPIT_VERSION);
  nearpit::cli::add_new(line);
  nearpit::cli::add_next(line);
  nearpit::cli::add_log(line);
  nearpit::cli::add_act(line);
  nearpit::cli::add_tally(line);
  nearpit::cli::add_check(line);
  line.without_command("the survey to open in the window (.gpkg)", open_window);
  return line.parse_and_run(argc, argv);
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
