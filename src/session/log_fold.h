// The log folded by object: which revisions are heads (nobody names them as a parent), in any order of arrival.
#ifndef NEARPIT_SESSION_LOG_FOLD_H_
#define NEARPIT_SESSION_LOG_FOLD_H_

#include <cstdint>
#include <set>
#include <string>
#include <unordered_map>
#include <unordered_set>
#include <vector>

#include "record/revision.h"

namespace nearpit {

struct LogHead {
  std::string revision;
  std::int64_t clock = 0;
  std::string writer;
  std::string by;
  std::string body;
};

class LogFold {
 public:
  // Takes a revision, however late; objects whose heads changed are kept until take_changed().
  void add(const Revision& revision);

  // Empty when nobody wrote of the object.
  const std::vector<LogHead>& heads(const std::string& object) const;
  std::set<std::string> take_changed();
  std::int64_t largest_clock() const { return largest_clock_; }
  std::int64_t revisions() const { return revisions_; }

 private:
  std::unordered_map<std::string, std::vector<LogHead>> heads_;
  std::unordered_set<std::string> replaced_;
  std::set<std::string> changed_;
  std::int64_t largest_clock_ = 0;
  std::int64_t revisions_ = 0;
};

}  // namespace nearpit

#endif  // NEARPIT_SESSION_LOG_FOLD_H_
