#include "base/status.h"

namespace nearpit {

std::string Error::one_line() const {
  if (lines.empty()) return "internal error without a description";
  if (lines.size() == 1) return lines.front();
  return lines.front() + " (and " + std::to_string(lines.size() - 1) + " more)";
}

}  // namespace nearpit
