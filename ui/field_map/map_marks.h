// Which mark each pit has on the field map, and which marks are drawn at a zoom.
//
// The mark of a pit is what its record says; without a record (or with a withdrawn one) what the dig list says: halted, due, not dug in a closed area,
// asked for by a judgement positive. The rest is plain: on the grid, nothing known, not due. Plain nodes are not kept here; plain_nodes() finds those in view.
//
// Thinning, when marks crowd: the ground is cut into cells along the lattice's own axes, 2^k spacings by 2^k row distances, counted from the lattice's
// origin, and a cell shows its most telling mark: conflict, positive, halted, due, not dug, negative; of equals the first node, off-grid pits last.
// Cells and the marks they show depend on nothing that panning changes, so no mark comes or goes inside the map while it is panned.
#ifndef NEARPIT_UI_FIELD_MAP_MAP_MARKS_H_
#define NEARPIT_UI_FIELD_MAP_MAP_MARKS_H_

#include <cstddef>
#include <cstdint>
#include <string>
#include <vector>

#include "lattice/frame.h"
#include "lattice/polygon.h"
#include "session/survey_model.h"

namespace nearpit::ui {

enum class Mark : std::uint8_t { kPlain, kDue, kHalted, kNegative, kPositive, kNotDug };

struct PitMark {
  NodeId node = kNoNode;        // kNoNode: off the grid
  std::int32_t free_label = 0;  // off the grid: its place in MapMarks::free_labels()
  Point place;                  // as dug, where the record gives a place, else the node's
  Mark mark = Mark::kPlain;
  bool first_sample = false;
  bool judgement = false;  // recorded, and the design does not reach it
  bool conflict =
      false;           // two records wait for somebody to settle; also where both are withdrawn and the mark is another
  bool asked = false;  // opened by a judgement positive on request, not recorded: kDue, or kHalted near a stop-work
};

// The first tells more, or the same and comes first: by conflict and mark as above, then by node, then by free label. A strict total order of one survey's pits.
bool more_telling(const PitMark& first, const PitMark& second);

// The mark of one node, plain or not.
PitMark mark_of(const SurveyModel& model, NodeId id);

// Made again when the survey's revision changes, never in a frame. Keeps nothing of the model.
class MapMarks {
 public:
  // Cost: the frame's size over 64, and what is due, halted, recorded, closed, times its logarithm.
  explicit MapMarks(const SurveyModel& model);

  // Every pit whose mark is not plain or that is in conflict: nodes ascending, then pits off the grid.
  const std::vector<PitMark>& marked() const { return marked_; }
  const std::vector<std::string>& free_labels() const { return free_labels_; }
  // The node is among marked(): what a map asks that draws plain nodes only where no other mark stands.
  bool has_mark(NodeId id) const;

  // What to draw inside `ground` (edges included) when marks nearer than `apart_m` may be left out. Replaces *out. Cells are the smallest that
  // measure at least apart_m both ways; nothing is left out when apart_m is at most the spacing. Cost: the cells in view and the logarithm of all.
  void visible(const Box& ground, double apart_m, std::vector<PitMark>* out) const;
  bool thinned(double apart_m) const { return level_of(apart_m) > 0; }

 private:
  struct Cell {
    std::int32_t row = 0;
    std::int32_t column = 0;
    std::uint32_t mark = 0;  // index in marked_
  };
  // Cells in row, column order; level 0 has one for each mark, a level k above it one for each cell of 2^k that holds any.
  using Level = std::vector<Cell>;

  std::size_t level_of(double apart_m) const;
  Cell cell_of(const PitMark& mark, std::uint32_t index) const;
  Level coarser(const Level& level) const;
  static bool coarsest(const Level& level);

  Lattice lattice_;
  std::vector<PitMark> marked_;
  std::vector<std::string> free_labels_;
  std::vector<std::uint64_t> mark_bits_;
  std::vector<Level> levels_;
};

// The frame's nodes inside the box, edges included (1 mm tolerance), ascending, marked ones too. More than `most`: false, and *out is empty. Cost:
// the lattice's rows in view, and the nodes found.
bool plain_nodes(const SurveyModel& model, const Box& ground, std::size_t most, std::vector<NodeId>* out);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_FIELD_MAP_MAP_MARKS_H_
