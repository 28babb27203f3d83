#include "record/record_json.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <string>

#include "record/json_text.h"

namespace nearpit {
namespace {

using testing::HasSubstr;

const std::vector<std::string> kFinds{"flaked stone", "pottery", "größe"};

PitRecord empty_record() {
  PitRecord record;
  record.counts.assign(3, 0);
  record.weights_g.assign(3, std::nullopt);
  return record;
}

PitRecord full_record() {
  PitRecord record = empty_record();
  record.crew = "crew A";
  record.started_at = "2026-05-04T10:00:00.000-04:00";
  record.dug_at = "2026-05-04T10:20:00.000-04:00";
  record.dug_at_defaulted = true;
  record.depth_cm = 42.5;
  record.stop = StopReason::kBedrock;
  record.chosen_by = ChosenBy::kJudgement;
  record.place = Point{12.25, -0.1};
  record.moved = "tree";
  record.mesh_mm = 6.35;
  record.backfilled = false;
  record.bag = "17";
  record.note = "first line\nsecond \"line\"";
  record.counts = {4, 0, 4294967295};
  record.weights_g = {0.1, std::nullopt, 0};
  record.opens_neighbours = true;
  return record;
}

void expect_round_trip(const PitRecord& record) {
  const std::string json = pit_record_json(record, "T1-2", kFinds);
  const auto back = pit_record_of(json, kFinds);
  ASSERT_TRUE(back.ok()) << back.error().one_line();
  EXPECT_EQ(*back, record) << json;
}

// The stored form is frozen: this text may only grow.
TEST(RecordJson, WritesTheFrozenForm) {
  EXPECT_EQ(pit_record_json(full_record(), "T1-2", kFinds),
            R"({"pit":"T1-2","status":"dug","crew":"crew A","started_at":"2026-05-04T10:00:00.000-04:00",)"
            R"("dug_at":"2026-05-04T10:20:00.000-04:00","dug_at_defaulted":true,"depth_cm":42.5,"stop":"bedrock",)"
            R"("chosen_by":"judgement","x":12.25,"y":-0.1,"moved":"tree","mesh_mm":6.35,"backfilled":false,"bag":"17",)"
            R"("note":"first line\nsecond \"line\"","finds":{"flaked stone":4,"pottery":0,"größe":4294967295},)"
            R"("weights_g":{"flaked stone":0.1,"größe":0.0},"opens_neighbours":true})");
}

TEST(RecordJson, LeavesOutWhatSaysNothing) {
  EXPECT_EQ(pit_record_json(empty_record(), "J1", kFinds),
            R"({"pit":"J1","status":"dug","finds":{"flaked stone":0,"pottery":0,"größe":0}})");
  PitRecord withdrawn = empty_record();
  withdrawn.status = PitStatus::kWithdrawn;
  EXPECT_EQ(pit_record_json(withdrawn, "J1", kFinds), R"({"pit":"J1","status":"withdrawn"})");
}

TEST(RecordJson, ReadsWhatItWrites) {
  expect_round_trip(empty_record());
  expect_round_trip(full_record());
  PitRecord dated = empty_record();
  dated.dug_at = "2026-05-04";
  dated.backfilled = true;
  expect_round_trip(dated);
}

TEST(RecordJson, ReadsEveryWord) {
  for (int i = 0; i <= static_cast<int>(NotDugReason::kOther); ++i) {
    PitRecord record = empty_record();
    record.status = PitStatus::kNotDug;
    record.reason = static_cast<NotDugReason>(i);
    expect_round_trip(record);
  }
  for (int i = 0; i <= static_cast<int>(StopReason::kOther); ++i) {
    PitRecord record = empty_record();
    record.stop = static_cast<StopReason>(i);
    expect_round_trip(record);
  }
  for (int i = 0; i <= static_cast<int>(ChosenBy::kAsked); ++i) {
    PitRecord record = empty_record();
    record.chosen_by = static_cast<ChosenBy>(i);
    expect_round_trip(record);
  }
  for (int i = 0; i <= static_cast<int>(PitStatus::kWithdrawn); ++i) {
    PitRecord record = empty_record();
    record.status = static_cast<PitStatus>(i);
    if (record.status == PitStatus::kNotDug) record.reason = NotDugReason::kSlope;
    expect_round_trip(record);
  }
}

TEST(RecordJson, PassesOverKeysOfLaterPrograms) {
  const auto record = pit_record_of(R"({"status":"dug","photos":[{"a":1}],"finds":{"pottery":2}})", kFinds);
  ASSERT_TRUE(record.ok());
  EXPECT_EQ(record->counts, (std::vector<std::uint32_t>{0, 2, 0}));
}

TEST(RecordJson, RefusesWhatItCannotKeep) {
  const std::pair<const char*, const char*> cases[] = {
      {"[]", "is not an object"},
      {"{", "not JSON"},
      {"{}", "status: missing"},
      {R"({"status":"eaten"})", "status: \"eaten\" is not known; legal: dug, not_dug, withdrawn"},
      {R"({"status":7})", "status: 7 is not a text"},
      {R"({"status":"not_dug"})", "reason: missing"},
      {R"({"status":"dug","reason":"slope"})", "reason: has no place"},
      {R"({"status":"not_dug","reason":"lunch"})", "reason: \"lunch\" is not known"},
      {R"({"status":"dug","stop":"lunch"})", "stop: \"lunch\" is not known"},
      {R"({"status":"dug","chosen_by":"dice"})", "chosen_by: \"dice\" is not known"},
      {R"({"status":"dug","depth_cm":-1})", "depth_cm: -1 is not a number from 0 to 1000"},
      {R"({"status":"dug","depth_cm":"40"})", "depth_cm: \"40\" is not"},
      {R"({"status":"dug","mesh_mm":0})", "mesh_mm: 0 is not a number above 0 and up to 100"},
      {R"({"status":"dug","x":1})", "y: missing"},
      {R"({"status":"dug","backfilled":"yes"})", "backfilled: \"yes\" is not true or false"},
      {R"({"status":"dug","dug_at":"yesterday"})", "dug_at: \"yesterday\" is not a date"},
      {R"({"status":"dug","finds":{"glass":1}})", "finds: \"glass\" is not a find of the plan"},
      {R"({"status":"dug","finds":{"pottery":-1}})", "finds.pottery: -1 is not a count"},
      {R"({"status":"dug","finds":{"pottery":1.5}})", "finds.pottery: 1.5 is not a count"},
      {R"({"status":"dug","finds":{"pottery":4294967296}})", "finds.pottery: 4294967296 is not a count"},
      {R"({"status":"dug","weights_g":{"pottery":-0.1}})", "weights_g.pottery: -0.1 is not"},
      {R"({"status":"withdrawn","finds":{"pottery":1}})", "finds: counts have no place"},
  };
  for (const auto& [json, what] : cases) {
    const auto record = pit_record_of(json, kFinds);
    ASSERT_FALSE(record.ok()) << json;
    EXPECT_EQ(record.error().kind, ErrorKind::kDamaged);
    EXPECT_THAT(record.error().one_line(), HasSubstr(what));
    EXPECT_THAT(record.error().one_line(), testing::StartsWith("pit record:"));
  }
}

TEST(RecordJson, ClosedAreasReadWhatTheyWrite) {
  ClosedArea rows;
  rows.name = "pond";
  rows.reason = NotDugReason::kStandingWater;
  rows.rows = {2, 3};
  rows.by = "A. Reyes";
  EXPECT_EQ(closed_area_json(rows), R"({"name":"pond","reason":"standing_water","rows":[2,3],"by":"A. Reyes"})");
  ClosedArea polygon;
  polygon.name = "closed area 1";
  polygon.reason = NotDugReason::kNoPermission;
  polygon.polygon = {{{{0, 0}, {5, 0}, {5, 5.5}}, {}}};
  polygon.open_again = true;
  for (const ClosedArea& area : {rows, polygon}) {
    const auto back = closed_area_of(closed_area_json(area));
    ASSERT_TRUE(back.ok()) << back.error().one_line();
    EXPECT_EQ(closed_area_json(*back), closed_area_json(area));
    EXPECT_EQ(back->rows, area.rows);
    EXPECT_EQ(back->polygon.size(), area.polygon.size());
    EXPECT_EQ(back->open_again, area.open_again);
    EXPECT_EQ(back->reason, area.reason);
  }
}

TEST(RecordJson, ClosedAreasWantAReasonAndGround) {
  for (const char* bad : {R"({"name":"a","rows":[1]})", R"({"name":"a","reason":"slope"})",
                          R"({"reason":"slope","rows":[0]})", R"({"reason":"slope","rows":[]})",
                          R"({"reason":"slope","polygon":{"type":"Point"}})", R"({"reason":"wet","rows":[1]})", "7"}) {
    const auto area = closed_area_of(bad);
    ASSERT_FALSE(area.ok()) << bad;
    EXPECT_THAT(area.error().one_line(), testing::StartsWith("closed area:"));
  }
}

TEST(RecordJson, StopWorksReadWhatTheyWrite) {
  StopWork stop;
  stop.place = {3.5, -2};
  stop.distance_m = 45;
  stop.reason = "a struck line";
  stop.lifted = true;
  EXPECT_EQ(stop_work_json(stop), R"({"x":3.5,"y":-2.0,"distance_m":45.0,"reason":"a struck line","lifted":true})");
  const auto back = stop_work_of(stop_work_json(stop));
  ASSERT_TRUE(back.ok());
  EXPECT_EQ(stop_work_json(*back), stop_work_json(stop));
  for (const char* bad : {R"({"x":1,"distance_m":5})", R"({"x":1,"y":2,"distance_m":0})", R"({"x":"1","y":2})", "[]"}) {
    EXPECT_FALSE(stop_work_of(bad).ok()) << bad;
  }
}

}  // namespace
}  // namespace nearpit
