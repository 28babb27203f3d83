#include "exchange/table_findings.h"

#include <algorithm>

namespace nearpit {
namespace {

constexpr std::size_t kMostFindings = 10'000;

}  // namespace

void TableFindings::add(int line, const std::string& column, const std::string& what) {
  if (list_.size() >= kMostFindings) {
    more_ = true;
    return;
  }
  const std::string where = column.empty() ? "" : column + ": ";
  list_.emplace_back(line, file_ + ":" + std::to_string(line) + ": " + where + what);
}

Error TableFindings::error() const {
  auto sorted = list_;
  std::stable_sort(sorted.begin(), sorted.end(), [](const auto& a, const auto& b) { return a.first < b.first; });
  std::vector<std::string> lines;
  for (auto& [line, text] : sorted)
    lines.push_back(std::move(text));
  if (more_) lines.push_back(file_ + ": more is wrong than is listed; correct these first");
  return {ErrorKind::kBadInput, std::move(lines)};
}

}  // namespace nearpit
