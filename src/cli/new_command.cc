#include "cli/new_command.h"

#include <memory>

#include "base/numbers.h"
#include "base/text.h"
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
            (made.draw == "systematic" ? "systematic starts" : made.draw) + "\n";
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

void add_new(CLI::App& program, Run* run) {
  auto options = std::make_shared<NewOptions>();
  CLI::App* command = program.add_subcommand("new", "make the survey file and draw the first sample");
  command->add_option("PLAN", options->plan, "the plan (JSON)")->required();
  add_file(command, &options->file);
  command->add_flag("--all-errors", options->all_errors, "every finding on a line of its own");
  command->callback([options, run] { *run = [options] { return run_new(*options); }; });
}

}  // namespace nearpit::cli
