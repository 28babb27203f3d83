#include "cli/check_command.h"

#include <memory>
#include <nlohmann/json.hpp>

#include "cli/command.h"
#include "session/session.h"

namespace nearpit::cli {
namespace {

struct CheckOptions {
  std::string file;
  bool json = false;
  bool all_errors = false;
};

Json as_json(const CheckReport& report) {
  Json problems = Json::array();
  for (const FileProblem& problem : report.problems) {
    problems.push_back(
        {{"kind", problem.kind}, {"where", problem.where}, {"what", problem.what}, {"do", problem.action}});
  }
  return {{"whole", report.whole}, {"complete", report.complete}, {"problems", std::move(problems)}};
}

std::vector<std::string> lines_of(const CheckReport& report, const std::string& file) {
  std::vector<std::string> lines;
  for (const FileProblem& problem : report.problems) {
    lines.push_back(file + ": " + problem.where + ": " + problem.what + "; " + problem.action);
  }
  return lines;
}

// A file that can't be opened as a survey is not whole either; with --json the object says so.
int not_opened(const Error& error, const CheckOptions& options) {
  const int code = fail(error);
  if (!options.json || error.kind != ErrorKind::kDamaged) return code;
  CheckReport report;
  report.problems.push_back(
      {"pages", options.file, error.lines.front(), "keep the file as it is and use a backup copy"});
  const int printed = print_json(as_json(report));
  return printed == kDone ? code : printed;
}

int run_check(const CheckOptions& options) {
  auto environment = real_environment();
  if (!environment) return fail(environment.error());
  const auto report = check_survey(options.file, *environment);
  if (!report) return not_opened(report.error(), options);
  const std::vector<std::string> lines = lines_of(*report, options.file);
  if (options.json) {
    const int printed = print_json(as_json(*report));
    if (printed != kDone) return printed;
  }
  if (!report->whole) return fail(Error(ErrorKind::kDamaged, lines), options.all_errors);
  if (options.json) return kDone;
  std::string text = "Whole: yes (every record's chain and every layer checked)\n";
  text += report->complete ? "Records: every field that the plan requires is filled\n" : "Records: not complete\n";
  for (const std::string& line : lines)
    text += "  " + line + "\n";
  return print(text);
}

}  // namespace

void add_check(CommandLine& line) {
  auto options = std::make_shared<CheckOptions>();
  line.command("check", "is the file whole, is the record complete")
      .survey_file(&options->file)
      .flag("--json", &options->json, "one JSON object")
      .flag("--all-errors", &options->all_errors, "every finding on a line of its own")
      .run([options] { return run_check(*options); });
}

}  // namespace nearpit::cli
