#include "survey/pit_record.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <map>
#include <set>
#include <string>

namespace nearpit {
namespace {

using testing::HasSubstr;

// Frozen: survey files hold these words.
const std::map<NotDugReason, std::string> kNotDugWords{{NotDugReason::kStandingWater, "standing_water"},
                                                       {NotDugReason::kSlope, "slope"},
                                                       {NotDugReason::kPaved, "paved"},
                                                       {NotDugReason::kDisturbed, "disturbed"},
                                                       {NotDugReason::kBareGround, "bare_ground"},
                                                       {NotDugReason::kStructure, "structure"},
                                                       {NotDugReason::kNoPermission, "no_permission"},
                                                       {NotDugReason::kUtility, "utility"},
                                                       {NotDugReason::kHazard, "hazard"},
                                                       {NotDugReason::kStopWork, "stop_work"},
                                                       {NotDugReason::kOther, "other"}};
const std::map<StopReason, std::string> kStopWords{{StopReason::kSterileSubsoil, "sterile_subsoil"},
                                                   {StopReason::kBedrock, "bedrock"},
                                                   {StopReason::kImpenetrable, "impenetrable"},
                                                   {StopReason::kWaterTable, "water_table"},
                                                   {StopReason::kMaxDepth, "max_depth"},
                                                   {StopReason::kRoots, "roots"},
                                                   {StopReason::kDisturbanceFill, "disturbance_fill"},
                                                   {StopReason::kHumanRemainsStop, "human_remains_stop"},
                                                   {StopReason::kFeatureFound, "feature_found"},
                                                   {StopReason::kUxoStop, "uxo_stop"},
                                                   {StopReason::kUtilityStop, "utility_stop"},
                                                   {StopReason::kOther, "other"}};
const std::map<PitStatus, std::string> kStatusWords{
    {PitStatus::kDug, "dug"}, {PitStatus::kNotDug, "not_dug"}, {PitStatus::kWithdrawn, "withdrawn"}};
const std::map<ChosenBy, std::string> kChosenWords{
    {ChosenBy::kDesign, "design"}, {ChosenBy::kJudgement, "judgement"}, {ChosenBy::kAsked, "asked"}};

// Each value's word, read back to the value, and named among the legal ones.
template <class Value, class Read>
void expect_words(const std::map<Value, std::string>& words, Read read, const std::string& all) {
  for (const auto& [value, expected] : words) {
    EXPECT_EQ(word(value), expected);
    EXPECT_EQ(read(expected), value);
    EXPECT_THAT(all, HasSubstr(expected));
    EXPECT_EQ(read(expected + " "), std::nullopt);
    EXPECT_EQ(read(expected.substr(1)), std::nullopt);
  }
  EXPECT_EQ(read(""), std::nullopt);
  EXPECT_EQ(read("Dug"), std::nullopt);
  EXPECT_EQ(read("out_of_time"), std::nullopt);
}

TEST(PitRecord, Words) {
  expect_words(kStatusWords, pit_status_of, all_pit_statuses());
  expect_words(kNotDugWords, not_dug_reason_of, all_not_dug_reasons());
  expect_words(kStopWords, stop_reason_of, all_stop_reasons());
  expect_words(kChosenWords, chosen_by_of, all_chosen_by());
  EXPECT_EQ(word(ChosenBy::kUnsaid), "");
}

TEST(PitRecord, TheListsOfWordsAreLists) {
  EXPECT_EQ(all_pit_statuses(), "dug, not_dug, withdrawn");
  EXPECT_EQ(all_chosen_by(), "design, judgement, asked");
}

TEST(PitRecord, ReasonsAreGroundOrAccess) {
  const std::set<NotDugReason> ground{NotDugReason::kStandingWater, NotDugReason::kSlope,
                                      NotDugReason::kPaved,         NotDugReason::kDisturbed,
                                      NotDugReason::kBareGround,    NotDugReason::kStructure};
  for (const auto& [reason, text] : kNotDugWords) {
    EXPECT_EQ(class_of(reason), ground.count(reason) != 0 ? ReasonClass::kGround : ReasonClass::kAccess) << text;
  }
}

TEST(PitRecord, EqualWhenEveryFieldIs) {
  PitRecord record;
  EXPECT_EQ(record, PitRecord{});
  record.note = "roots";
  EXPECT_FALSE(record == PitRecord{});
}

}  // namespace
}  // namespace nearpit
