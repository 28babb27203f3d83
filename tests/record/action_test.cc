#include "record/action.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <string>

#include "record/action_keys.h"
#include "record/refusal_table.h"
#include "record/schema_check.h"

namespace nearpit {
namespace {

// Reads actions that must be good, by the schema too.
std::vector<Action> read(const std::string& text) {
  auto actions = read_actions(text, "a.json");
  EXPECT_TRUE(actions.ok()) << actions.error().one_line();
  EXPECT_TRUE(SchemaCheck(file_json("schema/action.schema.json")).accepts(nlohmann::json::parse(text))) << text;
  return actions ? std::move(actions).value() : std::vector<Action>();
}

TEST(Action, OneActionNeedsNoList) {
  const auto actions = read(R"({"action":"withdraw","by":"A. Reyes","why":"wrong bag","pit":"T1-1"})");
  ASSERT_EQ(actions.size(), 1u);
  EXPECT_EQ(std::get<WithdrawPit>(actions[0].what).pit, "T1-1");
  EXPECT_EQ(actions[0].by, "A. Reyes");
  EXPECT_EQ(actions[0].why, "wrong bag");
  EXPECT_EQ(actions[0].origin.place, "a.json");
  EXPECT_EQ(actions[0].origin.line, 1);
}

TEST(Action, AListKeepsItsOrderAndLines) {
  const auto actions = read(R"([
{"action":"belongs_to","by":"B","why":"next pit","pit":"T1-1","other":"J1"},
{"action":"ask_neighbours","by":"B","why":"a rim","pit":"J1"},

{"action":"close_area","by":"B","reason":"slope","rows":[7,3]},
{"action":"close_area","by":"B","area":"pond","reason":"other","why":"cattle",
 "polygon":{"type":"Polygon","coordinates":[[[0,0],[9,0],[9,9],[0,0]]]}},
{"action":"reopen_area","by":"B","why":"dry","area":"pond"}
])");
  ASSERT_EQ(actions.size(), 5u);
  EXPECT_EQ(std::get<BelongsTo>(actions[0].what).other, "J1");
  EXPECT_EQ(std::get<AskNeighbours>(actions[1].what).pit, "J1");
  const auto& rows = std::get<CloseArea>(actions[2].what);
  EXPECT_EQ(rows.rows, (std::vector<std::int32_t>{3, 7}));
  EXPECT_EQ(rows.name, "");
  EXPECT_EQ(rows.reason, NotDugReason::kSlope);
  EXPECT_TRUE(rows.polygon.empty());
  const auto& pond = std::get<CloseArea>(actions[3].what);
  EXPECT_EQ(pond.name, "pond");
  EXPECT_EQ(pond.polygon.size(), 1u);
  EXPECT_TRUE(pond.rows.empty());
  EXPECT_EQ(pond.reason, NotDugReason::kOther);
  EXPECT_EQ(actions[3].why, "cattle");
  EXPECT_EQ(std::get<ReopenArea>(actions[4].what).area, "pond");
  std::vector<int> lines;
  for (const Action& action : actions)
    lines.push_back(action.origin.line);
  EXPECT_EQ(lines, (std::vector<int>{2, 3, 5, 6, 8}));
}

TEST(Action, EachChangeOfTheTableIsRefusedWithItsLines) {
  const RefusalTable table("tests/record/bad_actions.json");
  EXPECT_EQ(read(table.base()).size(), 2u);
  ASSERT_GE(table.cases().size(), 35u);
  SchemaCheck schema(file_json("schema/action.schema.json"));
  for (const Refusal& refusal : table.cases()) {
    const auto actions = read_actions(refusal.text, "a.json");
    ASSERT_FALSE(actions.ok()) << refusal.text;
    EXPECT_EQ(actions.error().lines, refusal.lines);
    EXPECT_EQ(schema.accepts(nlohmann::json::parse(refusal.text)), refusal.schema_accepts) << refusal.text;
  }
  EXPECT_THAT(schema.unknown_keywords(), testing::IsEmpty());
}

TEST(Action, TheSchemaKnowsTheSameWordsAndKeysAsTheReader) {
  const auto schema = file_json("schema/action.schema.json");
  const auto& variants = schema["$defs"]["action"]["oneOf"];
  ASSERT_EQ(variants.size(), action_words().size());
  for (std::size_t i = 0; i < variants.size(); ++i) {
    const std::string word(action_words()[i]);
    EXPECT_EQ(variants[i]["$ref"], "#/$defs/" + word);
    const auto& properties = schema["$defs"][word]["properties"];
    EXPECT_EQ(properties["action"]["const"], word);
    std::set<std::string> keys;
    for (const auto& [key, value] : properties.items())
      keys.insert(key);
    EXPECT_EQ(keys, std::set<std::string>(action_keys(word).begin(), action_keys(word).end())) << word;
  }
}

TEST(Action, TheSchemaNamesTheSameReasonsAsTheRecord) {
  const auto schema = file_json("schema/action.schema.json");
  const auto& reasons = schema["$defs"]["close_area"]["properties"]["reason"]["enum"];
  ASSERT_EQ(reasons.size(), static_cast<std::size_t>(NotDugReason::kOther) + 1);
  for (std::size_t i = 0; i < reasons.size(); ++i)
    EXPECT_EQ(reasons[i], word(static_cast<NotDugReason>(i)));
}

TEST(Action, WhatIsNotJsonIsRefusedWithItsLine) {
  const auto actions = read_actions("[\n{\"action\": \"withdraw\",}\n]", "a.json");
  ASSERT_FALSE(actions.ok());
  EXPECT_EQ(actions.error().one_line(), "a.json:2: not JSON: a ',' stands before '}'; take it out");
}

}  // namespace
}  // namespace nearpit
