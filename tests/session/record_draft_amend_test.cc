#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "session/one_survey.h"
#include "session/record_draft.h"

namespace nearpit {
namespace {

const WallTime kSaving{1769990400000, 0};

using ::testing::ElementsAre;
using ::testing::HasSubstr;
using ::testing::IsEmpty;
using ::testing::Pair;

const WallTime kNow{1'770'000'000'000, 0};

RecordDraft draft_of(const Session& session, const std::string& pit) {
  return new_draft(session.model(), session.model().name_of(pit).value(), kNow);
}

RecordPit said(const RecordDraft& draft, const Session& session) {
  return std::get<RecordPit>(action_of(draft, session.model(), "lab", kSaving).value().what);
}

// The fields that an action gives, by name.
std::vector<std::string> fields_of(const RecordPit& pit) {
  std::vector<std::string> fields;
  const auto add = [&](bool is_given, const char* name) {
    if (is_given) fields.push_back(name);
  };
  add(pit.status.has_value(), "status"), add(pit.reason.has_value(), "reason"), add(pit.crew.has_value(), "crew");
  add(pit.started_at.has_value(), "started_at"), add(pit.dug_at.has_value(), "dug_at");
  add(pit.depth_cm.has_value(), "depth_cm"), add(pit.stop.has_value(), "stop");
  add(pit.chosen_by.has_value(), "chosen_by"), add(pit.x || pit.y, "place"), add(pit.moved.has_value(), "moved");
  add(pit.mesh_mm.has_value(), "mesh_mm"), add(pit.backfilled.has_value(), "backfilled");
  add(pit.bag.has_value(), "bag"), add(pit.note.has_value(), "note");
  for (const auto& [find, count] : pit.counts)
    fields.push_back("count " + std::to_string(find));
  add(!pit.weights_g.empty(), "weights");
  return fields;
}

// T3-3 with everything that a record can say.
struct Recorded : OneSurvey {
  Recorded() : session(device.open()) {
    RecordPit pit;
    pit.pit = "T3-3";
    pit.crew = std::optional<std::string>("crew A");
    pit.started_at = std::optional<std::string>("2026-02-02T10:00:00.000+13:00");
    pit.depth_cm = std::optional<double>(45.5);
    pit.stop = std::optional<StopReason>(StopReason::kRoots);
    pit.bag = std::optional<std::string>("17");
    pit.mesh_mm = std::optional<double>(6.4);
    pit.note = std::optional<std::string>("grey sand");
    pit.counts[0] = 2;
    session.apply({{pit, "crew A", "", {}}}).value();
  }
  void amend(const RecordDraft& draft) {
    session.apply({action_of(draft, session.model(), "lab", kSaving).value()}).value();
  }
  Session session;
};

TEST(RecordDraftAmend, IsFilledFromWhatStands) {
  Recorded pit;
  const RecordDraft draft = draft_of(pit.session, "T3-3");
  EXPECT_TRUE(draft.amends);
  EXPECT_FALSE(draft.not_dug);
  EXPECT_FALSE(draft.nothing_found);
  EXPECT_THAT(draft.counts, ElementsAre("2", ""));
  EXPECT_EQ(draft.depth_cm, "45.5");
  EXPECT_EQ(draft.stop, StopReason::kRoots);
  EXPECT_EQ(draft.note, "grey sand");
  EXPECT_EQ(draft.started_at, "2026-02-02T10:00:00.000+13:00");
  EXPECT_FALSE(draft.judgement);
  EXPECT_FALSE(typed_anything(draft, pit.session.model()));
  EXPECT_THAT(missing(draft, pit.session.model()), ElementsAre("why the record is changed"));
}

TEST(RecordDraftAmend, OnlyWhatChangedIsGiven) {
  Recorded pit;
  const auto changed = [&](auto change) {
    RecordDraft draft = draft_of(pit.session, "T3-3");
    draft.why = "read again";
    change(&draft);
    return fields_of(said(draft, pit.session));
  };
  EXPECT_THAT(changed([](RecordDraft* d) { d->depth_cm = "50"; }), ElementsAre("depth_cm"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->depth_cm = ""; }), ElementsAre("depth_cm"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->stop.reset(); }), ElementsAre("stop"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->note = "  "; }), ElementsAre("note"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->started_at = ""; }), ElementsAre("started_at"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->judgement = true; }), ElementsAre("chosen_by"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->counts[1] = "3"; }), ElementsAre("count 1"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->counts[0] = "", d->nothing_found = true; }), ElementsAre("count 0"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->depth_cm = "45.50", d->counts[1] = "4"; }), ElementsAre("count 1"));
  EXPECT_THAT(changed([](RecordDraft* d) { d->not_dug = true, d->reason = NotDugReason::kSlope, d->counts[0] = ""; }),
              ElementsAre("status", "reason", "depth_cm", "stop", "count 0"));
}

TEST(RecordDraftAmend, WhatIsClearedIsGivenEmpty) {
  Recorded pit;
  RecordDraft draft = draft_of(pit.session, "T3-3");
  draft.why = "another pit's bag";
  draft.counts[0] = "0";
  draft.nothing_found = true;
  draft.note = "";
  draft.depth_cm = "";
  draft.stop.reset();
  const RecordPit given = said(draft, pit.session);
  EXPECT_THAT(given.counts, ElementsAre(Pair(0u, std::nullopt)));
  EXPECT_EQ(*given.note, std::nullopt);
  EXPECT_EQ(*given.depth_cm, std::nullopt);
  EXPECT_EQ(*given.stop, std::nullopt);
  pit.amend(draft);
  const PitRecord& record = record_of(pit.session, "T3-3");
  EXPECT_THAT(record.counts, ElementsAre(0, 0));
  EXPECT_EQ(record.note, "");
  EXPECT_EQ(record.crew, "crew A");  // who dug, not who amends
  EXPECT_EQ(record.bag, "17");
  EXPECT_EQ(record.mesh_mm, 6.4);
  const RecordDraft again = draft_of(pit.session, "T3-3");
  EXPECT_TRUE(again.nothing_found);
  EXPECT_THAT(again.counts, ElementsAre("", ""));
}

TEST(RecordDraftAmend, NothingChangedIsNothingToSave) {
  Recorded pit;
  RecordDraft draft = draft_of(pit.session, "T3-3");
  draft.why = "just looking";
  const auto action = action_of(draft, pit.session.model(), "lab", kSaving);
  ASSERT_FALSE(action);
  EXPECT_EQ(action.error().kind, ErrorKind::kBadInput);
  EXPECT_THAT(action.error().one_line(), HasSubstr("T3-3: nothing is changed"));
}

TEST(RecordDraftAmend, FromDugToNotDugAndBack) {
  Recorded pit;
  RecordDraft draft = draft_of(pit.session, "T3-3");
  draft.why = "it was T3-4";
  draft.not_dug = true;
  draft.reason = NotDugReason::kNoPermission;
  EXPECT_THAT(missing(draft, pit.session.model()), ElementsAre("no finds, as the pit was not dug"));
  draft.counts[0] = "";
  pit.amend(draft);
  EXPECT_EQ(record_of(pit.session, "T3-3").status, PitStatus::kNotDug);

  RecordDraft back = draft_of(pit.session, "T3-3");
  EXPECT_TRUE(back.not_dug);
  EXPECT_FALSE(back.nothing_found);
  EXPECT_EQ(back.reason, NotDugReason::kNoPermission);
  back.not_dug = false;
  back.nothing_found = true;
  back.why = "dug after all";
  EXPECT_THAT(fields_of(said(back, pit.session)), ElementsAre("status", "reason"));
  pit.amend(back);
  EXPECT_EQ(record_of(pit.session, "T3-3").status, PitStatus::kDug);
  EXPECT_EQ(record_of(pit.session, "T3-3").reason, std::nullopt);
}

TEST(RecordDraftAmend, AWithdrawnRecordIsNone) {
  Recorded pit;
  pit.session.apply({{WithdrawPit{"T3-3"}, "A", "wrong pit", {}}}).value();
  RecordDraft draft = draft_of(pit.session, "T3-3");
  EXPECT_FALSE(draft.amends);
  EXPECT_EQ(draft.note, "");
  draft.nothing_found = true;
  EXPECT_THAT(missing(draft, pit.session.model()), IsEmpty());
  pit.amend(draft);
  EXPECT_EQ(record_of(pit.session, "T3-3").bag, "");
  EXPECT_EQ(record_of(pit.session, "T3-3").crew, "lab");
}

TEST(RecordDraftAmend, APitOffTheGridKeepsItsPlace) {
  OneSurvey survey;
  Session session = survey.device.open();
  RecordPit free;
  free.pit = "Яма 1";
  free.chosen_by = std::optional<ChosenBy>(ChosenBy::kJudgement);
  free.x = std::optional<double>(12.0);
  free.y = std::optional<double>(13.0);
  session.apply({{free, "A", "", {}}}).value();
  RecordDraft draft = draft_of(session, "яма 1");
  EXPECT_EQ(draft.pit, "Яма 1");
  draft.counts[0] = "7";
  draft.nothing_found = false;
  draft.why = "counted in the lab";
  session.apply({action_of(draft, session.model(), "lab", kSaving).value()}).value();
  EXPECT_EQ(record_of(session, "Яма 1").counts[0], 7u);
  EXPECT_EQ(record_of(session, "Яма 1").place->x, 12);
}

TEST(RecordDraftAmend, AnOvertakenDraftIsNotSavedUnseen) {
  Recorded pit;
  RecordDraft draft = draft_of(pit.session, "T3-3");
  draft.depth_cm = "60";
  draft.why = "measured again";
  EXPECT_FALSE(overtaken(draft, pit.session.model()));
  EXPECT_FALSE(catch_up(&draft, pit.session.model()));

  RecordPit other;
  other.pit = "T3-3";
  other.counts[0] = 5;
  pit.session.apply({{other, "B", "more in the bag", {}}}).value();
  EXPECT_TRUE(overtaken(draft, pit.session.model()));
  const auto refused = action_of(draft, pit.session.model(), "lab", kSaving);
  ASSERT_FALSE(refused);
  EXPECT_EQ(refused.error().kind, ErrorKind::kConflict);
  EXPECT_THAT(refused.error().one_line(), HasSubstr("T3-3: its record was changed since you opened it"));

  RecordDraft seen = draft;
  EXPECT_TRUE(catch_up(&seen, pit.session.model()));
  EXPECT_FALSE(overtaken(seen, pit.session.model()));
  EXPECT_EQ(seen.depth_cm, "60");
  EXPECT_THAT(seen.counts, ElementsAre("2", ""));
  EXPECT_THAT(fields_of(said(seen, pit.session)), ElementsAre("depth_cm", "count 0"));  // what is shown is saved
}

TEST(RecordDraftAmend, ADraftIsOvertakenByAnEarlierHeadToo) {
  TwoDevices both;
  both.a.open().apply({dug("T3-3", 0)}).value();
  both.b.minute = 5;
  both.b.open().apply({dug("T3-3", 2)}).value();
  RecordDraft draft = draft_of(both.b.open(), "T3-3");
  draft.depth_cm = "50";
  draft.why = "measured";
  take_in(both.a.file, both.b.file);
  const Session session = both.b.open();
  EXPECT_EQ(action_of(draft, session.model(), "B", kSaving).error().kind, ErrorKind::kConflict);
  EXPECT_TRUE(catch_up(&draft, session.model()));
  EXPECT_TRUE(said(draft, session).status);  // all that is shown
}

TEST(RecordDraftAmend, ADraftThatWasSavedBeforeACrashHoldsNothingNew) {
  OneSurvey survey;
  Session session = survey.device.open();
  RecordDraft draft = draft_of(session, "T3-3");
  draft.counts[0] = "3";
  draft.note = "two layers";
  session.apply({action_of(draft, session.model(), "A", kSaving).value()}).value();
  EXPECT_TRUE(catch_up(&draft, session.model()));
  EXPECT_FALSE(typed_anything(draft, session.model()));
}

TEST(RecordDraftAmend, ANewDraftOvertakenByARecordAmendsIt) {
  OneSurvey survey;
  Session session = survey.device.open();
  RecordDraft draft = draft_of(session, "T3-3");
  draft.nothing_found = true;
  session.apply({dug("T3-3", 1)}).value();
  EXPECT_THAT(missing(draft, session.model()), ElementsAre("why the record is changed"));
  EXPECT_TRUE(catch_up(&draft, session.model()));
  EXPECT_TRUE(draft.amends);
  draft.why = "the other was a joke";
  EXPECT_TRUE(action_of(draft, session.model(), "A", kSaving));
  // And the other way: what it amended was withdrawn.
  session.apply({{WithdrawPit{"T3-3"}, "A", "wrong pit", {}}}).value();
  EXPECT_TRUE(catch_up(&draft, session.model()));
  EXPECT_FALSE(draft.amends);
  EXPECT_TRUE(session.apply({action_of(draft, session.model(), "A", kSaving).value()}));
}

TEST(RecordDraftAmend, AConflictIsSettledByAllThatIsShown) {
  TwoDevices both;
  Action first = dug("T3-3", 2);
  std::get<RecordPit>(first.what).depth_cm = std::optional<double>(40.0);
  Action later = dug("T3-3", 0);
  std::get<RecordPit>(later.what).depth_cm = std::optional<double>(55.0);
  std::get<RecordPit>(later.what).bag = std::optional<std::string>("9");
  both.a.open().apply({first}).value();
  both.b.minute = 5;
  both.b.open().apply({later}).value();
  take_in(both.b.file, both.a.file);
  Session session = both.a.open();

  RecordDraft draft = draft_of(session, "T3-3");
  EXPECT_TRUE(draft.amends);
  EXPECT_EQ(draft.depth_cm, "55");  // the later head
  EXPECT_TRUE(draft.nothing_found);
  EXPECT_THAT(missing(draft, session.model()), ElementsAre("why the record is changed"));
  draft.why = "the flakes were T3-4's";
  EXPECT_THAT(fields_of(said(draft, session)),
              ElementsAre("status", "reason", "started_at", "depth_cm", "stop", "note", "count 0", "count 1"));
  session.apply({action_of(draft, session.model(), "lab", kSaving).value()}).value();
  const PitEntry* entry = session.model().entry(session.model().name_of("T3-3").value());
  EXPECT_EQ(entry->heads.size(), 1u);
  EXPECT_EQ(entry->record().counts[0], 0u);
  EXPECT_EQ(entry->record().bag, "9");
}

TEST(RecordDraftAmend, AConflictWithAWithdrawalIsFilledFromTheRecordThatCounts) {
  TwoDevices both;
  both.a.open().apply({dug("T3-3", 0)}).value();
  take_in(both.a.file, both.b.file);
  both.b.minute = 5;
  both.b.open().apply({{WithdrawPit{"T3-3"}, "B", "wrong line", {}}}).value();
  both.a.open().apply({dug("T3-3", 3)}).value();
  take_in(both.b.file, both.a.file);
  Session session = both.a.open();
  RecordDraft draft = draft_of(session, "T3-3");
  EXPECT_THAT(draft.counts, ElementsAre("3", ""));
  draft.why = "dug after all";
  ASSERT_TRUE(session.apply({action_of(draft, session.model(), "A", kSaving).value()}));
  EXPECT_EQ(record_of(session, "T3-3").counts[0], 3u);
}

}  // namespace
}  // namespace nearpit
