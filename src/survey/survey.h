// A survey in memory: the ground that is fixed, and what the records say so far. A fold over the log: set the heads of an object, and
// everything else is derived. Knows no file and no JSON.
#ifndef NEARPIT_SURVEY_SURVEY_H_
#define NEARPIT_SURVEY_SURVEY_H_

#include <map>
#include <memory>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

#include "survey/dig_list.h"
#include "survey/heads_rule.h"

namespace nearpit {

// All that is known of one pit that somebody wrote about.
struct PitEntry {
  std::vector<Head> heads;  // at least one
  HeadsVerdict verdict;
  const PitRecord& record() const { return heads[verdict.counts].record; }
  bool withdrawn() const { return record().status == PitStatus::kWithdrawn; }
  // What a further record starts from: in a conflict the later head, unless that withdraws; else the record that counts; nothing when it is withdrawn.
  const PitRecord* standing() const {
    if (withdrawn()) return nullptr;
    const PitRecord& latest = heads[verdict.latest].record;
    return latest.status == PitStatus::kWithdrawn ? &record() : &latest;
  }
};

struct ClosedArea {
  std::string name;
  NotDugReason reason = NotDugReason::kOther;
  MultiPolygon polygon;            // or
  std::vector<std::int32_t> rows;  // these rows of the lattice
  std::string by;
  bool open_again = false;
};

struct StopWork {
  Point place;
  double distance_m = 30;
  std::string reason;
  bool lifted = false;
};

class Survey {
 public:
  explicit Survey(std::unique_ptr<const SurveyGround> ground);

  // Each replaces what is known of the object and returns the nodes whose standing may have changed. No heads: as if
  // nobody had written of the pit (so a refused change can be taken back).
  std::vector<NodeId> set_pit(NodeId id, std::vector<Head> heads);
  void set_off_grid(const std::string& label, std::vector<Head> heads);
  std::vector<NodeId> set_closed_area(const std::string& object, ClosedArea area);
  std::vector<NodeId> set_stop_work(const std::string& object, StopWork stop);
  std::vector<NodeId> forget_closed_area(const std::string& object);

  const SurveyGround& ground() const { return *ground_; }
  const DigList& dig_list() const { return list_; }
  // Nothing when nobody wrote of the pit.
  const PitEntry* pit(NodeId id) const;
  const PitEntry* off_grid(const std::string& label) const;
  const std::unordered_map<NodeId, PitEntry>& pits() const { return pits_; }
  const std::map<std::string, PitEntry>& off_grid_pits() const { return off_grid_; }
  const std::map<std::string, ClosedArea>& closed_areas() const { return closed_; }
  const std::map<std::string, StopWork>& stop_works() const { return stops_; }
  // Nodes that a closed area holds, ascending.
  std::vector<NodeId> nodes_in(const ClosedArea& area) const;
  // Whether asked() holds the pit.
  bool asked_for(NodeId id) const;
  // Pits that judgement positives opened because the crew asked for it, without record and not in the design; ascending.
  std::vector<NodeId> asked() const;

 private:
  bool opens_on_request(NodeId id) const;
  bool may_be_asked_for(NodeId id) const;
  void mark_closed(const ClosedArea& area, int change, std::vector<NodeId>* changed);

  std::unique_ptr<const SurveyGround> ground_;
  DigList list_;
  std::unordered_map<NodeId, PitEntry> pits_;
  std::map<std::string, PitEntry> off_grid_;
  std::map<std::string, ClosedArea> closed_;
  std::map<std::string, StopWork> stops_;
};

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_SURVEY_H_
