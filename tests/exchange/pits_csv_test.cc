// Invented rows: shapes, words and limits only.
#include "exchange/pits_csv.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "support/test_random.h"

namespace nearpit {
namespace {

using testing::ElementsAre;
using testing::HasSubstr;
using testing::IsEmpty;
using testing::SizeIs;
using testing::StartsWith;

Plan plan_of(const std::string& zone = "UTC") {
  Plan plan;
  plan.finds = {"flaked stone", "pottery", "Глина"};
  plan.time_zone = zone;
  return plan;
}

std::vector<Action> actions_of(const std::string& text, const Plan& plan = plan_of()) {
  const auto actions = read_pits_csv(text, "P.csv", plan);
  EXPECT_TRUE(actions.ok()) << (actions.ok() ? "" : actions.error().one_line());
  return actions.ok() ? *actions : std::vector<Action>{};
}

RecordPit record_of(const std::string& text, const Plan& plan = plan_of()) {
  const auto actions = actions_of(text, plan);
  return actions.size() == 1 ? std::get<RecordPit>(actions.front().what) : RecordPit{};
}

std::vector<std::string> errors_of(const std::string& text, const Plan& plan = plan_of()) {
  const auto actions = read_pits_csv(text, "P.csv", plan);
  return actions.ok() ? std::vector<std::string>{} : actions.error().lines;
}

// The one value of a column, in a table of pit and that column.
std::vector<std::string> errors_in(const std::string& column, const std::string& cell) {
  return errors_of("pit," + column + "\nT1-1," + cell + "\n");
}

TEST(PitsCsv, EveryColumn) {
  const std::string text =
      "why,by,note,bag,backfilled,mesh_mm,moved,y,x,chosen_by,stop,depth_cm,dug_at,started_at,crew,reason,status,pit,"
      "find:pottery,weight:pottery\n"
      "late,Ana,\" two lines\nhere "
      "\",17,yes,6.4,root,20.5,10.25,judgement,bedrock,41.5,2026-05-04T10:20Z,2026-05-04T10:00Z,A,,"
      "dug,T7-12,3,12.5\n";
  const auto actions = actions_of(text);
  ASSERT_THAT(actions, SizeIs(1));
  EXPECT_EQ(actions[0].by, "Ana");
  EXPECT_EQ(actions[0].why, "late");
  EXPECT_EQ(actions[0].origin.place, "P.csv");
  EXPECT_EQ(actions[0].origin.line, 2);
  const auto& record = std::get<RecordPit>(actions[0].what);
  EXPECT_EQ(record.pit, "T7-12");
  EXPECT_EQ(record.status.value(), PitStatus::kDug);
  EXPECT_EQ(record.reason.value(), std::nullopt);
  EXPECT_EQ(record.crew.value(), "A");
  EXPECT_EQ(record.started_at.value(), "2026-05-04T10:00:00.000+00:00");
  EXPECT_EQ(record.dug_at.value(), "2026-05-04T10:20:00.000+00:00");
  EXPECT_EQ(record.depth_cm.value(), 41.5);
  EXPECT_EQ(record.stop.value(), StopReason::kBedrock);
  EXPECT_EQ(record.chosen_by.value(), ChosenBy::kJudgement);
  EXPECT_EQ(record.x.value(), 10.25);
  EXPECT_EQ(record.y.value(), 20.5);
  EXPECT_EQ(record.moved.value(), "root");
  EXPECT_EQ(record.mesh_mm.value(), 6.4);
  EXPECT_EQ(record.backfilled.value(), true);
  EXPECT_EQ(record.bag.value(), "17");
  EXPECT_EQ(record.note.value(), " two lines\nhere ");
  EXPECT_THAT(record.counts, ElementsAre(std::pair(std::size_t{1}, std::optional<std::uint32_t>(3))));
  EXPECT_THAT(record.weights_g, ElementsAre(std::pair(std::size_t{1}, std::optional<double>(12.5))));
}

TEST(PitsCsv, AnAbsentColumnSaysNothing) {
  const RecordPit record = record_of("pit\nT1-1\n");
  EXPECT_EQ(record.pit, "T1-1");
  EXPECT_FALSE(record.status || record.reason || record.crew || record.started_at || record.dug_at || record.depth_cm ||
               record.stop || record.chosen_by || record.x || record.y || record.moved || record.mesh_mm ||
               record.backfilled || record.bag || record.note);
  EXPECT_THAT(record.counts, IsEmpty());
  EXPECT_THAT(record.weights_g, IsEmpty());
}

TEST(PitsCsv, AnEmptyCellClears) {
  const RecordPit record = record_of(
      "pit,status,reason,crew,started_at,dug_at,depth_cm,stop,chosen_by,x,y,moved,mesh_mm,backfilled,bag,note,find:"
      "pottery,"
      "weight:pottery\nT1-1,,,,,,,,,,,,,, ,\"  \",,\n");
  EXPECT_TRUE(record.status && !*record.status);
  EXPECT_TRUE(record.reason && !*record.reason);
  EXPECT_TRUE(record.crew && !*record.crew);
  EXPECT_TRUE(record.started_at && !*record.started_at);
  EXPECT_TRUE(record.dug_at && !*record.dug_at);
  EXPECT_TRUE(record.depth_cm && !*record.depth_cm);
  EXPECT_TRUE(record.stop && !*record.stop);
  EXPECT_TRUE(record.chosen_by && !*record.chosen_by);
  EXPECT_TRUE(record.x && !*record.x);
  EXPECT_TRUE(record.y && !*record.y);
  EXPECT_TRUE(record.moved && !*record.moved);
  EXPECT_TRUE(record.mesh_mm && !*record.mesh_mm);
  EXPECT_TRUE(record.backfilled && !*record.backfilled);
  EXPECT_TRUE(record.bag && !*record.bag);
  EXPECT_TRUE(record.note && !*record.note);
  EXPECT_EQ(record.counts.at(1), std::nullopt);
  EXPECT_EQ(record.weights_g.at(1), std::nullopt);
}

TEST(PitsCsv, SpacesRoundLabelsWordsAndNumbersDoNotCount) {
  const RecordPit record = record_of(" pit ,status,crew,depth_cm,find: pottery \n T1-1 ,\tdug , Ana B ,\" 40 \", 2\n");
  EXPECT_EQ(record.pit, "T1-1");
  EXPECT_EQ(record.status.value(), PitStatus::kDug);
  EXPECT_EQ(record.crew.value(), "Ana B");
  EXPECT_EQ(record.depth_cm.value(), 40);
  EXPECT_EQ(record.counts.at(1), 2u);
}

TEST(PitsCsv, RowsInOrderWithTheirLines) {
  const auto actions = actions_of("pit,note\r\n\r\nT1-1,\"a\r\nb\"\r\nT1-2,c\r\n");
  ASSERT_THAT(actions, SizeIs(2));
  EXPECT_EQ(actions[0].origin.line, 3);
  EXPECT_EQ(actions[1].origin.line, 5);
  EXPECT_EQ(std::get<RecordPit>(actions[0].what).note.value(), "a\nb") << "CR LF in a note becomes LF";
}

TEST(PitsCsv, ColumnsThatAreNone) {
  EXPECT_THAT(
      errors_of("pit,statsu\nT1-1,dug\n"),
      ElementsAre(
          "P.csv:1: \"statsu\" is no column; did you mean \"status\"? legal: pit, status, reason, crew, started_at, "
          "dug_at, depth_cm, stop, chosen_by, x, y, moved, mesh_mm, backfilled, bag, note, by, why, find:<name>, "
          "weight:<name>"));
  EXPECT_THAT(errors_of("pit,Depth\nT1-1,1\n"), ElementsAre(HasSubstr("did you mean \"depth_cm\"?")));
  EXPECT_THAT(errors_of("pit,Notes\nT1-1,1\n"), ElementsAre(HasSubstr("did you mean \"note\"?")));
  EXPECT_THAT(errors_of("pit,weather\nT1-1,1\n"), ElementsAre(HasSubstr("\"weather\" is no column; legal: pit")));
  EXPECT_THAT(errors_of("pit,note,\nT1-1,a,b\n"), ElementsAre(HasSubstr("P.csv:1: column 3 has no name")));
  EXPECT_THAT(errors_of("pit,note,note\nT1-1,a,b\n"),
              ElementsAre(HasSubstr("P.csv:1: note: stands twice, in columns 2 and 3")));
  EXPECT_THAT(errors_of("status\ndug\n"), ElementsAre(HasSubstr("P.csv:1: pit: missing")));
  EXPECT_THAT(errors_of("pit,x\nT1-1,\n"), ElementsAre(HasSubstr("P.csv:1: y: missing; x and y go together")));
}

TEST(PitsCsv, FindsAreThePlans) {
  EXPECT_THAT(errors_of("pit,find:bone\nT1-1,1\n"),
              ElementsAre("P.csv:1: find: \"bone\" is no find of the plan; legal: flaked stone, pottery, Глина"));
  EXPECT_THAT(errors_of("pit,weight:bone\nT1-1,1\n"), ElementsAre(StartsWith("P.csv:1: weight: \"bone\" is no find")));
  EXPECT_THAT(record_of("pit,find:Pottery,find:глина\nT1-1,1,2\n").counts, SizeIs(2)) << "finds differ ignoring case";
  EXPECT_THAT(errors_of("pit,find:pottery,find:POTTERY\nT1-1,1,2\n"),
              ElementsAre(HasSubstr("find:pottery: stands twice, in columns 2 and 3")));
}

TEST(PitsCsv, LabelsAreThereOnce) {
  EXPECT_THAT(errors_of("pit,note\n,a\n  ,b\n"),
              ElementsAre(StartsWith("P.csv:2: pit: is empty"), StartsWith("P.csv:3: ")));
  EXPECT_THAT(errors_of("pit,note\nT1-1,a\nT1-2,b\n t1-1,c\n"),
              ElementsAre("P.csv:4: pit: \"t1-1\" stands twice, first on line 2; keep one row for each pit"));
  EXPECT_THAT(errors_of("pit\n" + std::string(201, 'J') + "\n"), ElementsAre(HasSubstr("P.csv:2: pit: ")));
}

TEST(PitsCsv, Words) {
  EXPECT_THAT(errors_in("status", "digged"),
              ElementsAre("P.csv:2: status: \"digged\" is not known here; legal: dug, not_dug, withdrawn"));
  EXPECT_THAT(errors_in("chosen_by", "chance"), ElementsAre(HasSubstr("legal: design, judgement, asked")));
  EXPECT_THAT(errors_in("backfilled", "true"),
              ElementsAre(HasSubstr("backfilled: \"true\" is not known here; legal: yes, no")));
  EXPECT_THAT(errors_in("stop", "boredom"), ElementsAre(HasSubstr("legal: sterile_subsoil, bedrock, ")));
  EXPECT_THAT(errors_in("reason", "rain"), ElementsAre(HasSubstr("legal: standing_water, slope, ")));
  EXPECT_EQ(record_of("pit,backfilled\nT1-1,no\n").backfilled.value(), false);
}

TEST(PitsCsv, Counts) {
  const auto count = [](const std::string& cell) {
    return record_of("pit,find:pottery\nT1-1," + cell + "\n").counts.at(1);
  };
  EXPECT_EQ(count("0"), 0u);
  EXPECT_EQ(count("1000000"), 1'000'000u);
  EXPECT_EQ(count("3.0"), 3u) << "a whole number, as some programs write it";
  const std::string legal = "; legal: a whole number from 0 to 1000000";
  EXPECT_THAT(errors_in("find:pottery", "-1"), ElementsAre("P.csv:2: find:pottery: \"-1\" is below zero" + legal));
  EXPECT_THAT(errors_in("find:pottery", "1.5"),
              ElementsAre("P.csv:2: find:pottery: \"1.5\" is not a whole number" + legal));
  EXPECT_THAT(errors_in("find:pottery", "two"), ElementsAre("P.csv:2: find:pottery: \"two\" is not a number" + legal));
  EXPECT_THAT(errors_in("find:pottery", "1000001"),
              ElementsAre("P.csv:2: find:pottery: \"1000001\" is too large" + legal));
  for (const std::string cell : {"1e3", "1E+03", "1e30", "nan", "inf", "0x10", "+3", "1 2", "99999999999999999999"})
    EXPECT_THAT(errors_in("find:pottery", cell), SizeIs(1)) << cell;
}

TEST(PitsCsv, NumbersWithinTheirRanges) {
  for (const auto& [column, low, high, under, over] :
       std::vector<std::array<std::string, 5>>{{"depth_cm", "0", "1000", "-0.1", "1000.1"},
                                               {"mesh_mm", "0.001", "100", "0", "100.1"},
                                               {"weight:pottery", "0", "1e9", "-0.001", "1000000001"}}) {
    EXPECT_THAT(errors_in(column, low), IsEmpty()) << column;
    EXPECT_THAT(errors_in(column, high), IsEmpty()) << column;
    EXPECT_THAT(errors_in(column, under), ElementsAre(StartsWith("P.csv:2: " + column + ": \"" + under +
                                                                 "\" is out of range; legal: a number ")));
    EXPECT_THAT(errors_in(column, over), SizeIs(1)) << column;
    EXPECT_THAT(errors_in(column, "deep"), ElementsAre(HasSubstr("\"deep\" is not a number; legal: ")));
  }
  EXPECT_THAT(errors_in("depth_cm", "\"40,5\""), ElementsAre(HasSubstr("write a point as the decimal mark")));
}

TEST(PitsCsv, XAndYGoTogether) {
  EXPECT_THAT(errors_of("pit,x,y\nT1-1,1,\nT1-2,,2\nT1-3,,\nT1-4,1e8,-1e8\n"),
              ElementsAre("P.csv:2: y: missing; x and y go together", "P.csv:3: x: missing; x and y go together"));
  EXPECT_THAT(errors_of("pit,x,y\nT1-1,1e9,0\n"), ElementsAre(HasSubstr("P.csv:2: x: \"1e9\" is out of range")));
}

TEST(PitsCsv, TimesInThePlansZone) {
  const auto dug_at = [](const std::string& cell, const std::string& zone) {
    return record_of("pit,dug_at\nT1-1," + cell + "\n", plan_of(zone)).dug_at.value();
  };
  EXPECT_EQ(dug_at("2026-05-04T10:20", "America/New_York"), "2026-05-04T10:20:00.000-04:00");
  EXPECT_EQ(dug_at("2026-01-04T10:20:30", "America/New_York"), "2026-01-04T10:20:30.000-05:00");
  EXPECT_EQ(dug_at("2026-05-04T10:20:30.25+05:30", "America/New_York"), "2026-05-04T10:20:30.250+05:30");
  EXPECT_EQ(dug_at("2026-05-04T10:20Z", "America/New_York"), "2026-05-04T10:20:00.000+00:00");
  EXPECT_EQ(dug_at("2026-05-04", "America/New_York"), "2026-05-04");
  for (const std::string cell : {"4.5.2026", "2026-02-30", "2026-05-04 10:20", "2026-05-04T25:00", "now"})
    EXPECT_THAT(errors_in("dug_at", cell), ElementsAre(HasSubstr("is no time; legal: ISO 8601"))) << cell;
  EXPECT_THAT(errors_of("pit\nT1-1\n", plan_of("Nowhere/None")), ElementsAre(HasSubstr("Nowhere/None")));
}

TEST(PitsCsv, DugBeforeItWasStarted) {
  const auto errors = [](const std::string& started, const std::string& dug) {
    return errors_of("pit,started_at,dug_at\nT1-1," + started + "," + dug + "\n");
  };
  EXPECT_THAT(
      errors("2026-05-04T10:20", "2026-05-04T10:19"),
      ElementsAre("P.csv:2: dug_at: \"2026-05-04T10:19\" is before started_at \"2026-05-04T10:20\"; correct one of the "
                  "two"));
  EXPECT_THAT(errors("2026-05-04T10:20+02:00", "2026-05-04T08:30Z"), IsEmpty()) << "8:20 to 8:30 in UTC";
  EXPECT_THAT(errors("2026-05-04T10:20", "2026-05-04T10:20"), IsEmpty());
  EXPECT_THAT(errors("2026-05-05", "2026-05-04"), SizeIs(1));
  EXPECT_THAT(errors("2026-05-04T10:20", "2026-05-04"), IsEmpty()) << "a date may be any time of its day";
}

TEST(PitsCsv, NamesAndNotes) {
  EXPECT_THAT(errors_in("crew", std::string(200, 'c')), IsEmpty());
  EXPECT_THAT(errors_in("crew", std::string(201, 'c')),
              ElementsAre(HasSubstr("legal: one line of 1 to 200 characters")));
  EXPECT_THAT(errors_in("by", "\"two\nlines\""),
              ElementsAre(HasSubstr("P.csv:2: by: \"two\\nlines\" is no such text")));
  EXPECT_THAT(errors_in("bag", "\a"), SizeIs(1));
  EXPECT_THAT(errors_in("note", std::string(4'000, 'n')), IsEmpty());
  EXPECT_THAT(errors_in("note", std::string(4'001, 'n')), SizeIs(1));
  EXPECT_THAT(errors_in("why", std::string(4'001, 'n')), SizeIs(1));
}

TEST(PitsCsv, NotDugNeedsAReasonAndHasNoFinds) {
  const std::string header = "pit,status,reason,depth_cm,stop,find:pottery,weight:pottery,note\n";
  EXPECT_THAT(errors_of(header + "T1-1,not_dug,slope,,,,,\n"), IsEmpty());
  EXPECT_THAT(errors_of(header + "T1-1,not_dug,,,,,,\n"),
              ElementsAre(StartsWith("P.csv:2: reason: missing; status not_dug needs one; legal: standing_water, ")));
  EXPECT_THAT(
      errors_of(header + "T1-1,not_dug,slope,40,bedrock,2,1.5,\n"),
      ElementsAre("P.csv:2: depth_cm: \"40\" doesn't go with status not_dug; clear it or write status dug",
                  "P.csv:2: stop: \"bedrock\" doesn't go with status not_dug; clear it or write status dug",
                  "P.csv:2: find:pottery: \"2\" doesn't go with status not_dug; clear it or write status dug",
                  "P.csv:2: weight:pottery: \"1.5\" doesn't go with status not_dug; clear it or write status dug"));
  EXPECT_THAT(errors_of(header + "T1-1,not_dug,rain,,,,,\n"), SizeIs(1)) << "said once";
  EXPECT_EQ(record_of(header + "T1-1,not_dug,slope,,,0,0,\n").counts.at(1), std::nullopt) << "zero is as good as empty";
  EXPECT_THAT(errors_of("pit,status\nT1-1,not_dug\n"), IsEmpty()) << "the record may have its reason already";
}

TEST(PitsCsv, AReasonGoesWithNotDugOnly) {
  const std::string only = "goes with status not_dug only; clear it or write status not_dug";
  EXPECT_THAT(errors_of("pit,status,reason,why\nT1-1,dug,slope,\nT1-2,,slope,\nT1-3,withdrawn,slope,x\n"),
              ElementsAre("P.csv:2: reason: \"slope\" " + only, "P.csv:3: reason: \"slope\" " + only,
                          "P.csv:4: reason: \"slope\" " + only));
  EXPECT_THAT(errors_of("pit,reason\nT1-1,slope\n"), IsEmpty()) << "the record may say not dug already";
}

TEST(PitsCsv, OtherNeedsANote) {
  EXPECT_THAT(errors_of("pit,status,reason,note\nT1-1,not_dug,other,\nT1-2,not_dug,other,flooded\n"),
              ElementsAre(StartsWith("P.csv:2: note: missing; reason \"other\"")));
  EXPECT_THAT(errors_of("pit,stop,note\nT1-1,other,\n"),
              ElementsAre(StartsWith("P.csv:2: note: missing; stop \"other\"")));
  EXPECT_THAT(errors_of("pit,stop\nT1-1,other\n"), IsEmpty()) << "the record may have a note already";
}

TEST(PitsCsv, WithdrawnNeedsWhy) {
  EXPECT_THAT(errors_of("pit,status,why\nT1-1,withdrawn,\n"), ElementsAre(StartsWith("P.csv:2: why: missing")));
  EXPECT_THAT(errors_of("pit,status\nT1-1,withdrawn\n"), ElementsAre(StartsWith("P.csv:2: why: missing")));
  const auto actions = actions_of("pit,status,why\nT1-1,withdrawn,mistyped\n");
  ASSERT_THAT(actions, SizeIs(1));
  EXPECT_EQ(std::get<RecordPit>(actions[0].what).status.value(), PitStatus::kWithdrawn);
  EXPECT_EQ(actions[0].why, "mistyped");
}

TEST(PitsCsv, AllErrorsInOrderOfTheFile) {
  EXPECT_THAT(errors_of("pit,depth_cm,colour\nT1-1,x,\nT1-2\nT1-1,-1,\n,,,\n"),
              ElementsAre(StartsWith("P.csv:1: \"colour\" is no column"), StartsWith("P.csv:2: depth_cm: \"x\""),
                          StartsWith("P.csv:3: 1 cell, but the header has 3 columns"),
                          StartsWith("P.csv:4: pit: \"T1-1\" stands twice"), StartsWith("P.csv:4: depth_cm: \"-1\""),
                          StartsWith("P.csv:5: 4 cells")));
}

TEST(PitsCsv, NothingToRecord) {
  EXPECT_THAT(errors_of(""), ElementsAre(StartsWith("P.csv:1: the table is empty")));
  EXPECT_THAT(errors_of("\npit,status\n"), ElementsAre("P.csv:2: no rows below the header; write one for each pit"));
  EXPECT_THAT(errors_of("pit;status\nT1-1;dug\n"), ElementsAre(StartsWith("P.csv:1: semicolons between the cells")));
}

TEST(PitsCsv, FindingsWithoutEndAreCut) {
  std::string text = "pit,depth_cm\n";
  for (int i = 1; i <= 12'000; ++i)
    text += "T1-" + std::to_string(i) + ",x\n";
  const auto errors = errors_of(text);
  ASSERT_THAT(errors, SizeIs(10'001));
  EXPECT_EQ(errors.back(), "P.csv: more is wrong than is listed; correct these first");
}

// Bytes changed, dropped and doubled at random: whatever comes is read or refused with lines that name the file and a line of it.
TEST(PitsCsv, SpoiltTablesAreReadOrRefused) {
  TestRandom random = TestRandom::of_this_run();
  const std::string whole =
      "pit,status,reason,dug_at,depth_cm,x,y,note,find:pottery,weight:Глина\r\nT1-1,dug,,2026-05-04T10:20,40,,,\"a "
      "\"\"b\"\"\nc\",3,1.5\r\n"
      "T1-2,not_dug,slope,,,,,,,\nJ1,,,2026-05-04,12.5,10,20,steep,0,\n";
  const std::string bytes = std::string("\0\"\n\r,;\t -.9eT\xC3\xFF", 16);
  for (int round = 0; round < rounds(2000); ++round) {
    std::string text = whole;
    for (int n = random.between(1, 4); n > 0 && !text.empty(); --n) {
      const auto at = static_cast<std::size_t>(random.between(0, static_cast<int>(text.size()) - 1));
      const int kind = random.between(0, 3);
      if (kind == 0) text[at] = bytes[static_cast<std::size_t>(random.between(0, static_cast<int>(bytes.size()) - 1))];
      if (kind == 1) text.erase(at, static_cast<std::size_t>(random.between(1, 20)));
      if (kind == 2) text.insert(at, text.substr(at / 2, 30));
      if (kind == 3) text.resize(at);
    }
    const auto actions = read_pits_csv(text, "P.csv", plan_of());
    if (actions.ok()) continue;
    ASSERT_FALSE(actions.error().lines.empty());
    for (const std::string& line : actions.error().lines) {
      EXPECT_THAT(line, testing::ContainsRegex("^P\\.csv:[1-9][0-9]*: [^\n]+$")) << text;
      EXPECT_EQ(line.find('\n'), std::string::npos) << line;
    }
  }
}

}  // namespace
}  // namespace nearpit
