// All that is wrong with one table, a line each: "FILE:LINE: COLUMN: what".
#ifndef NEARPIT_EXCHANGE_TABLE_FINDINGS_H_
#define NEARPIT_EXCHANGE_TABLE_FINDINGS_H_

#include <cstddef>
#include <string>
#include <utility>
#include <vector>

#include "base/status.h"

namespace nearpit {

class TableFindings {
 public:
  explicit TableFindings(std::string file) : file_(std::move(file)) {}

  // `column` may be empty.
  void add(int line, const std::string& column, const std::string& what);
  bool none() const { return list_.empty(); }
  // In order of line, then as found; at least one. The first 10,000, and a last line when there were more.
  Error error() const;
  const std::string& file() const { return file_; }

 private:
  std::string file_;
  std::vector<std::pair<int, std::string>> list_;
  bool more_ = false;
};

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_TABLE_FINDINGS_H_
