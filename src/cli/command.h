// What every command shares: its place in the argument parser, its way of ending, and its output.
#ifndef NEARPIT_CLI_COMMAND_H_
#define NEARPIT_CLI_COMMAND_H_

#include <CLI/CLI.hpp>
#include <functional>
#include <nlohmann/json.hpp>
#include <string>

#include "base/status.h"

namespace nearpit::cli {

constexpr int kDone = 0;
constexpr int kFailed = 1;
constexpr int kWrongUsage = 2;

// A command adds itself to the program and sets `run` when the arguments name it; main() then runs it.
using Run = std::function<int()>;
using Json = nlohmann::ordered_json;

// A FILE argument: refuses (wrong usage) what does not end in .gpkg.
CLI::Option* add_file(CLI::App* command, std::string* file);

// One line on standard error ('… and n more'), or all of them; returns kFailed.
int fail(const Error& error, bool all_errors = false);
// Everything at once on standard output; a full disk or closed pipe behind it is a failure.
int print(const std::string& text);
// The same where the work is saved already: a failure says so.
int print_saved(const std::string& text);
int print_json(const Json& json);
// Filled up with spaces to `width` code points, on the left when `right`.
std::string padded(const std::string& text, std::size_t width, bool right);
// A line that begins "note: ", on standard error.
void note(const std::string& text);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_COMMAND_H_
