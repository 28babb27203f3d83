#include "field_map/map_marks.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "field_map/marked_survey.h"
#include "support/random_ground.h"

namespace nearpit::ui {
namespace {

// D due, H halted, - negative, # positive, n not dug, . plain.
char letter(const PitMark& pit) { return ".DH-#n"[static_cast<std::size_t>(pit.mark)]; }

Picture marks_of(const SurveyModel& model) {
  const Frame& frame = model.survey().ground().frame;
  Picture picture(static_cast<std::size_t>(frame.node(frame.size() - 1).row));
  for (NodeId id = 0; id < frame.size(); ++id) {
    const Node node = frame.node(id);
    std::string& line = picture[static_cast<std::size_t>(node.row - 1)];
    line.resize(std::max(line.size(), static_cast<std::size_t>(node.column)), ' ');
    line[static_cast<std::size_t>(node.column - 1)] = letter(mark_of(model, id));
  }
  return picture;
}

NodeId at(const SurveyModel& model, std::int32_t row, std::int32_t column) {
  return node_at(model.survey(), row, column);
}

std::vector<NodeId> nodes_of(const std::vector<PitMark>& pits) {
  std::vector<NodeId> nodes;
  for (const PitMark& pit : pits)
    nodes.push_back(pit.node);
  std::sort(nodes.begin(), nodes.end());
  return nodes;
}

std::vector<PitMark> sorted(std::vector<PitMark> pits) {
  std::sort(pits.begin(), pits.end(), more_telling);
  return pits;
}

std::vector<PitMark> seen(const MapMarks& marks, const Box& box, double apart_m) {
  std::vector<PitMark> out;
  marks.visible(box, apart_m, &out);
  return sorted(out);
}

std::vector<PitMark> kept(std::vector<PitMark> pits, const Box& box) {
  std::erase_if(pits, [&](const PitMark& pit) { return !box_holds(box, pit.place); });
  return pits;
}

constexpr double kEverywhere_m = 1e7;
const Box kEverywhere{{-kEverywhere_m, -kEverywhere_m}, {kEverywhere_m, kEverywhere_m}};

// clang-format off
TEST(MapMarks, MarksEachPitByItsRecordElseByTheDigList) {
  EXPECT_EQ(marks_of(drawn_model({"o=@.",
                                  "GA.W",
                                  "-ga#"})),
                         (Picture{"D-#D",
                                  "nnDD",
                                  "-nn#"}));
}

TEST(MapMarks, OpensTheRingOfEachKindOfLattice) {
  const Picture drawn{".....",
                      "..@..",
                      "....."};
  EXPECT_EQ(marks_of(drawn_model(drawn)), (Picture{".DDD.",
                                                   ".D#D.",
                                                   ".DDD."}));
  for (const LatticeKind kind : {LatticeKind::kStaggered, LatticeKind::kTriangular}) {
    EXPECT_EQ(marks_of(drawn_model(drawn, {.kind = kind, .neighbours = NeighbourRule::kSix})),
              (Picture{"..DD.",
                       ".D#D.",
                       "..DD."}));
  }
}

TEST(MapMarks, ClosedAreasMarkThePitsOfTheDesignOnly) {
  SurveyModel model = drawn_model({"oo..",
                                   "o..."});
  ClosedArea area;
  area.rows = {1};
  model.survey().set_closed_area("area/1", area);
  model.survey().set_closed_area("area/2", area);
  EXPECT_EQ(marks_of(model), (Picture{"nn..",
                                      "D..."}));
  EXPECT_EQ(nodes_of(MapMarks(model).marked()), (std::vector<NodeId>{0, 1, 4}));
  area.open_again = true;
  model.survey().set_closed_area("area/1", area);
  model.survey().set_closed_area("area/2", area);
  EXPECT_EQ(marks_of(model), (Picture{"DD..",
                                      "D..."}));
}

TEST(MapMarks, PitsThatAJudgementPositiveOpenedAreAskedFor) {
  SurveyModel model = drawn_model({"o....",
                                   ".....",
                                   "....."});
  PitRecord record = dug_record(1);
  record.opens_neighbours = true;
  model.survey().set_pit(at(model, 3, 4), {head_of(record)});
  EXPECT_EQ(marks_of(model), (Picture{"D....",
                                      "..DDD",
                                      "..D#D"}));
  EXPECT_TRUE(mark_of(model, at(model, 2, 4)).asked);
  EXPECT_FALSE(mark_of(model, at(model, 1, 1)).asked);
  EXPECT_TRUE(mark_of(model, at(model, 3, 4)).judgement);
  EXPECT_EQ(MapMarks(model).marked().size(), 7U);
  // Nobody digs near a stop-work, not even what was asked for.
  model.survey().set_stop_work("stop/1", {{40, 10}, 10, "", false});
  EXPECT_EQ(marks_of(model), (Picture{"D....",
                                      "..DHH",
                                      "..D#H"}));
  EXPECT_TRUE(mark_of(model, at(model, 2, 4)).asked);
  model.survey().set_stop_work("stop/1", {{40, 10}, 10, "", true});
  EXPECT_EQ(mark_of(model, at(model, 2, 4)).mark, Mark::kDue);
  record.opens_neighbours = false;
  model.survey().set_pit(at(model, 3, 4), {head_of(record)});
  EXPECT_EQ(marks_of(model), (Picture{"D....",
                                      ".....",
                                      "...#."}));
}

TEST(MapMarks, StopWorksHaltWhatIsDue) {
  SurveyModel model = drawn_model({"oo=..o"});
  model.survey().set_stop_work("stop/1", {{0, 0}, 20, "", false});
  EXPECT_EQ(marks_of(model), (Picture{"HH-..D"}));
}

TEST(MapMarks, SaysWhatElseIsKnownOfAPit) {
  SurveyModel model = drawn_model({"=o..",
                                   ".-.."});
  PitRecord moved = dug_record(0);
  moved.place = Point{31, -1};
  model.survey().set_pit(at(model, 1, 4), {head_of(moved)});
  model.survey().set_pit(at(model, 2, 3), {head_of(dug_record(1), 1, "a"), head_of(dug_record(0), 2, "b")});
  EXPECT_TRUE(mark_of(model, at(model, 1, 1)).first_sample);
  EXPECT_FALSE(mark_of(model, at(model, 1, 1)).judgement);
  EXPECT_FALSE(mark_of(model, at(model, 2, 2)).first_sample);
  EXPECT_TRUE(mark_of(model, at(model, 2, 2)).judgement);
  EXPECT_EQ(mark_of(model, at(model, 1, 4)).place, (Point{31, -1}));
  EXPECT_EQ(mark_of(model, at(model, 2, 2)).place, (Point{10, 10}));
  EXPECT_TRUE(mark_of(model, at(model, 2, 3)).conflict);
  EXPECT_EQ(mark_of(model, at(model, 2, 3)).mark, Mark::kPositive);
}
// clang-format on

TEST(MapMarks, HoldsPitsOffTheGridByTheirFreeLabels) {
  SurveyModel model = drawn_model({"o..."});
  PitRecord record = dug_record(1);
  record.place = Point{13, 57};
  PitRecord withdrawn = withdrawn_record();
  withdrawn.place = Point{1, 1};
  model.survey().set_off_grid("J1", {head_of(withdrawn)});
  model.survey().set_off_grid("J2", {head_of(record)});
  const MapMarks marks(model);
  ASSERT_EQ(marks.marked().size(), 2U);
  const PitMark& pit = marks.marked()[1];
  EXPECT_EQ(pit.node, kNoNode);
  EXPECT_EQ(marks.free_labels()[static_cast<std::size_t>(pit.free_label)], "J2");
  EXPECT_EQ(pit.place, (Point{13, 57}));
  EXPECT_EQ(pit.mark, Mark::kPositive);
  EXPECT_TRUE(pit.judgement);
}

TEST(MapMarks, AConflictOfWithdrawalsStillShows) {
  SurveyModel model = drawn_model({"...."});
  PitRecord other = withdrawn_record();
  other.note = "not here";
  model.survey().set_pit(at(model, 1, 2), {head_of(withdrawn_record(), 1, "a"), head_of(other, 2, "b")});
  const MapMarks marks(model);
  ASSERT_EQ(marks.marked().size(), 1U);
  EXPECT_EQ(marks.marked()[0].mark, Mark::kPlain);
  EXPECT_TRUE(marks.marked()[0].conflict);
}

TEST(MapMarks, TheMoreTellingMarkWinsACell) {
  const auto pit = [](Mark mark, NodeId node, bool conflict = false) {
    PitMark made;
    made.node = node;
    made.mark = mark;
    made.conflict = conflict;
    return made;
  };
  PitMark off_grid = pit(Mark::kNegative, kNoNode);
  PitMark later = off_grid;
  later.free_label = 1;
  const std::vector<PitMark> order{pit(Mark::kPlain, 9, true),
                                   pit(Mark::kPositive, 8),
                                   pit(Mark::kHalted, 7),
                                   pit(Mark::kDue, 6),
                                   pit(Mark::kNotDug, 5),
                                   pit(Mark::kNegative, 3),
                                   pit(Mark::kNegative, 4),
                                   off_grid,
                                   later};
  for (std::size_t i = 0; i < order.size(); ++i) {
    for (std::size_t j = 0; j < order.size(); ++j)
      EXPECT_EQ(more_telling(order[i], order[j]), i < j) << i << ' ' << j;
  }
}

// Four nodes a cell of two by two spacings, counted from node (1, 1).
// clang-format off
TEST(MapMarks, ThinsToOneMarkACell) {
  for (const LatticeKind kind : kAllLatticeKinds) {
    const NeighbourRule rule = default_rule(kind);
    const SurveyModel model = drawn_model({"=o.Go",
                                           "@===A",
                                           "   =="}, {.kind = kind, .neighbours = rule});
    const MapMarks marks(model);
    EXPECT_FALSE(marks.thinned(10));
    EXPECT_TRUE(marks.thinned(10.01));
    EXPECT_EQ(seen(marks, kEverywhere, 10).size(), marks.marked().size());
    EXPECT_EQ(nodes_of(seen(marks, kEverywhere, 10.01)),
              (std::vector<NodeId>{at(model, 1, 4), at(model, 1, 5), at(model, 2, 1), at(model, 3, 4), at(model, 3, 5)}));
    EXPECT_EQ(nodes_of(seen(marks, kEverywhere, 1e6)), std::vector<NodeId>{at(model, 2, 1)});
  }
}
// clang-format on

class RandomMapMarks : public testing::TestWithParam<LatticeKind> {
 protected:
  TestRandom random_ = TestRandom::of_this_run();
};
INSTANTIATE_TEST_SUITE_P(Kinds, RandomMapMarks, testing::ValuesIn(kAllLatticeKinds),
                         [](const auto& kind) { return std::string(lattice_kind_name(kind.param)); });

TEST_P(RandomMapMarks, HoldEveryPitThatIsNotPlain) {
  for (int round = rounds(30); round > 0; --round) {
    const SurveyModel model = random_model(random_, GetParam(), 30, 600);
    const MapMarks marks(model);
    std::vector<NodeId> expected;
    for (NodeId id = 0; id < model.survey().ground().frame.size(); ++id) {
      const PitMark pit = mark_of(model, id);
      const bool shows = pit.mark != Mark::kPlain || pit.conflict;
      EXPECT_EQ(marks.has_mark(id), shows);
      if (shows) expected.push_back(id);
    }
    std::vector<NodeId> held;
    for (const PitMark& pit : marks.marked()) {
      if (pit.node == kNoNode) continue;
      held.push_back(pit.node);
      EXPECT_TRUE(same_pit(pit, mark_of(model, pit.node)));
    }
    EXPECT_EQ(held, expected);
  }
}

// What the dig list and the records say, looked up in their own lists.
TEST_P(RandomMapMarks, AgreeWithTheDigList) {
  std::size_t all_halted = 0, all_asked = 0, conflicts = 0;
  for (int round = rounds(30); round > 0; --round) {
    const SurveyModel model = random_model(random_, GetParam(), 30, 600);
    const Survey& survey = model.survey();
    std::vector<NodeId> due, halted, asked;
    std::size_t judgement = 0;
    for (NodeId id = 0; id < survey.ground().frame.size(); ++id) {
      const PitMark pit = mark_of(model, id);
      if (pit.asked) asked.push_back(id);
      conflicts += pit.conflict ? 1 : 0;
      if (pit.mark == Mark::kDue && !pit.asked) due.push_back(id);
      if (pit.mark == Mark::kHalted && !pit.asked) halted.push_back(id);
      judgement += pit.judgement ? 1 : 0;
      const bool not_dug =
          survey.dig_list().not_dug(id, ReasonClass::kGround) || survey.dig_list().not_dug(id, ReasonClass::kAccess);
      EXPECT_EQ(survey.dig_list().in_design(id) && pit.mark == Mark::kNotDug, not_dug);
    }
    EXPECT_EQ(due, survey.dig_list().due());
    EXPECT_EQ(halted, survey.dig_list().halted());
    EXPECT_EQ(asked, survey.asked());
    all_halted += halted.size();
    all_asked += asked.size();
    EXPECT_EQ(judgement,
              static_cast<std::size_t>(std::count_if(survey.pits().begin(), survey.pits().end(), [&](const auto& pit) {
                return !pit.second.withdrawn() && !survey.dig_list().in_design(pit.first);
              })));
  }
  // The surveys do hold what is compared.
  EXPECT_GT(all_halted, 0U);
  EXPECT_GT(all_asked, 0U);
  EXPECT_GT(conflicts, 0U);
}

TEST_P(RandomMapMarks, NotThinnedShowWhatTheBoxHolds) {
  for (int round = rounds(20); round > 0; --round) {
    const SurveyModel model = random_model(random_, GetParam(), 30, 600);
    const MapMarks marks(model);
    const Box bounds = node_bounds(model);
    for (int look = 0; look < 20; ++look) {
      const Box box = random_box(random_, bounds, random_.real(0.02, 1.5));
      const std::vector<PitMark> expected = sorted(kept(marks.marked(), box));
      const double apart = random_.real(0, 1) * model.survey().ground().frame.lattice().spacing_m;
      const std::vector<PitMark> shown = seen(marks, box, apart);
      EXPECT_TRUE(std::equal(shown.begin(), shown.end(), expected.begin(), expected.end(), same_pit));
    }
  }
}

TEST_P(RandomMapMarks, PanningMovesNoMark) {
  for (int round = rounds(20); round > 0; --round) {
    const SurveyModel model = random_model(random_, GetParam(), 30, 600);
    const MapMarks marks(model);
    const Box bounds = node_bounds(model);
    for (int look = 0; look < 20; ++look) {
      const double apart = random_.real(0.5, 20) * model.survey().ground().frame.lattice().spacing_m;
      const Box here = random_box(random_, bounds, random_.real(0.1, 1));
      const Box there = random_box(random_, bounds, random_.real(0.1, 1));
      const std::vector<PitMark> first = kept(seen(marks, here, apart), there);
      const std::vector<PitMark> second = kept(seen(marks, there, apart), here);
      EXPECT_TRUE(std::equal(first.begin(), first.end(), second.begin(), second.end(), same_pit));
    }
  }
}

// Said without the cells: whatever is left out has a more telling mark within a cell's diagonal, and nowhere are there more marks than cells that
// measure apart_m both ways.
TEST_P(RandomMapMarks, TheMostTellingOfEachCrowdIsThere) {
  for (int round = rounds(20); round > 0; --round) {
    const SurveyModel model = random_model(random_, GetParam(), 30, 600);
    const MapMarks marks(model);
    const Lattice& lattice = model.survey().ground().frame.lattice();
    for (int look = 0; look < 8; ++look) {
      const double apart = random_.real(1.01, 12) * lattice.spacing_m;
      const std::vector<PitMark> shown = seen(marks, kEverywhere, apart);
      const double longest = 2 * apart * lattice.spacing_m / lattice.row_distance_m();
      for (const PitMark& pit : marks.marked()) {
        EXPECT_TRUE(std::any_of(shown.begin(), shown.end(), [&](const PitMark& other) {
          return !more_telling(pit, other) && distance_m(pit.place, other.place) <= std::sqrt(2) * longest;
        }));
      }
      for (const PitMark& pit : shown) {
        const Along middle = lattice.along(pit.place);
        const auto crowd = std::count_if(shown.begin(), shown.end(), [&](const PitMark& other) {
          const Along place = lattice.along(other.place);
          return std::abs(place.u - middle.u) < apart / 2 && std::abs(place.v - middle.v) < apart / 2;
        });
        EXPECT_LE(crowd, 4);  // a square as large as the least cell meets at most four
      }
    }
    EXPECT_LE(seen(marks, kEverywhere, kEverywhere_m).size(), 4U);
    EXPECT_TRUE(same_pit(seen(marks, kEverywhere, kEverywhere_m)[0], sorted(marks.marked())[0]));
  }
}

TEST_P(RandomMapMarks, PlainNodesAreTheFramesNodesInTheBox) {
  for (int round = rounds(20); round > 0; --round) {
    const SurveyModel model = random_model(random_, GetParam(), 30, 600);
    const Frame& frame = model.survey().ground().frame;
    const Box bounds = node_bounds(model);
    for (int look = 0; look < 20; ++look) {
      const Box box = random_box(random_, bounds, random_.real(0.02, 1.5));
      constexpr double kEdge = kBoundaryTolerance_m;
      const Box with_edge{{box.low.x - kEdge, box.low.y - kEdge}, {box.high.x + kEdge, box.high.y + kEdge}};
      std::vector<NodeId> expected;
      for (NodeId id = 0; id < frame.size(); ++id) {
        if (box_holds(with_edge, frame.ground(id))) expected.push_back(id);
      }
      std::vector<NodeId> found{kNoNode};
      EXPECT_TRUE(plain_nodes(model, box, expected.size(), &found));
      EXPECT_EQ(found, expected);
      if (expected.empty()) continue;
      EXPECT_FALSE(plain_nodes(model, box, expected.size() - 1, &found));
      EXPECT_TRUE(found.empty());
    }
  }
}

TEST(MapMarks, PlainNodesOnTheBoxsEdgeCount) {
  const SurveyModel model = drawn_model({"....", "....", "...."});
  std::vector<NodeId> found;
  EXPECT_TRUE(plain_nodes(model, {{10, 0}, {20, 10}}, 100, &found));
  EXPECT_EQ(found, (std::vector<NodeId>{1, 2, 5, 6}));
  EXPECT_TRUE(plain_nodes(model, {{100, 100}, {200, 200}}, 100, &found));
  EXPECT_TRUE(found.empty());
}

TEST(MapMarks, AMillionNodesThinOut) {
  const SurveyModel model = large_model(1000, 37, 70000, 10000);
  ASSERT_EQ(model.survey().ground().frame.size(), 1000000);
  const MapMarks marks(model);
  EXPECT_GE(model.survey().dig_list().due().size(), 60000U);
  EXPECT_EQ(marks.marked().size(), model.survey().dig_list().due().size() + 10000);
  const Box bounds = node_bounds(model);
  // At 20 m a pixel and 8 px apart the cells measure 160 m: 63 by 63 of them.
  const std::vector<PitMark> shown = seen(marks, bounds, 160);
  EXPECT_LE(shown.size(), 63U * 63U);
  EXPECT_GE(shown.size(), 62U * 62U);
  // Each of its thousand positives is in a cell that shows a positive.
  const auto positives =
      std::count_if(shown.begin(), shown.end(), [](const PitMark& pit) { return pit.mark == Mark::kPositive; });
  EXPECT_GT(positives, 700);
  EXPECT_LE(positives, 1000);
  const Point middle{(bounds.low.x + bounds.high.x) / 2, (bounds.low.y + bounds.high.y) / 2};
  const Box near{{middle.x - 100, middle.y - 100}, {middle.x + 100, middle.y + 100}};
  const std::vector<PitMark> here = sorted(kept(marks.marked(), near));
  const std::vector<PitMark> close = seen(marks, near, 1);
  EXPECT_TRUE(std::equal(close.begin(), close.end(), here.begin(), here.end(), same_pit));
}

}  // namespace
}  // namespace nearpit::ui
