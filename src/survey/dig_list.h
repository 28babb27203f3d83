// The dig list: which nodes the design has reached, at which ring, and which of them are due.
//
//   design = first sample, and every in-frame neighbour (same confinement part) of a positive of the design
//   ring   = fewest steps from the first sample through positives of the design; 0 for the first sample. With a ring limit R,
//            nodes that would have ring > R are not in the design.
//   due    = in the design, no record, not in a closed area, not halted
//
// Kept up to date change by change: one pit's new outcome costs the nodes whose ring it changes and their neighbours, whatever the size of the
// survey. Rings only fall when a pit turns positive; when one stops being positive the nodes that leaned on it are found in
// order of ring and given their next best support (Ramalingam G & Reps T 1996, J. Algorithms 21:267-305, for unit lengths).
#ifndef NEARPIT_SURVEY_DIG_LIST_H_
#define NEARPIT_SURVEY_DIG_LIST_H_

#include <cstdint>
#include <vector>

#include "survey/survey_ground.h"

namespace nearpit {

// What a node's record says of it.
enum class PitState : std::uint8_t { kNoRecord, kNegative, kPositive, kNotDugGround, kNotDugAccess };

class DigList {
 public:
  // `ground` must outlive the list. Costs the frame once.
  explicit DigList(const SurveyGround& ground);

  // Each change appends to `changed` every node whose state, ring or due changed (a node may come twice).
  void set_state(NodeId id, PitState state, std::vector<NodeId>* changed);
  // How many closed areas of each class, and how many stop-works, hold the node: +1 or -1.
  void add_closed(NodeId id, ReasonClass reason, int change, std::vector<NodeId>* changed);
  void add_halt(NodeId id, int change, std::vector<NodeId>* changed);

  PitState state(NodeId id) const { return state_[index(id)]; }
  bool in_design(NodeId id) const { return ring_[index(id)] != kNotReached; }
  // Only for nodes of the design.
  std::int32_t ring(NodeId id) const { return ring_[index(id)]; }
  bool closed(NodeId id) const { return closed_ground_[index(id)] + closed_access_[index(id)] > 0; }
  // Within a stop-work that is not lifted, in the design or not.
  bool near_stop_work(NodeId id) const { return halts_[index(id)] > 0; }
  // Halted: in the design, without a record, within a stop-work that is not lifted, and not in a closed area (there it counts
  // as not dug).
  bool halted(NodeId id) const;
  bool due(NodeId id) const;
  // A design node that counts as not dug, by its record or by a closed area; a closed area with an access reason wins over one with
  // a ground reason.
  bool not_dug(NodeId id, ReasonClass reason) const;

  // Ascending. Cost: the frame's size over 64, plus what is found.
  std::vector<NodeId> due() const;
  std::vector<NodeId> halted() const;
  std::vector<NodeId> design_positives() const;
  // Design positives next to `id` that opened it, ascending.
  std::vector<NodeId> opened_by(NodeId id) const;
  // Some neighbour of a design positive is kept off by the ring limit. Cost: positives.
  bool truncated() const;

  const SurveyGround& ground() const { return *ground_; }

 private:
  static constexpr std::int32_t kNotReached = -1;
  static std::size_t index(NodeId id) { return static_cast<std::size_t>(id); }

  bool supports(NodeId id) const { return state(id) == PitState::kPositive && in_design(id); }
  std::int32_t best_ring(NodeId id) const;
  void relax_from(std::vector<NodeId> sources, std::vector<NodeId>* changed);
  void drop_support(NodeId id, std::vector<NodeId>* changed);
  void refresh(NodeId id);

  const SurveyGround* ground_;
  std::vector<PitState> state_;
  std::vector<std::int32_t> ring_;
  std::vector<std::uint16_t> closed_ground_;
  std::vector<std::uint16_t> closed_access_;
  std::vector<std::uint16_t> halts_;
  std::vector<std::uint64_t> due_bits_;
  std::vector<std::uint64_t> halted_bits_;
  std::vector<std::uint64_t> positive_bits_;
};

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_DIG_LIST_H_
