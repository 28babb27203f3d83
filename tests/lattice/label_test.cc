#include "lattice/label.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cctype>
#include <cmath>

#include "support/random_ground.h"

namespace nearpit {
namespace {

Labels grid_labels(Lattice lattice, Point datum) { return {LabelKind::kGrid, lattice, datum}; }

std::string lower(std::string text) {
  std::transform(text.begin(), text.end(), text.begin(),
                 [](unsigned char c) { return static_cast<char>(std::tolower(c)); });
  return text;
}

TEST(Label, TransectLabels) {
  const Labels labels{LabelKind::kTransect, Lattice{}, {}};
  EXPECT_EQ(labels.write({7, 12}), "T7-12");
  EXPECT_EQ(transect_label({7, 12}), "T7-12");
  EXPECT_EQ(labels.read("T7-12"), (Node{7, 12}));
  EXPECT_EQ(labels.read("t7-12"), (Node{7, 12}));
}

TEST(Label, GridLabelsAreMetresFromTheDatum) {
  const Labels labels = grid_labels({LatticeKind::kSquare, 7.5, {100, 200}}, {100, 200});
  EXPECT_EQ(labels.write({1, 1}), "N0 E0");
  EXPECT_EQ(labels.write({3, 7}), "N15 E45");
  EXPECT_EQ(labels.write({2, 2}), "N7.5 E7.5");
  EXPECT_EQ(labels.read("N7.5 E7.5"), (Node{2, 2}));
  EXPECT_EQ(labels.read("N7.50 E7.50"), (Node{2, 2}));
}

TEST(Label, SouthAndWestBelowZero) {
  const Labels labels = grid_labels({LatticeKind::kSquare, 10, {0, 0}}, {50, 30});
  EXPECT_EQ(labels.write({1, 1}), "S30 W50");
  EXPECT_EQ(labels.write({4, 1}), "N0 W50");
  EXPECT_EQ(labels.write({1, 6}), "S30 E0");
  EXPECT_EQ(labels.write({5, 7}), "N10 E10");
  EXPECT_EQ(labels.read("S30 W50"), (Node{1, 1}));
  EXPECT_EQ(labels.read("s30 w50"), (Node{1, 1}));
  EXPECT_EQ(labels.read("S0 W0"), (Node{4, 6}));
}

TEST(Label, GridLabelsRunAlongTheTurnedAxes) {
  const Labels labels = grid_labels({LatticeKind::kTriangular, 10, {1000, 1000}, 37}, {1000, 1000});
  EXPECT_EQ(labels.write({1, 3}), "N0 E20");
  EXPECT_EQ(labels.write({2, 1}), "N8.66 E5");
  EXPECT_EQ(labels.write({3, 1}), "N17.32 E0");
}

TEST(Label, NearlyZeroIsNeverMinusZero) {
  const Labels labels = grid_labels({LatticeKind::kSquare, 10, {0, 0}}, {0.001, 0.002});
  EXPECT_EQ(labels.write({1, 1}), "N0 E0");
}

// Whatever kind is written, both are read; also for nodes below row or column 1 in grid labels.
TEST(Label, WrittenIsRead) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(5000); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e7);
    const Point datum = random.chance(0.5) ? lattice.to_ground(Node{1, 1})
                                           : Point{lattice.origin.x + random.real(-500, 500),
                                                   lattice.origin.y + random.real(-500, 500)};
    const Labels grid = grid_labels(lattice, datum);
    const Labels transect{LabelKind::kTransect, lattice, datum};
    const Node anywhere{random.between(-400, 400), random.between(-400, 400)};
    const Node counted{random.between(1, 4000), random.between(1, 4000)};
    const std::string text = grid.write(anywhere);
    const auto maybe_lower = [&](const std::string& label) { return random.chance(0.5) ? lower(label) : label; };
    EXPECT_EQ(grid.read(maybe_lower(text)), anywhere) << text;
    EXPECT_EQ(transect.read(maybe_lower(text)), anywhere) << text;
    EXPECT_EQ(grid.read(maybe_lower(transect.write(counted))), counted);
    EXPECT_EQ(transect.read(maybe_lower(grid.write(counted))), counted);
    EXPECT_TRUE(Labels::looks_like_node(text)) << text;
    EXPECT_TRUE(Labels::looks_like_node(maybe_lower(transect.write(counted))));
  }
}

TEST(Label, GridLabelsOffTheNodesAreRefused) {
  const Labels labels = grid_labels({LatticeKind::kSquare, 10, {0, 0}}, {0, 0});
  EXPECT_EQ(labels.read("N10 E20"), (Node{2, 3}));
  EXPECT_EQ(labels.read("N10 E20.01"), std::nullopt);
  EXPECT_EQ(labels.read("N9.99 E20"), std::nullopt);
  EXPECT_EQ(labels.read("N5 E20"), std::nullopt);
}

TEST(Label, OtherTextIsNoNode) {
  const Labels labels = grid_labels({LatticeKind::kSquare, 10, {0, 0}}, {0, 0});
  for (const char* text : {"",
                           " ",
                           "T",
                           "T7",
                           "T7-",
                           "T-12",
                           "7-12",
                           "T7-12x",
                           "xT7-12",
                           "T7-12-1",
                           "T7.5-12",
                           "J1",
                           "N",
                           "N10",
                           "N10 ",
                           "N10 E",
                           "E20 N10",
                           "N10 E20 W3",
                           "N10 S20",
                           "N E20",
                           "N10 E2e1",
                           "N1e1 E20",
                           "Nnan E20",
                           "Ninf E20",
                           "N-10 E20",
                           "T99999999999-1",
                           "T1-99999999999999999999",
                           "N1e400 E0",
                           "N10,5 E20",
                           "N99999999999999999999 E0"}) {
    EXPECT_EQ(labels.read(text), std::nullopt) << "'" << text << "'";
  }
}

TEST(Label, FreeLabelsDoNotLookLikeNodes) {
  for (const char* text : {"J1", "j12", "trench 4", "T7", "by the spring", "N10", "X"}) {
    EXPECT_FALSE(Labels::looks_like_node(text)) << text;
  }
  for (const char* text : {"T7-12", "t7-12", "N10 E20", "s10 w20.5"})
    EXPECT_TRUE(Labels::looks_like_node(text)) << text;
}

}  // namespace
}  // namespace nearpit
