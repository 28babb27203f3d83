#include "cli/command.h"

#include <cstdio>
#include <nlohmann/json.hpp>

#include "base/text.h"

namespace nearpit::cli {

int fail(const Error& error, bool all_errors) {
  if (all_errors) {
    for (const std::string& line : error.lines)
      std::fprintf(stderr, "%s\n", line.c_str());
  } else {
    std::fprintf(stderr, "%s\n", error.one_line().c_str());
  }
  return kFailed;
}

int print(const std::string& text) {
  const bool written = std::fwrite(text.data(), 1, text.size(), stdout) == text.size() && std::fflush(stdout) == 0;
  return written ? kDone : fail(Error(ErrorKind::kIo, "standard output can't be written"));
}

int print_saved(const std::string& text) {
  if (std::fwrite(text.data(), 1, text.size(), stdout) == text.size() && std::fflush(stdout) == 0) return kDone;
  return fail(Error(ErrorKind::kIo, "everything is saved; only standard output can't be written"));
}

int print_json(const Json& json) { return print(json.dump(2) + "\n"); }

std::string padded(const std::string& text, std::size_t width, bool right) {
  const std::size_t length = utf8_length(text);
  const std::string spaces(width > length ? width - length : 0, ' ');
  return right ? spaces + text : text + spaces;
}

void note(const std::string& text) { std::fprintf(stderr, "note: %s\n", text.c_str()); }

}  // namespace nearpit::cli
