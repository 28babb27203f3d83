#include "session/log_fold.h"

#include <algorithm>
#include <utility>

namespace nearpit {

void LogFold::add(const Revision& revision) {
  ++revisions_;
  largest_clock_ = std::max(largest_clock_, revision.clock);
  std::vector<LogHead>& heads = heads_[revision.object];
  for (const std::string& parent : revision.parents) {
    replaced_.insert(parent);
    std::erase_if(heads, [&](const LogHead& head) { return head.revision == parent; });
  }
  if (!replaced_.contains(revision.id)) {
    heads.push_back({revision.id, revision.clock, revision.writer, revision.by, revision.body});
  }
  changed_.insert(revision.object);
}

const std::vector<LogHead>& LogFold::heads(const std::string& object) const {
  static const std::vector<LogHead> kNone;
  const auto found = heads_.find(object);
  return found == heads_.end() ? kNone : found->second;
}

std::set<std::string> LogFold::take_changed() { return std::exchange(changed_, {}); }

}  // namespace nearpit
