#include "cli/new_command.h"

#include <memory>

#include "base/numbers.h"
#include "base/text.h"
#include "cli/command.h"
#include "session/make_survey.h"

namespace nearpit::cli {
namespace {

struct NewOptions {
  std::string plan;
  std::string file;
  bool all_errors = false;
};

std::string summary(const MadeSurvey& made, const std::string& file) {
  std::string text = "Made " + file + ": " + made.survey + "\n";
  text += "  " + std::to_string(made.pits) + " possible pits on " + format_fixed(made.boundary_m2, 0) + " m2 (" +
          made.crs + ")\n";
  text += "  " + std::to_string(made.first_sample) + " grid pits to dig first\n";
  for (const MadeArea& area : made.areas) {
    text += "    " + area.name + ": " + std::to_string(area.drawn) + " of " + std::to_string(area.primary_units) + " " +
            made.units + "\n";
  }
  return text;
}

int run_new(const NewOptions& options) {
  auto environment = real_environment();
  if (!environment) return fail(environment.error());
  const auto made = make_survey(options.plan, options.file, *environment);
  if (!made) return fail(made.error(), options.all_errors);
  for (const std::string& warning : made->warnings)
    note(warning);
  return print_saved(summary(*made, options.file));
}

}  // namespace

void add_new(CommandLine& line) {
  auto options = std::make_shared<NewOptions>();
  line.command("new", "make the survey file and draw the first sample")
      .word("PLAN", &options->plan, "the plan (JSON)")
      .survey_file(&options->file)
      .flag("--all-errors", &options->all_errors, "every finding on a line of its own")
      .run([options] { return run_new(*options); });
}

}  // namespace nearpit::cli
