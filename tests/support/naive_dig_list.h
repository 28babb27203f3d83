// The dig list worked out from scratch in the plainest way, as the oracle of the incremental one. Includes nothing of src: nodes are
// known by their number in row, column order, the frame is a set of (row, column), and neighbours are found by their distance.
#ifndef NEARPIT_TESTS_SUPPORT_NAIVE_DIG_LIST_H_
#define NEARPIT_TESTS_SUPPORT_NAIVE_DIG_LIST_H_

#include <cstddef>
#include <map>
#include <optional>
#include <utility>
#include <vector>

namespace nearpit::naive {

enum class Grid { kSquare, kStaggered, kTriangular };
enum class Neighbours { kEight, kFour, kFourByTwo, kSix };
enum class Parts { kWhole, kBlocks, kAreas };
enum class Said { kNothing, kNegative, kPositive, kGroundReason, kAccessReason };

struct Place {
  int row = 0;
  int column = 0;
  int area = 0;
  bool first_sample = false;
};

struct Rules {
  Grid grid = Grid::kSquare;
  Neighbours neighbours = Neighbours::kEight;
  Parts parts = Parts::kWhole;
  int block_columns = 0;
  int block_rows = 0;
  std::optional<int> ring_limit;
};

struct Standing {
  std::optional<int> ring;  // nothing: the design does not reach the node
  bool due = false;
  bool halted = false;
  bool not_dug_ground = false;
  bool not_dug_access = false;
  std::vector<std::size_t> opened_by;
};

struct Cluster {
  std::vector<std::size_t> nodes;
  std::vector<std::size_t> open;
  bool cut_at_edge = false;
};

struct Answer {
  std::vector<Standing> nodes;
  std::vector<Cluster> clusters;
  bool truncated = false;
};

class DigListOracle {
 public:
  DigListOracle(std::vector<Place> places, const Rules& rules);

  void say(std::size_t node, Said said) { facts_[node].said = said; }
  void close(std::size_t node, bool access, int change) {
    (access ? facts_[node].access : facts_[node].ground) += change;
  }
  void halt(std::size_t node, int change) { facts_[node].halts += change; }

  Said said(std::size_t node) const { return facts_[node].said; }
  int closures(std::size_t node, bool access) const { return access ? facts_[node].access : facts_[node].ground; }
  int halts(std::size_t node) const { return facts_[node].halts; }
  // In the frame, whatever the parts.
  const std::vector<std::size_t>& neighbours(std::size_t node) const { return neighbours_[node]; }

  Answer answer() const;

 private:
  struct Fact {
    Said said = Said::kNothing;
    int ground = 0;
    int access = 0;
    int halts = 0;
  };

  std::pair<double, double> ground_place(const Place& place) const;
  bool near_enough(const Place& from, const Place& to) const;
  bool same_part(std::size_t from, std::size_t to) const;
  std::vector<std::optional<int>> rings() const;
  Standing standing(std::size_t node, const std::vector<std::optional<int>>& ring) const;
  std::vector<Cluster> clusters(const std::vector<Standing>& nodes) const;

  std::vector<Place> places_;
  Rules rules_;
  std::vector<Fact> facts_;
  std::vector<std::vector<std::size_t>> neighbours_;
};

}  // namespace nearpit::naive

#endif  // NEARPIT_TESTS_SUPPORT_NAIVE_DIG_LIST_H_
