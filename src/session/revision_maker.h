// Makes the revisions of one write: ids, the writer's sequence, the hybrid clock, and the hash chain.
#ifndef NEARPIT_SESSION_REVISION_MAKER_H_
#define NEARPIT_SESSION_REVISION_MAKER_H_

#include <string>
#include <vector>

#include "record/revision.h"
#include "session/environment.h"

namespace nearpit {

class RevisionMaker {
 public:
  // The writer's last sequence number and hash, and the largest clock that the log has seen.
  RevisionMaker(Environment& environment, std::string writer, std::int64_t last_seq, std::string last_hash,
                std::int64_t largest_clock, const TimeZone& zone);

  Revision make(std::string object, std::string body, std::string by, std::string why,
                std::vector<std::string> parents);

  const WallTime& now() const { return now_; }
  const std::string& writer() const { return writer_; }
  const std::string& last_hash() const { return last_hash_; }
  std::string new_id() { return environment_.new_id(); }

 private:
  Environment& environment_;
  WallTime now_;
  std::string writer_;
  std::int64_t seq_;
  std::string last_hash_;
  std::int64_t clock_;
};

}  // namespace nearpit

#endif  // NEARPIT_SESSION_REVISION_MAKER_H_
