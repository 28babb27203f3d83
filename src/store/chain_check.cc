#include "store/chain_check.h"

#include <string>
#include <unordered_set>
#include <utility>
#include <vector>

#include "base/text.h"
#include "store/revision_rows.h"

namespace nearpit::store {
namespace {

constexpr const char* kTampered =
    "don't write to this file; compare with another copy and go on with the one that is whole";
constexpr const char* kIncomplete = "take in the copy of the device that wrote it, or go on with the last good copy";

class ChainReader {
 public:
  ChainReader(std::string start, Findings& findings) : start_(std::move(start)), findings_(findings) {}

  void take(const Revision& revision) {
    if (revision.writer != writer_) {
      writer_ = revision.writer;
      seq_ = 0;
      hash_ = start_;
    }
    const std::string where = "revision " + std::to_string(revision.seq) + " of writer " + in_quotes(writer_);
    const bool in_sequence = revision.seq == seq_ + 1;
    if (!in_sequence) {
      findings_.add(
          {"gap", where, "follows number " + std::to_string(seq_) + "; what stood between is not there", kIncomplete});
    }
    // After a gap the hash before is unknown: nothing can be said of this one.
    if (in_sequence && chain_hash(hash_, revision) != revision.hash) {
      findings_.add({"chain", where,
                     "its SHA-256 is not that of its content and of the revision before it (object " +
                         in_quotes(revision.object) + ")" +
                         (revision.seq == 1 ? ", or the plan or the drawn first sample was changed" : ""),
                     kTampered});
    }
    seq_ = revision.seq;
    hash_ = revision.hash;
    for (const std::string& parent : revision.parents)
      parents_.emplace_back(parent, where);
    ids_.insert(revision.id);
  }

  void report_orphans() {
    for (const auto& [parent, where] : parents_) {
      if (ids_.contains(parent)) continue;
      findings_.add({"orphan", where, "replaces revision " + in_quotes(parent) + ", which is not there", kIncomplete});
    }
  }

 private:
  std::string start_;
  Findings& findings_;
  std::string writer_;
  std::string hash_;
  std::int64_t seq_ = 0;
  std::unordered_set<std::string> ids_;
  std::vector<std::pair<std::string, std::string>> parents_;
};

}  // namespace

void check_chain(Connection& db, const std::string& start, Findings& findings) {
  ChainReader reader(start, findings);
  const Status read =
      each_revision(db, "WHERE number > ?1 ORDER BY writer, seq", 0, [&](std::int64_t, Revision&& revision) {
        reader.take(revision);
        return ok_status();
      });
  if (!read) {
    findings.add({"chain", "nearpit_revision", read.error().one_line(), kTampered});
    return;
  }
  reader.report_orphans();
}

}  // namespace nearpit::store
