// Surveys in tests, drawn as text: one line a row of the lattice (the first line is row 1), one token a node, tokens apart by spaces.
//
//   .      a pit without finds        3      a pit with 3 of the first find      3/2    and 2 of the second
//   ?      no record yet              x      not dug, a ground reason            r      not dug, an access reason
//   _      no node here               o in front of any of these but _: it is of the first sample
//
// A survey so drawn is made through the public headers: frame clipped to a boundary, primary units, records.
#ifndef NEARPIT_TESTS_SUPPORT_LATTICE_PICTURE_H_
#define NEARPIT_TESTS_SUPPORT_LATTICE_PICTURE_H_

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "survey/survey.h"

namespace nearpit {

struct PicturePlan {
  LatticeKind kind = LatticeKind::kSquare;
  NeighbourRule neighbours = NeighbourRule::kFour;
  DrawKind draw = DrawKind::kPits;
  std::int32_t every = 1;
  std::uint32_t at_least = 1;  // of the first find
  std::string areas = {};      // the same shape, one letter a node: a the first area, b the second; empty: one area
  Confinement confinement = {};
  std::optional<std::int32_t> ring_limit = {};
};

enum class PictureMark { kDug, kNoRecord, kGroundReason, kAccessReason };

struct PictureNode {
  Node node;
  AreaId area = 0;
  PictureMark mark = PictureMark::kDug;
  std::vector<std::uint32_t> counts{0, 0};  // of two finds
  bool first_sample = false;
};

class LatticePicture {
 public:
  LatticePicture(std::string_view picture, PicturePlan plan);

  const PicturePlan& plan() const { return plan_; }
  // By NodeId: in row, column order.
  const std::vector<PictureNode>& nodes() const { return nodes_; }
  std::size_t areas() const { return areas_; }
  // The unit that holds a node, as the plan's primary units number it.
  UnitId unit_of(NodeId id) const { return units_.of_node[static_cast<std::size_t>(id)]; }

  // As drawn: the first sample is the units that hold an `o`, the records are those of the picture.
  Survey survey() const;
  // The same first sample or a given one (by area), nothing dug yet.
  Survey undug() const;
  Survey undug(const std::vector<std::vector<UnitId>>& drawn) const;
  // What the design asks for is dug as drawn, until nothing is due. A node without a record in the picture ends the program.
  Survey dug_out(const std::vector<std::vector<UnitId>>& drawn) const;

  PitRecord record(NodeId id) const;

 private:
  std::vector<std::vector<UnitId>> marked() const;

  PicturePlan plan_;
  std::vector<PictureNode> nodes_;
  std::size_t areas_ = 1;
  Frame frame_;
  Areas area_list_;
  PrimaryUnits units_;
};

// One head with this record.
std::vector<Head> head_of(PitRecord record);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_LATTICE_PICTURE_H_
