// Pit labels. A transect label `T7-12` is transect (row) 7, pit (column) 12. A grid label `N120 E45` is metres along the
// lattice's own axes from a datum, E along a row and N across rows; S and W below zero; at most two decimals. Both are always
// understood; the plan says which is written.
#ifndef NEARPIT_LATTICE_LABEL_H_
#define NEARPIT_LATTICE_LABEL_H_

#include <optional>
#include <string>
#include <string_view>

#include "lattice/lattice.h"

namespace nearpit {

enum class LabelKind { kTransect, kGrid };

struct Labels {
  LabelKind kind = LabelKind::kTransect;
  Lattice lattice;
  Point datum;  // ground place that grid labels call N0 E0

  std::string write(const Node& node) const;
  // Nothing when the text is neither form, or a grid label more than 6 mm from every node in either axis. Letters in either case; a lattice node,
  // not necessarily one of the frame.
  std::optional<Node> read(std::string_view text) const;
  // The text has the shape of a node label (so it can't be the free label of a pit off the grid).
  static bool looks_like_node(std::string_view text);
};

std::string transect_label(const Node& node);

}  // namespace nearpit

#endif  // NEARPIT_LATTICE_LABEL_H_
