#include "survey/confinement.h"

#include <gtest/gtest.h>

#include "support/drawn_survey.h"

// Drawings keep their lines.
// clang-format off
namespace nearpit {
namespace {

struct Pictured {
  Frame frame;
  Areas areas;

  explicit Pictured(const Picture& letters) : frame(drawn_frame(letters)), areas(drawn_areas(frame, letters)) {}
  char letter(const Picture& letters, NodeId id) const {
    const Node node = frame.node(id);
    return letters[static_cast<std::size_t>(node.row - 1)][static_cast<std::size_t>(node.column - 1)];
  }
  // Pairs of the same letter are allowed, both ways, and no others.
  void expect_parts(const Confinement& confinement, const Picture& letters) const {
    for (NodeId from = 0; from < frame.size(); ++from) {
      for (NodeId to = 0; to < frame.size(); ++to) {
        EXPECT_EQ(confinement.allows(frame, areas, from, to), letter(letters, from) == letter(letters, to)) << from << ' ' << to;
      }
    }
  }
};

TEST(Confinement, NoneAllowsEveryPair) {
  const Picture letters{"AB",
                        "CD"};
  Pictured(letters).expect_parts({}, {"AA",
                                      "AA"});
}

TEST(Confinement, BlocksAreCountedFromRowAndColumnOne) {
  const Picture letters{"AAABBBC",
                        "AAABBBC",
                        "DDDEEEF"};
  Pictured(letters).expect_parts({Confinement::Kind::kBlock, 3, 2}, letters);
}

TEST(Confinement, BlocksAreTheSameWhenTheirCornerIsNotInTheFrame) {
  const Picture letters{"    BBC",
                        "  ABBBC",
                        " DD EE "};
  Pictured(letters).expect_parts({Confinement::Kind::kBlock, 3, 2}, letters);
}

TEST(Confinement, ABlockOfOnePitAllowsOnlyItself) {
  const Picture letters{"AB",
                        "CD"};
  Pictured(letters).expect_parts({Confinement::Kind::kBlock, 1, 1}, letters);
}

TEST(Confinement, AreasOfAnyShape) {
  const Picture letters{"AABB",
                        "ACCB",
                        "AABA"};
  Pictured(letters).expect_parts({Confinement::Kind::kArea}, letters);
}

}  // namespace
}  // namespace nearpit
