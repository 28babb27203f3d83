#include "session/draft_file.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>
#include <filesystem>

#include "session/one_survey.h"

namespace nearpit {
namespace {

const WallTime kSaving{1769990400000, 0};

using ::testing::ElementsAre;
using ::testing::ElementsAreArray;
using ::testing::HasSubstr;
using ::testing::IsEmpty;

const std::string kSurvey = "018f4d2a-0000-7000-8000-0000000000aa";
const std::string kName = "drafts-" + kSurvey + ".json";

std::vector<std::string> names_in(const std::string& folder) {
  std::vector<std::string> names;
  for (const auto& entry : std::filesystem::directory_iterator(folder))
    names.push_back(entry.path().filename());
  std::sort(names.begin(), names.end());
  return names;
}

RecordDraft half_typed() {
  RecordDraft draft;
  draft.pit = "T7-12";
  draft.based_on = "018f4d2a-0000-7000-8000-0000000000bb";
  draft.amends = true;
  draft.not_dug = true;
  draft.reason = NotDugReason::kStandingWater;
  draft.nothing_found = true;
  draft.counts = {"", "12", "0"};
  draft.depth_cm = "45.";
  draft.stop = StopReason::kUxoStop;
  draft.note = "серый \"песок\"\nκάτω \\ 土器 🪨 e\u0301";
  draft.judgement = true;
  draft.started_at = "2026-05-04T10:20:00.000+12:00";
  draft.why = "작업조 said so";
  return draft;
}

TEST(DraftFile, ComesBackAsItWasWritten) {
  const TemporaryFolder folder;
  const DraftFile file(folder.path("config"), kSurvey);
  EXPECT_THAT(file.read(), IsEmpty());
  RecordDraft blank;
  blank.pit = "Яма";
  const std::vector<RecordDraft> drafts{half_typed(), blank, RecordDraft()};
  ASSERT_TRUE(file.write(drafts));
  EXPECT_THAT(DraftFile(folder.path("config"), kSurvey).read(), ElementsAreArray(drafts));
  EXPECT_THAT(DraftFile(folder.path("config"), "another").read(), IsEmpty());
  EXPECT_EQ(mode_of(folder.path("config/" + kName)), 0600u);
  ASSERT_TRUE(file.write({blank}));
  EXPECT_THAT(file.read(), ElementsAre(blank));
  EXPECT_THAT(names_in(folder.path("config")), ElementsAre(kName));
}

TEST(DraftFile, NoDraftsLeaveNoFile) {
  const TemporaryFolder folder;
  const DraftFile file(folder.path("config"), kSurvey);
  ASSERT_TRUE(file.write({}));
  EXPECT_FALSE(std::filesystem::exists(folder.path("config")));
  ASSERT_TRUE(file.write({half_typed()}));
  ASSERT_TRUE(file.write({}));
  EXPECT_THAT(names_in(folder.path("config")), IsEmpty());
}

TEST(DraftFile, ASurveyIdNeverBecomesAPath) {
  const TemporaryFolder folder;
  for (const std::string& id : {std::string("../../escaped"), std::string("/x"), std::string(500, 'a')}) {
    const DraftFile file(folder.path("in"), id);
    ASSERT_TRUE(file.write({half_typed()}));
    EXPECT_THAT(file.read(), ElementsAre(half_typed()));
  }
  EXPECT_THAT(names_in(folder.path()), ElementsAre("in"));
  EXPECT_EQ(names_in(folder.path("in")).size(), 3u);
}

TEST(DraftFile, AReasonOfALaterProgramIsLeftOutAlone) {
  const TemporaryFolder folder;
  put_text(folder.path(kName), R"({"drafts": [{"pit": "T1-1", "not_dug": true, "reason": "dragons", "stop": "lava",
    "note": "hot", "counts": ["3"], "later": {"x": 1}}, {"pit": "T1-2"}], "later": 1})");
  const auto drafts = DraftFile(folder.path(), kSurvey).read();
  ASSERT_EQ(drafts.size(), 2u);
  EXPECT_EQ(drafts[0].reason, std::nullopt);
  EXPECT_EQ(drafts[0].stop, std::nullopt);
  EXPECT_TRUE(drafts[0].not_dug);
  EXPECT_EQ(drafts[0].note, "hot");
  EXPECT_THAT(drafts[0].counts, ElementsAre("3"));
  EXPECT_EQ(drafts[1].pit, "T1-2");
}

TEST(DraftFile, WhatCannotBeReadIsKeptAside) {
  const std::string deep = "{\"drafts\": " + std::string(100'000, '[') + std::string(100'000, ']') + "}";
  const std::string large = "{\"drafts\": [" + std::string(10 << 20, ' ') + "]}";
  for (const std::string& text :
       {std::string(), std::string("{\"drafts\": [{\"pit\": \"T1-1\", \"note\": \"half a wo"), std::string("[]"),
        std::string("{}"), std::string("{\"drafts\": {}}"), std::string("{\"drafts\": [7]}"),
        std::string("{\"drafts\": [{\"note\": \"of no pit\"}]}"),
        std::string("{\"drafts\": [{\"pit\": \"T1-1\", \"note\": 7}]}"),
        std::string("{\"drafts\": [{\"pit\": \"T1-1\", \"counts\": [7]}]}"),
        std::string("{\"drafts\": [{\"pit\": \"T1-1\", \"amends\": \"no\"}]}"), std::string("{\"drafts\": []}\xff"),
        deep, large}) {
    const TemporaryFolder folder;
    put_text(folder.path(kName), text);
    const DraftFile file(folder.path(), kSurvey);
    EXPECT_THAT(file.read(), IsEmpty()) << text.substr(0, 60);
    EXPECT_THAT(names_in(folder.path()), ElementsAre(kName + ".unreadable")) << text.substr(0, 60);
    EXPECT_TRUE(text_of(folder.path(kName + ".unreadable")) == text) << text.substr(0, 60);
    ASSERT_TRUE(file.write({half_typed()}));
    EXPECT_THAT(file.read(), ElementsAre(half_typed()));
  }
}

TEST(DraftFile, WhatWasKeptAsideBeforeIsNotLostEither) {
  const TemporaryFolder folder;
  const DraftFile file(folder.path(), kSurvey);
  for (const char* text : {"one", "two", "three"}) {
    put_text(folder.path(kName), text);
    EXPECT_THAT(file.read(), IsEmpty());
  }
  EXPECT_EQ(text_of(folder.path(kName + ".unreadable")), "one");
  EXPECT_EQ(text_of(folder.path(kName + ".unreadable-2")), "two");
  EXPECT_EQ(text_of(folder.path(kName + ".unreadable-3")), "three");
  std::filesystem::create_directory(folder.path(kName));
  EXPECT_THAT(file.read(), IsEmpty());
  EXPECT_TRUE(std::filesystem::is_directory(folder.path(kName + ".unreadable-4")));
  EXPECT_TRUE(file.write({half_typed()}));
}

TEST(DraftFile, TheDiskMayRefuse) {
  const TemporaryFolder folder;
  put_text(folder.path("file"), "x");
  const DraftFile refused(folder.path("file"), kSurvey);
  EXPECT_THAT(refused.read(), IsEmpty());
  const Status status = refused.write({half_typed()});
  ASSERT_FALSE(status);
  EXPECT_EQ(status.error().kind, ErrorKind::kIo);
  EXPECT_EQ(text_of(folder.path("file")), "x");
  EXPECT_FALSE(DraftFile("", kSurvey).write({half_typed()}));
}

TEST(DraftFile, MoreThanCanBeReadBackIsNotWritten) {
  const TemporaryFolder folder;
  const DraftFile file(folder.path(), kSurvey);
  ASSERT_TRUE(file.write({half_typed()}));
  RecordDraft endless = half_typed();
  endless.note = std::string(5 << 20, 'x');
  const Status status = file.write({endless});
  ASSERT_FALSE(status);
  EXPECT_EQ(status.error().kind, ErrorKind::kBadInput);
  EXPECT_THAT(status.error().one_line(), HasSubstr("more than the 4194304 that are kept"));
  EXPECT_THAT(file.read(), ElementsAre(half_typed()));
}

TEST(DraftFile, TextThatIsNoUtf8DoesNotLoseTheRest) {
  const TemporaryFolder folder;
  const DraftFile file(folder.path(), kSurvey);
  RecordDraft odd = half_typed();
  odd.note =
      "a\xff"
      "b";
  ASSERT_TRUE(file.write({odd, half_typed()}));
  const auto drafts = file.read();
  ASSERT_EQ(drafts.size(), 2u);
  EXPECT_EQ(drafts[0].note, "a\uFFFDb");
  EXPECT_EQ(drafts[1], half_typed());
}

// A crash between the typing and the saving, on a real survey.
TEST(DraftFile, ADraftIsTypedOnAfterACrash) {
  OneSurvey survey;
  const DraftFile file(survey.folder.path("config"), kSurvey);
  {
    const Session session = survey.device.open();
    RecordDraft draft = new_draft(session.model(), session.model().name_of("T3-3").value(), {1'770'000'000'000, 0});
    draft.counts[1] = "4";
    draft.note = "hal";
    ASSERT_TRUE(file.write({draft}));
  }
  Session session = survey.device.open();
  std::vector<RecordDraft> drafts = file.read();
  ASSERT_EQ(drafts.size(), 1u);
  EXPECT_FALSE(catch_up(&drafts[0], session.model()));
  EXPECT_TRUE(typed_anything(drafts[0], session.model()));
  drafts[0].note += "f a word";
  session.apply({action_of(drafts[0], session.model(), "A", kSaving).value()}).value();
  EXPECT_EQ(record_of(session, "T3-3").note, "half a word");
  EXPECT_THAT(record_of(session, "T3-3").counts, ElementsAre(0, 4));
  EXPECT_EQ(record_of(session, "T3-3").started_at, "2026-02-02T15:40:00.000+13:00");
}

}  // namespace
}  // namespace nearpit
