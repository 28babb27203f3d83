// What every command shares: its way of ending, and its output.
#ifndef NEARPIT_CLI_COMMAND_H_
#define NEARPIT_CLI_COMMAND_H_

#include <nlohmann/json_fwd.hpp>
#include <string>

#include "base/status.h"

namespace nearpit::cli {

constexpr int kDone = 0;
constexpr int kFailed = 1;
constexpr int kWrongUsage = 2;

using Json = nlohmann::ordered_json;

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
