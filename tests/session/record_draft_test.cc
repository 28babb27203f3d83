#include "session/record_draft.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "session/blank_fields.h"
#include "session/one_survey.h"

namespace nearpit {
namespace {

const WallTime kSaving{1769990400000, 0};

using ::testing::ElementsAre;
using ::testing::HasSubstr;
using ::testing::IsEmpty;

// A survey under work, and the time as its tablet has it.
struct Field : OneSurvey {
  explicit Field(const std::string& require = "[]") : OneSurvey(require), session(device.open()) {}

  const SurveyModel& model() const { return session.model(); }
  RecordDraft draft(const std::string& pit) const {
    return new_draft(model(), model().name_of(pit).value(), {1'770'000'000'000, 0});
  }
  RecordPit said(const RecordDraft& draft) const {
    return std::get<RecordPit>(action_of(draft, model(), "crew A", kSaving).value().what);
  }
  void save(const RecordDraft& draft) { session.apply({action_of(draft, model(), "crew A", kSaving).value()}).value(); }

  Session session;
};

TEST(RecordDraft, ANewOneIsBlankAndStartsNowInTheSurveysZone) {
  const Field field;
  const RecordDraft draft = field.draft("t3-3");
  EXPECT_EQ(draft.pit, "T3-3");
  EXPECT_EQ(draft.started_at, "2026-02-02T15:40:00.000+13:00");
  EXPECT_THAT(draft.counts, ElementsAre("", ""));
  EXPECT_FALSE(draft.amends);
  EXPECT_FALSE(draft.judgement);
  EXPECT_FALSE(draft.nothing_found);
  EXPECT_FALSE(typed_anything(draft, field.model()));
}

TEST(RecordDraft, OffTheDesignItIsJudgement) {
  Field field;
  EXPECT_TRUE(field.draft("T1-5").judgement);
  EXPECT_TRUE(field.draft("J1").judgement);
  EXPECT_FALSE(field.draft("T5-5").judgement);
  EXPECT_TRUE(field.draft("T4-4").judgement);
  RecordDraft positive = field.draft("T3-3");
  positive.counts[0] = "1";
  field.save(positive);
  EXPECT_FALSE(field.draft("T4-4").judgement);
}

TEST(RecordDraft, SomethingIsTypedWhenAnyFieldIs) {
  const Field field;
  const RecordDraft blank = field.draft("T3-3");
  const auto typed = [&](auto change) {
    RecordDraft draft = blank;
    change(&draft);
    return typed_anything(draft, field.model());
  };
  EXPECT_TRUE(typed([](RecordDraft* d) { d->not_dug = true; }));
  EXPECT_TRUE(typed([](RecordDraft* d) { d->reason = NotDugReason::kSlope; }));
  EXPECT_TRUE(typed([](RecordDraft* d) { d->nothing_found = true; }));
  EXPECT_TRUE(typed([](RecordDraft* d) { d->counts[1] = "2"; }));
  EXPECT_TRUE(typed([](RecordDraft* d) { d->depth_cm = "4"; }));
  EXPECT_TRUE(typed([](RecordDraft* d) { d->stop = StopReason::kBedrock; }));
  EXPECT_TRUE(typed([](RecordDraft* d) { d->note = "x"; }));
  EXPECT_TRUE(typed([](RecordDraft* d) { d->why = "x"; }));
  EXPECT_FALSE(typed([](RecordDraft* d) { d->judgement = true; }));
  EXPECT_FALSE(typed([](RecordDraft* d) { d->started_at = ""; }));
  EXPECT_FALSE(typed([](RecordDraft* d) { d->counts.clear(); }));
}

TEST(RecordDraft, SaysWhatIsMissing) {
  const Field field;
  const auto lacking = [&](auto change) {
    RecordDraft draft = field.draft("T3-3");
    change(&draft);
    return missing(draft, field.model());
  };
  EXPECT_THAT(lacking([](RecordDraft*) {}), ElementsAre("what was found, or 'nothing found'"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->counts[0] = "0"; }), ElementsAre("what was found, or 'nothing found'"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->nothing_found = true; }), IsEmpty());
  EXPECT_THAT(lacking([](RecordDraft* d) { d->counts[1] = "12"; }), IsEmpty());
  EXPECT_THAT(lacking([](RecordDraft* d) { d->nothing_found = true, d->counts[1] = "1"; }),
              ElementsAre("either finds or 'nothing found'"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->counts[1] = "1.5"; }),
              ElementsAre("a whole number of 土器, up to 1000000"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->counts[0] = "1000001"; }),
              ElementsAre("a whole number of flake, up to 1000000"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->not_dug = true; }), ElementsAre("why it was not dug"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->not_dug = true, d->reason = NotDugReason::kSlope; }), IsEmpty());
  EXPECT_THAT(lacking([](RecordDraft* d) { d->not_dug = true, d->reason = NotDugReason::kSlope, d->counts[0] = "1"; }),
              ElementsAre("no finds, as the pit was not dug"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->not_dug = true, d->reason = NotDugReason::kOther, d->note = " \n"; }),
              ElementsAre("a note: what 'other' means"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->nothing_found = true, d->stop = StopReason::kOther; }),
              ElementsAre("a note: what 'other' means"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->nothing_found = true, d->note = std::string(4001, 'x'); }),
              ElementsAre("a note in plain text of at most 4000 characters"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->nothing_found = true, d->note = "a\x01"; }),
              ElementsAre("a note in plain text of at most 4000 characters"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->pit = "T99-1", d->nothing_found = true; }),
              ElementsAre("a pit of this survey"));
  EXPECT_THAT(lacking([](RecordDraft* d) { d->pit = "J1", d->nothing_found = true; }),
              ElementsAre(HasSubstr("where it lies")));
}

TEST(RecordDraft, ADepthIsANumberFromNothingToTenMetres) {
  const Field field;
  for (const auto& [typed, legal] : {std::pair("", true),
                                     {"0", true},
                                     {"45.", true},
                                     {"45.5", true},
                                     {"1000", true},
                                     {"1000.1", false},
                                     {".", false},
                                     {"4,5", false},
                                     {"-1", false},
                                     {"x", false}}) {
    RecordDraft draft = field.draft("T3-3");
    draft.nothing_found = true;
    draft.depth_cm = typed;
    EXPECT_EQ(missing(draft, field.model()),
              legal ? std::vector<std::string>{} : std::vector<std::string>{"a depth from 0 to 1000 cm"})
        << typed;
  }
}

TEST(RecordDraft, AFirstRecordGivesWhatWasSaidAndIsTaken) {
  Field field;
  RecordDraft draft = field.draft("T3-3");
  draft.counts = {"2", ""};
  draft.depth_cm = "45.5";
  draft.stop = StopReason::kRoots;
  draft.note = "серый песок\nκάτω";
  const Action action = action_of(draft, field.model(), "작업조", kSaving).value();
  EXPECT_EQ(action.by, "작업조");
  EXPECT_EQ(action.why, "");
  EXPECT_FALSE(std::get<RecordPit>(action.what).dug_at);
  EXPECT_FALSE(std::get<RecordPit>(action.what).chosen_by);
  field.device.minute = 30;
  field.session.apply({action}).value();
  const PitRecord& record = record_of(field.session, "T3-3");
  EXPECT_EQ(record.status, PitStatus::kDug);
  EXPECT_EQ(record.crew, "작업조");
  EXPECT_EQ(record.started_at, draft.started_at);
  EXPECT_EQ(record.dug_at, "2026-02-02T16:10:00.000+13:00");
  EXPECT_TRUE(record.dug_at_defaulted);
  EXPECT_EQ(record.depth_cm, 45.5);
  EXPECT_EQ(record.stop, StopReason::kRoots);
  EXPECT_EQ(record.note, draft.note);
  EXPECT_EQ(record.chosen_by, ChosenBy::kUnsaid);
  EXPECT_THAT(record.counts, ElementsAre(2, 0));
}

TEST(RecordDraft, NotDugGivesNoFindsDepthOrStop) {
  Field field;
  RecordDraft draft = field.draft("T3-3");
  draft.nothing_found = true;
  draft.depth_cm = "30";
  draft.stop = StopReason::kRoots;
  draft.not_dug = true;
  draft.reason = NotDugReason::kStandingWater;
  const RecordPit said = field.said(draft);
  EXPECT_THAT(said.counts, IsEmpty());
  EXPECT_FALSE(said.depth_cm);
  EXPECT_FALSE(said.stop);
  field.save(draft);
  EXPECT_EQ(record_of(field.session, "T3-3").status, PitStatus::kNotDug);
  EXPECT_EQ(record_of(field.session, "T3-3").reason, NotDugReason::kStandingWater);
}

TEST(RecordDraft, AJudgementPitSaysSo) {
  Field field;
  RecordDraft draft = field.draft("T1-5");
  draft.nothing_found = true;
  field.save(draft);
  EXPECT_EQ(record_of(field.session, "T1-5").chosen_by, ChosenBy::kJudgement);
  // Taken back, it can't be saved: a pit that nothing calls for must not become a judgement pit in silence.
  RecordDraft denied = field.draft("T2-5");
  denied.nothing_found = true;
  denied.judgement = false;
  EXPECT_THAT(missing(denied, field.model()), ElementsAre(HasSubstr("judgement pit")));
  EXPECT_FALSE(action_of(denied, field.model(), "", kSaving));
}

TEST(RecordDraft, WhatIsMissingIsNotSaved) {
  const Field field;
  const auto action = action_of(field.draft("T3-3"), field.model(), "crew A", kSaving);
  ASSERT_FALSE(action);
  EXPECT_EQ(action.error().kind, ErrorKind::kBadInput);
  EXPECT_EQ(action.error().one_line(), "T3-3: not saved; still to say: what was found, or 'nothing found'");
  RecordDraft draft = field.draft("T3-3");
  draft.nothing_found = true;
  EXPECT_TRUE(action_of(draft, field.model(), "", kSaving));
  EXPECT_FALSE(action_of(draft, field.model(), "two\nlines", kSaving));
  EXPECT_FALSE(action_of(draft, field.model(), std::string(201, 'x'), kSaving));
}

// The blank fields that the draft foresees are those that the check of the file then finds.
TEST(RecordDraft, ForeseesWhatTheCheckCallsBlank) {
  Field field(R"(["crew", "started_at", "dug_at", "depth_cm", "stop", "mesh_mm", "backfilled", "bag", "note"])");
  RecordDraft draft = field.draft("T3-3");
  draft.nothing_found = true;
  EXPECT_THAT(blanks(draft, field.model(), ""),
              ElementsAre("crew", "depth_cm", "stop", "mesh_mm", "backfilled", "bag", "note"));
  draft.depth_cm = "20";
  draft.note = " ";
  EXPECT_THAT(blanks(draft, field.model(), "A"), ElementsAre("stop", "mesh_mm", "backfilled", "bag", "note"));
  draft.stop = StopReason::kRoots;
  draft.note = "dry";
  draft.started_at = "";
  const auto foreseen = blanks(draft, field.model(), "crew A");
  EXPECT_THAT(foreseen, ElementsAre("started_at", "mesh_mm", "backfilled", "bag"));
  field.save(draft);
  const auto found = blank_fields(field.model());
  ASSERT_EQ(found.size(), 1u);
  EXPECT_EQ(found.front().what, "the plan requires started_at, mesh_mm, backfilled and bag");

  // A further revision keeps what it does not show.
  RecordPit more;
  more.pit = "T3-3";
  more.mesh_mm = std::optional<double>(6.4);
  more.backfilled = std::optional<bool>(false);
  more.bag = std::optional<std::string>("17");
  more.dug_at = std::optional<std::string>("2026-02-02");
  field.session.apply({{more, "lab", "bags", {}}}).value();
  EXPECT_THAT(blanks(field.draft("T3-3"), field.model(), ""), ElementsAre("started_at"));
  draft.not_dug = true;
  EXPECT_THAT(blanks(draft, field.model(), ""), IsEmpty());
}

TEST(RecordDraft, KeysTypeANumber) {
  const auto typed = [](const std::string& keys, std::size_t most) {
    std::string number;
    for (const char key : keys)
      type_digit(&number, key, most);
    return number;
  };
  EXPECT_EQ(typed("45.5", 6), "45.5");
  EXPECT_EQ(typed("045", 6), "45");
  EXPECT_EQ(typed("000", 6), "0");
  EXPECT_EQ(typed(".5", 6), "0.5");
  EXPECT_EQ(typed("0.05", 6), "0.05");
  EXPECT_EQ(typed("4.5.6", 6), "4.56");
  EXPECT_EQ(typed("1234567", 6), "123456");
  EXPECT_EQ(typed("1234.567", 6), "1234.56");
  EXPECT_EQ(typed("1a-+ ,e2", 6), "12");
  EXPECT_EQ(typed("45", 0), "");
}

TEST(RecordDraft, StepsCount) {
  const auto stepped = [](std::string count, int by) {
    step_count(&count, by);
    return count;
  };
  EXPECT_EQ(stepped("", 1), "1");
  EXPECT_EQ(stepped("", -1), "0");
  EXPECT_EQ(stepped("9", 1), "10");
  EXPECT_EQ(stepped("9", -10), "0");
  EXPECT_EQ(stepped("999999", 1), "999999");
  EXPECT_EQ(stepped("5", 2'147'483'647), "999999");
  EXPECT_EQ(stepped("5", -2'147'483'647 - 1), "0");
  EXPECT_EQ(stepped("1000000", -1), "999999");
  EXPECT_EQ(stepped("x", 1), "1");
}

}  // namespace
}  // namespace nearpit
