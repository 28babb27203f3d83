#include "session/revision_maker.h"

#include <algorithm>
#include <utility>

namespace nearpit {

RevisionMaker::RevisionMaker(Environment& environment, std::string writer, std::int64_t last_seq, std::string last_hash,
                             std::int64_t largest_clock, const TimeZone& zone)
    : environment_(environment),
      now_(in_zone(environment.clock->now(), zone)),
      writer_(std::move(writer)),
      seq_(last_seq),
      last_hash_(std::move(last_hash)),
      clock_(largest_clock) {}

Revision RevisionMaker::make(std::string object, std::string body, std::string by, std::string why,
                             std::vector<std::string> parents) {
  Revision revision;
  revision.id = new_id();
  revision.writer = writer_;
  revision.seq = ++seq_;
  clock_ = next_clock(clock_, now_.utc_ms);
  revision.clock = clock_;
  revision.by = std::move(by);
  revision.at = now_;
  revision.object = std::move(object);
  revision.body = std::move(body);
  revision.why = std::move(why);
  std::sort(parents.begin(), parents.end());
  revision.parents = std::move(parents);
  revision.hash = chain_hash(last_hash_, revision);
  last_hash_ = revision.hash;
  return revision;
}

}  // namespace nearpit
