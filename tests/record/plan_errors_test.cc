// Plans that must be refused, each with its exact lines, from a table (bad_plans.json); and the published schema held
// against the reader over the same table.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>
#include <map>
#include <set>
#include <string>
#include <vector>

#include "record/json_text.h"
#include "record/plan.h"
#include "record/plan_keys.h"
#include "record/refusal_table.h"
#include "record/schema_check.h"

namespace nearpit {
namespace {

const RefusalTable& table() {
  static const RefusalTable kTable("tests/record/bad_plans.json");
  return kTable;
}

TEST(PlanErrors, TheUnchangedPlanIsAccepted) {
  const auto plan = read_plan(table().base(), "plan.json");
  EXPECT_TRUE(plan.ok()) << plan.error().one_line();
}

TEST(PlanErrors, EachChangeIsRefusedWithItsLines) {
  ASSERT_GE(table().cases().size(), 130u);
  for (const Refusal& refusal : table().cases()) {
    const auto plan = read_plan(refusal.text, "plan.json");
    ASSERT_FALSE(plan.ok()) << refusal.text;
    EXPECT_EQ(plan.error().kind, ErrorKind::kBadInput);
    EXPECT_EQ(plan.error().lines, refusal.lines);
  }
}

TEST(PlanErrors, EveryKeyOfThePlanHasABadValueInTheTable) {
  std::set<std::string> named;
  for (const Refusal& refusal : table().cases()) {
    for (const std::string& line : refusal.lines) {
      std::string field;
      for (const char c : line.substr(line.find(": ") + 2)) {
        if (c == ':') break;
        field += c;
      }
      named.insert(field.substr(0, field.find('.')));
    }
  }
  for (const std::string_view key : plan_keys(""))
    EXPECT_TRUE(named.contains(std::string(key))) << key;
}

TEST(PlanErrors, TheSchemaKnowsTheSameKeysAsTheReader) {
  std::map<std::string, std::set<std::string>> keys;
  for (const KeysOfObject& object : all_plan_keys())
    keys[std::string(object.where)] = {object.keys.begin(), object.keys.end()};
  EXPECT_EQ(SchemaCheck(file_json("schema/plan.schema.json")).keys(), keys);
}

TEST(PlanErrors, TheSchemaNamesTheSameRecordFieldsAsTheReader) {
  const auto schema = file_json("schema/plan.schema.json");
  const std::vector<std::string> known(record_field_names().begin(), record_field_names().end());
  EXPECT_EQ(schema["$defs"]["fields"]["items"]["enum"].get<std::vector<std::string>>(), known);
}

TEST(PlanErrors, TheSchemaRefusesTheSamePlansWhereASchemaCan) {
  SchemaCheck schema(file_json("schema/plan.schema.json"));
  EXPECT_TRUE(schema.accepts(nlohmann::json::parse(table().base())));
  for (const Refusal& refusal : table().cases()) {
    EXPECT_EQ(schema.accepts(nlohmann::json::parse(refusal.text)), refusal.schema_accepts) << refusal.text;
  }
  EXPECT_THAT(schema.unknown_keywords(), testing::IsEmpty());
}

TEST(PlanErrors, LinesComeInTheOrderOfTheFile) {
  const auto plan = read_plan("{\n\"survey\": 1,\n\"order\": 2,\n\"crs\": 3,\n\"labels\": 4}", "p.json");
  ASSERT_FALSE(plan.ok());
  std::vector<std::string> starts;
  for (const std::string& line : plan.error().lines)
    starts.push_back(line.substr(0, line.find(": ")));
  EXPECT_TRUE(std::is_sorted(starts.begin(), starts.end())) << testing::PrintToString(starts);
  EXPECT_EQ(starts.size(), 10u);
}

TEST(PlanErrors, WhatIsNotAPlanIsRefused) {
  for (const char* text : {"", "[]", "7", "null", "{", "{}"})
    EXPECT_FALSE(read_plan(text, "p.json").ok()) << text;
}

TEST(PlanErrors, ThousandsOfUnknownKeysGiveFewLines) {
  std::string text = "{";
  for (int i = 0; i < 5000; ++i)
    text += "\"k" + std::to_string(i) + "\": 1,";
  const auto plan = read_plan(text + "\"survey\": \"x\"}", "p.json");
  ASSERT_FALSE(plan.ok());
  EXPECT_LT(plan.error().lines.size(), 40u);
}

}  // namespace
}  // namespace nearpit
