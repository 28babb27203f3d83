#include "cli/log_command.h"

#include <memory>

#include "cli/command.h"
#include "session/take_files.h"

namespace nearpit::cli {
namespace {

struct LogOptions {
  std::string file;
  std::string table;
  bool all_errors = false;
};

int run_log(const LogOptions& options) {
  auto environment = real_environment();
  if (!environment) return fail(environment.error());
  auto session = Session::open(options.file, *environment, false);
  if (!session) return fail(session.error());
  const auto applied = take_pits_table(*session, options.table);
  if (!applied) return fail(applied.error(), options.all_errors);
  for (const std::string& line : applied->notes)
    note(line);
  const Progress progress = progress_of(session->model().survey());
  const std::string pits = applied->revisions == 1 ? " pit; " : " pits; ";
  return print_saved("Saved " + std::to_string(applied->revisions) + pits + std::to_string(progress.due) + " to dig\n");
}

}  // namespace

void add_log(CommandLine& line) {
  auto options = std::make_shared<LogOptions>();
  line.command("log", "record pits from a table, all or nothing")
      .survey_file(&options->file)
      .word("PITS", &options->table, "the table of pits (CSV)")
      .flag("--all-errors", &options->all_errors, "every finding on a line of its own")
      .run([options] { return run_log(*options); });
}

}  // namespace nearpit::cli
