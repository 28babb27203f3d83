#include "cli/command_line.h"

#include <CLI/CLI.hpp>
#include <cstdio>
#include <utility>
#include <vector>

#include "base/text.h"
#include "cli/command.h"

namespace nearpit::cli {
namespace {

std::string survey_file_name(const std::string& text) {
  return text.ends_with(".gpkg") ? std::string() : in_quotes(text) + " doesn't end in .gpkg";
}

// What stands where a command should.
std::string no_command(const CLI::App& program) {
  std::vector<std::string> commands;
  for (const CLI::App* command : program.get_subcommands([](const CLI::App*) { return true; }))
    commands.push_back(command->get_name());
  // A word that is no survey file stood where a command should; else what stands behind a survey file.
  std::vector<std::string> found = program.get_option("FILE")->results();
  std::erase_if(found, [](const std::string& text) { return survey_file_name(text).empty(); });
  for (const std::string& rest : program.remaining())
    found.push_back(rest);
  return (found.empty() ? "no command" : in_quotes(found.front()) + " is no command") +
         "; legal: " + join(commands, ", ");
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
  return kWrongUsage;
}

}  // namespace

Command& Command::survey_file(std::string* value) {
  app_->add_option("FILE", *value, "the survey file (.gpkg)")->required()->check(survey_file_name);
  return *this;
}

Command& Command::word(const std::string& name, std::string* value, const std::string& help) {
  app_->add_option(name, *value, help)->required();
  return *this;
}

Command& Command::option(const std::string& name, const std::string& of, std::string* value, const std::string& help,
                         const Check& check) {
  CLI::Option* option = app_->add_option(name, *value, help)->type_name(of);
  if (check) option->check(check);
  return *this;
}

Command& Command::flag(const std::string& name, bool* value, const std::string& help) {
  app_->add_flag(name, *value, help);
  return *this;
}

void Command::run(std::function<int()> work) {
  app_->callback([line = line_, work = std::move(work)] { line->work_ = work; });
}

CommandLine::CommandLine(const std::string& description, const std::string& version)
    : app_(std::make_unique<CLI::App>(description)) {
  app_->require_subcommand(1);
  app_->set_version_flag("--version", version);
}

CommandLine::~CommandLine() = default;

Command CommandLine::command(const std::string& name, const std::string& help) {
  return {this, app_->add_subcommand(name, help)};
}

void CommandLine::without_command(const std::string& help, std::function<int(const std::string& file)> work) {
  app_->require_subcommand(0, 1);
  app_->add_option("FILE", file_, help)->check(survey_file_name);
  work_ = [this, work = std::move(work)] { return work(file_); };
}

int CommandLine::parse_and_run(int argc, const char* const* argv) {
  try {
    app_->parse(argc, argv);
  } catch (const CLI::ParseError& error) {
    return usage_error(*app_, error);
  }
  return work_();
}

}  // namespace nearpit::cli
