#include "cli/act_command.h"

#include <memory>

#include "cli/command.h"
#include "session/take_files.h"

namespace nearpit::cli {
namespace {

struct ActOptions {
  std::string file;
  std::string action;
  bool all_errors = false;
};

int run_act(const ActOptions& options) {
  auto environment = real_environment();
  if (!environment) return fail(environment.error());
  auto session = Session::open(options.file, *environment, false);
  if (!session) return fail(session.error());
  const auto applied = take_actions_file(*session, options.action);
  if (!applied) return fail(applied.error(), options.all_errors);
  for (const std::string& line : applied->notes)
    note(line);
  const Progress progress = progress_of(session->model().survey());
  return print_saved("Done: " + std::to_string(applied->actions) +
                     (applied->actions == 1 ? " action; " : " actions; ") + std::to_string(progress.due) +
                     (progress.due == 1 ? " pit to dig\n" : " pits to dig\n"));
}

}  // namespace

void add_act(CommandLine& line) {
  auto options = std::make_shared<ActOptions>();
  line.command("act", "carry out actions: withdraw, belongs_to, ask_neighbours, close_area, reopen_area")
      .survey_file(&options->file)
      .word("ACTION", &options->action, "one action or a list of them (JSON)")
      .flag("--all-errors", &options->all_errors, "every finding on a line of its own")
      .run([options] { return run_act(*options); });
}

}  // namespace nearpit::cli
