#include "survey/clusters.h"

#include <gtest/gtest.h>

#include "support/drawn_survey.h"

// Drawings keep their lines.
// clang-format off
namespace nearpit {
namespace {

PitRecord dug_at(const std::string& when, std::vector<std::uint32_t> counts) {
  PitRecord record = dug_record(0);
  record.dug_at = when;
  record.weights_g.assign(counts.size(), std::nullopt);
  record.counts = std::move(counts);
  return record;
}

TEST(Clusters, SumsFindsPitsAndGround) {
  Survey survey = drawn_survey({"oo..",
                                "....",
                                "...o"});
  survey.set_pit(node_at(survey, 1, 1), {head_of(dug_at("2026-05-05T09:00:00+01:00", {2, 7}))});
  survey.set_pit(node_at(survey, 1, 2), {head_of(dug_at("2026-05-04T16:00:00+01:00", {1, 0}))});
  survey.set_pit(node_at(survey, 2, 2), {head_of(dug_at("2026-05-06", {5, 1}))});
  survey.set_pit(node_at(survey, 3, 4), {head_of(dug_at("2026-05-04", {3, 0}))});
  const std::vector<Cluster> clusters = find_clusters(survey, 2);
  ASSERT_EQ(clusters.size(), 2U);
  EXPECT_EQ(clusters[0].finds, (std::vector<std::uint64_t>{8, 8}));
  EXPECT_EQ(clusters[0].network.nodes.size(), 3U);
  EXPECT_EQ(clusters[0].in_first_sample, 2U);
  EXPECT_DOUBLE_EQ(clusters[0].area_m2, 300);
  EXPECT_EQ(clusters[0].label, node_at(survey, 1, 2));
  EXPECT_FALSE(clusters[0].closed());
  EXPECT_EQ(clusters[1].label, node_at(survey, 3, 4));
  EXPECT_DOUBLE_EQ(clusters[1].area_m2, 100);
}

TEST(Clusters, DugAtTheSameTimeTheLowerRowThenColumnGivesTheLabel) {
  Survey survey = drawn_survey({".-.",
                                "-o."});
  for (const NodeId id : {node_at(survey, 1, 3), node_at(survey, 2, 2), node_at(survey, 1, 2)}) {
    survey.set_pit(id, {head_of(dug_at("2026-05-04T10:00:00Z", {1}), 9)});
  }
  EXPECT_EQ(find_clusters(survey, 1).at(0).label, node_at(survey, 1, 2));
}

// Half past ten at Greenwich is before ten o'clock one hour west of it.
TEST(Clusters, TheFirstDugIsFirstWhateverTheZone) {
  Survey survey = drawn_survey({"oo"});
  survey.set_pit(0, {head_of(dug_at("2026-05-04T10:00:00-01:00", {1}))});
  survey.set_pit(1, {head_of(dug_at("2026-05-04T10:30:00+00:00", {1}))});
  EXPECT_EQ(find_clusters(survey, 1).at(0).label, 1);
}

TEST(Clusters, ClosedWhenNothingBesideItIsOpen) {
  const std::vector<Cluster> clusters = find_clusters(drawn_survey({"-@-",
                                                                    "g-a"}), 1);
  ASSERT_EQ(clusters.size(), 1U);
  EXPECT_TRUE(clusters[0].closed());
}

}  // namespace
}  // namespace nearpit
