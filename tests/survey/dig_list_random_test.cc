// The incremental dig list beside one worked out from scratch, after each of some hundreds of changes in any order.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <memory>
#include <optional>
#include <set>
#include <string>
#include <tuple>

#include "support/naive_dig_list.h"
#include "support/random_ground.h"
#include "survey/dig_list.h"
#include "survey/networks.h"

namespace nearpit {
namespace {

struct Pairing {
  LatticeKind kind;
  NeighbourRule rule;
  const char* name;
};

constexpr Pairing kPairings[] = {
    {LatticeKind::kSquare, NeighbourRule::kEight, "Square8"},
    {LatticeKind::kSquare, NeighbourRule::kFour, "Square4"},
    {LatticeKind::kSquare, NeighbourRule::kFourByTwo, "Square4x2"},
    {LatticeKind::kStaggered, NeighbourRule::kSix, "Staggered6"},
    {LatticeKind::kTriangular, NeighbourRule::kSix, "Triangular6"},
};

using Case = std::tuple<int, Confinement::Kind, int>;  // pairing, confinement, ring limit (0: none)

std::string case_name(const testing::TestParamInfo<Case>& info) {
  const auto& [pairing, confinement, limit] = info.param;
  const char* parts[] = {"Whole", "Blocks", "Areas"};
  return std::string(kPairings[pairing].name) + parts[static_cast<int>(confinement)] +
         (limit == 0 ? "NoLimit" : "Limit" + std::to_string(limit));
}

// Strips of the columns, so that each is in one piece or nearly.
Areas areas_by_columns(TestRandom& random, const Frame& frame) {
  const std::int32_t width = random.between(4, 12);
  std::set<std::int32_t> strips;
  for (NodeId id = 0; id < frame.size(); ++id)
    strips.insert(frame.node(id).column / width);
  Areas areas;
  for (const std::int32_t strip : strips)
    areas.list.push_back({"strip " + std::to_string(strip), {}});
  for (NodeId id = 0; id < frame.size(); ++id) {
    const auto before = strips.find(frame.node(id).column / width);
    areas.of_node.push_back(static_cast<AreaId>(std::distance(strips.begin(), before)));
  }
  return areas;
}

std::unique_ptr<SurveyGround> random_ground(TestRandom& random, const Case& parameters) {
  const auto& [pairing, confinement, limit] = parameters;
  auto ground = std::make_unique<SurveyGround>();
  MultiPolygon boundary;
  ground->frame = random_frame(random, kPairings[pairing].kind, 30, random.chance(0.3) ? 400 : 150, &boundary);
  ground->areas = areas_by_columns(random, ground->frame);
  const DrawKind kind =
      random.one_of(std::vector<DrawKind>{DrawKind::kPits, DrawKind::kTransects, DrawKind::kSystematic});
  ground->units = PrimaryUnits::of(ground->frame, ground->areas, kind, random.between(2, 4));
  std::vector<std::uint32_t> count;
  for (const std::uint32_t units : ground->units.count) {
    count.push_back(static_cast<std::uint32_t>(random.between(1, std::max(1, static_cast<int>(units) / 5))));
  }
  const auto seed = static_cast<std::uint64_t>(random.between(0, 1 << 30));
  ground->sample = draw_first_sample(ground->areas, ground->units, count, seed).value();
  ground->neighbours = kPairings[pairing].rule;
  ground->confinement.kind = confinement;
  if (confinement == Confinement::Kind::kBlock) {
    ground->confinement.block_columns = random.between(1, 6);
    ground->confinement.block_rows = random.between(2, 6);
  }
  if (limit > 0) ground->ring_limit = limit;
  ground->positive = {{0}, 1};
  return ground;
}

naive::DigListOracle oracle_of(const SurveyGround& ground) {
  naive::Rules rules;
  switch (ground.frame.lattice().kind) {
    case LatticeKind::kSquare:
      rules.grid = naive::Grid::kSquare;
      break;
    case LatticeKind::kStaggered:
      rules.grid = naive::Grid::kStaggered;
      break;
    case LatticeKind::kTriangular:
      rules.grid = naive::Grid::kTriangular;
      break;
  }
  switch (ground.neighbours) {
    case NeighbourRule::kEight:
      rules.neighbours = naive::Neighbours::kEight;
      break;
    case NeighbourRule::kFour:
      rules.neighbours = naive::Neighbours::kFour;
      break;
    case NeighbourRule::kFourByTwo:
      rules.neighbours = naive::Neighbours::kFourByTwo;
      break;
    case NeighbourRule::kSix:
      rules.neighbours = naive::Neighbours::kSix;
      break;
  }
  switch (ground.confinement.kind) {
    case Confinement::Kind::kNone:
      rules.parts = naive::Parts::kWhole;
      break;
    case Confinement::Kind::kBlock:
      rules.parts = naive::Parts::kBlocks;
      break;
    case Confinement::Kind::kArea:
      rules.parts = naive::Parts::kAreas;
      break;
  }
  rules.block_columns = ground.confinement.block_columns;
  rules.block_rows = ground.confinement.block_rows;
  rules.ring_limit = ground.ring_limit;
  std::vector<naive::Place> places;
  for (NodeId id = 0; id < ground.frame.size(); ++id) {
    const Node node = ground.frame.node(id);
    const auto index = static_cast<std::size_t>(id);
    places.push_back({node.row, node.column, ground.areas.of_node[index], ground.sample.holds[index]});
  }
  return {places, rules};
}

naive::Said said_of(PitState state) {
  switch (state) {
    case PitState::kNoRecord:
      return naive::Said::kNothing;
    case PitState::kNegative:
      return naive::Said::kNegative;
    case PitState::kPositive:
      return naive::Said::kPositive;
    case PitState::kNotDugGround:
      return naive::Said::kGroundReason;
    case PitState::kNotDugAccess:
      return naive::Said::kAccessReason;
  }
  return naive::Said::kNothing;
}

std::vector<std::size_t> as_indices(const std::vector<NodeId>& ids) { return {ids.begin(), ids.end()}; }

// What `changed` has to tell of a node.
using Shown = std::tuple<PitState, std::optional<int>, bool, bool>;

class Play {
 public:
  Play(TestRandom* random, const Case& parameters)
      : random_(random), ground_(random_ground(*random, parameters)), list_(*ground_), oracle_(oracle_of(*ground_)) {
    eagerness_ = random_->real(0.15, 0.8);
    shown_ = shown_now();
  }

  std::string step() {
    std::vector<NodeId> changed;
    std::string what = change(&changed);
    const std::vector<Shown> now = shown_now();
    const std::set<NodeId> told(changed.begin(), changed.end());
    for (std::size_t node = 0; node < now.size(); ++node) {
      if (now[node] == shown_[node]) continue;
      EXPECT_EQ(told.count(static_cast<NodeId>(node)), 1U) << "not in changed: " << name(node);
    }
    shown_ = now;
    return what;
  }

  void compare() const {
    const naive::Answer expected = oracle_.answer();
    std::vector<NodeId> due;
    std::vector<NodeId> halted;
    for (std::size_t node = 0; node < expected.nodes.size(); ++node) {
      compare_node(node, expected.nodes[node]);
      if (expected.nodes[node].due) due.push_back(static_cast<NodeId>(node));
      if (expected.nodes[node].halted) halted.push_back(static_cast<NodeId>(node));
    }
    EXPECT_EQ(list_.due(), due);
    EXPECT_EQ(list_.halted(), halted);
    EXPECT_EQ(list_.truncated(), expected.truncated);
    compare_networks(expected.clusters);
  }

 private:
  std::string name(std::size_t node) const {
    const Node at = ground_->frame.node(static_cast<NodeId>(node));
    return "T" + std::to_string(at.row) + "-" + std::to_string(at.column);
  }

  std::vector<Shown> shown_now() const {
    std::vector<Shown> shown;
    for (NodeId id = 0; id < ground_->frame.size(); ++id) {
      const std::optional<int> ring = list_.in_design(id) ? std::optional<int>(list_.ring(id)) : std::nullopt;
      shown.emplace_back(list_.state(id), ring, list_.due(id), list_.halted(id));
    }
    return shown;
  }

  // Mostly one that the design reaches, sometimes any; or, to take back, a positive.
  NodeId pick(bool a_positive) {
    std::vector<NodeId> wanted;
    for (NodeId id = 0; id < ground_->frame.size(); ++id) {
      if (a_positive ? list_.state(id) == PitState::kPositive : list_.in_design(id)) wanted.push_back(id);
    }
    if (wanted.empty() || random_->chance(0.15)) return random_->between(0, ground_->frame.size() - 1);
    return random_->one_of(wanted);
  }

  std::string change(std::vector<NodeId>* changed) {
    const int die = random_->between(1, 100);
    const NodeId id = pick(die > 60 && die <= 75);
    const auto node = static_cast<std::size_t>(id);
    if (die <= 75) {
      const PitState state = random_->chance(die > 60 ? 0.1 : eagerness_)
                                 ? PitState::kPositive
                                 : static_cast<PitState>(random_->between(0, 4));
      list_.set_state(id, state, changed);
      oracle_.say(node, said_of(state));
      return "set " + name(node) + " to " + std::to_string(static_cast<int>(state));
    }
    const bool access = random_->chance(0.5);
    if (die <= 88) {
      const int step = oracle_.closures(node, access) > 0 && random_->chance(0.6) ? -1 : 1;
      list_.add_closed(id, access ? ReasonClass::kAccess : ReasonClass::kGround, step, changed);
      oracle_.close(node, access, step);
      return "close " + name(node) + (access ? " access " : " ground ") + std::to_string(step);
    }
    const int step = oracle_.halts(node) > 0 && random_->chance(0.6) ? -1 : 1;
    list_.add_halt(id, step, changed);
    oracle_.halt(node, step);
    return "halt " + name(node) + ' ' + std::to_string(step);
  }

  void compare_node(std::size_t node, const naive::Standing& expected) const {
    const auto id = static_cast<NodeId>(node);
    ASSERT_EQ(said_of(list_.state(id)), oracle_.said(node)) << name(node);
    ASSERT_EQ(list_.in_design(id), expected.ring.has_value()) << name(node);
    EXPECT_EQ(list_.due(id), expected.due) << name(node);
    EXPECT_EQ(list_.halted(id), expected.halted) << name(node);
    EXPECT_EQ(list_.not_dug(id, ReasonClass::kGround), expected.not_dug_ground) << name(node);
    EXPECT_EQ(list_.not_dug(id, ReasonClass::kAccess), expected.not_dug_access) << name(node);
    EXPECT_EQ(list_.closed(id), oracle_.closures(node, true) + oracle_.closures(node, false) > 0) << name(node);
    if (!expected.ring) return;
    EXPECT_EQ(list_.ring(id), *expected.ring) << name(node);
    EXPECT_EQ(as_indices(list_.opened_by(id)), expected.opened_by) << name(node);
  }

  void compare_networks(const std::vector<naive::Cluster>& expected) const {
    const std::vector<Network> networks = find_networks(list_);
    ASSERT_EQ(networks.size(), expected.size());
    for (std::size_t i = 0; i < networks.size(); ++i) {
      EXPECT_EQ(as_indices(networks[i].nodes), expected[i].nodes);
      EXPECT_EQ(as_indices(networks[i].open), expected[i].open);
      EXPECT_EQ(networks[i].cut_at_edge, expected[i].cut_at_edge);
    }
  }

  TestRandom* random_;
  std::unique_ptr<SurveyGround> ground_;
  DigList list_;
  naive::DigListOracle oracle_;
  double eagerness_ = 0.5;
  std::vector<Shown> shown_;
};

class DigListRandom : public testing::TestWithParam<Case> {};

TEST_P(DigListRandom, AsWorkedOutFromScratchAfterEveryChange) {
  TestRandom random = TestRandom::of_this_run();
  for (int survey = 0; survey < rounds(2); ++survey) {
    Play play(&random, GetParam());
    play.compare();
    std::string story;
    for (int change = 0; change < 200; ++change) {
      story += play.step() + "; ";
      play.compare();
      ASSERT_FALSE(HasFailure()) << "survey " << survey << " after " << story;
    }
  }
}

INSTANTIATE_TEST_SUITE_P(All, DigListRandom,
                         testing::Combine(testing::Range(0, 5),
                                          testing::Values(Confinement::Kind::kNone, Confinement::Kind::kBlock,
                                                          Confinement::Kind::kArea),
                                          testing::Range(0, 4)),
                         case_name);

}  // namespace
}  // namespace nearpit
