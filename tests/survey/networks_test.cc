#include "survey/networks.h"

#include <gtest/gtest.h>

#include <map>

#include "support/drawn_survey.h"

// Drawings keep their lines.
// clang-format off
namespace nearpit {
namespace {

// Networks as letters in their order; `?` is an open pit of any.
Picture drawn_networks(const Survey& survey) {
  const Frame& frame = survey.ground().frame;
  std::map<NodeId, char> mark;
  char letter = 'A';
  for (const Network& network : find_networks(survey.dig_list())) {
    for (const NodeId id : network.open) mark.emplace(id, '?');
    for (const NodeId id : network.nodes) mark[id] = letter;
    ++letter;
  }
  Picture picture(static_cast<std::size_t>(frame.node(frame.size() - 1).row));
  for (NodeId id = 0; id < frame.size(); ++id) {
    const Node node = frame.node(id);
    std::string& line = picture[static_cast<std::size_t>(node.row - 1)];
    line.resize(static_cast<std::size_t>(node.column), ' ');
    line.back() = mark.count(id) != 0 ? mark[id] : '.';
  }
  return picture;
}

TEST(Networks, NoneWithoutPositives) { EXPECT_TRUE(find_networks(drawn_survey({"o=-."}).dig_list()).empty()); }

TEST(Networks, ASinglePositiveIsOne) {
  EXPECT_EQ(drawn_networks(drawn_survey({"---",
                                         "-@-",
                                         "---"})),
            (Picture{"...",
                     ".A.",
                     "..."}));
}

TEST(Networks, DiagonalsJoinWithEightButNotWithFour) {
  const Picture picture{"@---",
                        "-@--",
                        "--@@"};
  EXPECT_EQ(drawn_networks(drawn_survey(picture)), (Picture{"A...",
                                                            ".A..",
                                                            "..AA"}));
  EXPECT_EQ(drawn_networks(drawn_survey(picture, {.neighbours = NeighbourRule::kFour})), (Picture{"A...",
                                                                                                  ".B..",
                                                                                                  "..CC"}));
}

TEST(Networks, InTheOrderOfTheirFirstNode) {
  EXPECT_EQ(drawn_networks(drawn_survey({"--@-@",
                                         "@---#",
                                         "#---#"}, {.neighbours = NeighbourRule::kFour})),
            (Picture{"..A.B",
                     "C...B",
                     "C...B"}));
}

TEST(Networks, TwoStepsJoinOverAGap) {
  EXPECT_EQ(drawn_networks(drawn_survey({"@-#--#"}, {.neighbours = NeighbourRule::kFourByTwo})), (Picture{"A.A..."}));
}

TEST(Networks, JudgementPositivesAreInNone) {
  EXPECT_EQ(drawn_networks(drawn_survey({"@-.##"}, {.neighbours = NeighbourRule::kFour})), (Picture{"A...."}));
}

TEST(Networks, OpenWhileAPitBesideItIsDue) {
  EXPECT_EQ(drawn_networks(drawn_survey({"-...-",
                                         ".@#g-",
                                         "--a.."})),
            (Picture{".???.",
                     "?AA..",
                     "...?."}));
}

TEST(Networks, HaltedPitsKeepItOpenAndClosedOnesDoNot) {
  Survey survey = drawn_survey({".@."}, {.neighbours = NeighbourRule::kFour});
  survey.set_stop_work("s", {{0, 0}, 1, "bones", false});
  ClosedArea closed;
  closed.reason = NotDugReason::kNoPermission;
  closed.polygon = {{{{15, -5}, {25, -5}, {25, 5}, {15, 5}}, {}}};
  survey.set_closed_area("c", closed);
  const std::vector<Network> networks = find_networks(survey.dig_list());
  ASSERT_EQ(networks.size(), 1U);
  EXPECT_EQ(networks[0].open, (std::vector<NodeId>{0}));
}

TEST(Networks, CutAtTheEdgeOfABlock) {
  const Picture picture{"@##--@",
                        "------"};
  const std::vector<Network> networks =
      find_networks(drawn_survey(picture, {.confinement = {Confinement::Kind::kBlock, 2, 2}}).dig_list());
  ASSERT_EQ(networks.size(), 2U);
  EXPECT_EQ(networks[0].nodes, (std::vector<NodeId>{0, 1}));
  EXPECT_TRUE(networks[0].cut_at_edge);
  EXPECT_EQ(networks[1].nodes, (std::vector<NodeId>{5}));
  EXPECT_FALSE(networks[1].cut_at_edge);
}

// Two first-sample positives side by side in two blocks: two clusters.
TEST(Networks, ConfinementPartsWhatLiesSideBySide) {
  EXPECT_EQ(drawn_networks(drawn_survey({"-@@-"}, {.confinement = {Confinement::Kind::kBlock, 2, 1}})), (Picture{".AB."}));
}

TEST(Networks, WithARingLimitThePartThatWasDug) {
  DrawnRules rules{.neighbours = NeighbourRule::kFour};
  rules.ring_limit = 1;
  EXPECT_EQ(drawn_networks(drawn_survey({"-@##-@"}, rules)), (Picture{".AA..B"}));
}

}  // namespace
}  // namespace nearpit
