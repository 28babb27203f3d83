// The program's arguments: commands, their words and options. CLI11 is known in command_line.cc and nowhere else.
#ifndef NEARPIT_CLI_COMMAND_LINE_H_
#define NEARPIT_CLI_COMMAND_LINE_H_

#include <functional>
#include <memory>
#include <string>

namespace CLI {
class App;
}

namespace nearpit::cli {

class CommandLine;

// One command as it is being described. Values are set before `run` is called; they must live as long as the command line.
class Command {
 public:
  // Says what is wrong with a value; "" when nothing is.
  using Check = std::function<std::string(const std::string&)>;

  // FILE, required: refuses what does not end in .gpkg.
  Command& survey_file(std::string* value);
  // A word that must be given.
  Command& word(const std::string& name, std::string* value, const std::string& help);
  Command& option(const std::string& name, const std::string& of, std::string* value, const std::string& help,
                  const Check& check = nullptr);
  Command& flag(const std::string& name, bool* value, const std::string& help);
  // What the command does; returns the exit code.
  void run(std::function<int()> work);

 private:
  friend class CommandLine;
  Command(CommandLine* line, CLI::App* app) : line_(line), app_(app) {}
  CommandLine* line_;
  CLI::App* app_;
};

class CommandLine {
 public:
  CommandLine(const std::string& description, const std::string& version);
  CommandLine(const CommandLine&) = delete;
  CommandLine& operator=(const CommandLine&) = delete;
  ~CommandLine();

  Command command(const std::string& name, const std::string& help);
  // What is done when no command is given, with a survey file or "" for none.
  void without_command(const std::string& help, std::function<int(const std::string& file)> work);
  // Reads the arguments and runs the command they name. Wrong usage: one line on standard error, exit code 2.
  int parse_and_run(int argc, const char* const* argv);

 private:
  friend class Command;
  std::unique_ptr<CLI::App> app_;
  std::function<int()> work_;
  std::string file_;
};

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_COMMAND_LINE_H_
