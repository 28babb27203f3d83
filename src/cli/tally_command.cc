#include "cli/tally_command.h"

#include <memory>

#include "base/clock.h"
#include "base/text.h"
#include "cli/command.h"
#include "cli/tally_json.h"
#include "cli/tally_text.h"
#include "session/session.h"

namespace nearpit::cli {
namespace {

struct TallyOptions {
  std::string file;
  std::string day;
  bool json = false;
};

std::string day_problem(const std::string& day) {
  return is_date(day) ? "" : in_quotes(day) + " is no date; legal: a day such as 2026-05-04";
}

int run_tally(const TallyOptions& options) {
  auto environment = real_environment();
  if (!environment) return fail(environment.error());
  auto session = Session::open(options.file, *environment, true);
  if (!session) return fail(session.error());
  const auto figures = options.day.empty() ? Result<Figures>(session->figures()) : session->figures_of_day(options.day);
  if (!figures) return fail(figures.error());
  return options.json ? print_json(tally_json(*figures, session->model()))
                      : print(tally_text(*figures, session->model(), options.day));
}

}  // namespace

void add_tally(CommandLine& line) {
  auto options = std::make_shared<TallyOptions>();
  line.command("tally", "the day's figures")
      .survey_file(&options->file)
      .option("--day", "DATE", &options->day, "only records written up to this day (2026-05-04)", day_problem)
      .flag("--json", &options->json, "one JSON object")
      .run([options] { return run_tally(*options); });
}

}  // namespace nearpit::cli
