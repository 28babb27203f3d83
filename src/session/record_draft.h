// A pit's record while somebody types it: plain data, no screen. It becomes an action value when it is saved, and knows before that what is still to be said.
//
//   the pit has no record  ->  a first record: every field said is given, dug_at fills itself at saving
//   it has one             ->  a further revision: only fields that differ from what stands are given, with why
//   it is in conflict      ->  all fields shown are given, with why: that settles it
//
// What stands is, in a conflict, the later head unless that withdraws, else the record that counts (as judge_record.h takes it). A pit whose
// record is withdrawn has none.
#ifndef NEARPIT_SESSION_RECORD_DRAFT_H_
#define NEARPIT_SESSION_RECORD_DRAFT_H_

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "base/clock.h"
#include "base/status.h"
#include "record/action.h"
#include "session/survey_model.h"

namespace nearpit {

constexpr std::size_t kMostNote = 4000;  // code points
constexpr std::size_t kMostWhy = 2000;

struct RecordDraft {
  std::string pit;       // label as the plan writes it, or the free label
  std::string based_on;  // ids of the pit's last revisions when the draft was filled; empty: nobody had written of it
  bool amends = false;   // the pit has a record, or records that disagree: this becomes a further revision
  bool not_dug = false;
  std::optional<NotDugReason> reason;  // for not_dug
  bool nothing_found = false;          // said out loud; excludes counts above 0
  std::vector<std::string> counts;     // as typed, one a find of the plan; "" nothing typed
  std::string depth_cm;                // as typed: "45", "45.5"
  std::optional<StopReason> stop;
  std::string note;        // up to 4,000 code points, lines too; blank is none
  bool judgement = false;  // dug off the list because somebody thought it wise
  std::string started_at;  // ISO 8601 with offset; when the pit was opened
  std::string why;         // why a record is amended, up to 2,000 code points; needed when amends
  friend bool operator==(const RecordDraft&, const RecordDraft&) = default;
};

// Blank for a pit without a record, started now, in the survey's zone, and judgement set when the design does not reach it; else
// what stands, with "" for a count of 0 and nothing_found set when a dug pit's counts are all 0.
RecordDraft new_draft(const SurveyModel& model, const PitName& pit, const WallTime& now);

// Something was typed that would be lost: the draft differs from what new_draft would give. started_at, judgement and what the draft is based on don't count.
bool typed_anything(const RecordDraft& draft, const SurveyModel& model);

// The same, the reason for a change aside.
bool typed_beside_why(const RecordDraft& draft, const SurveyModel& model);

// Somebody wrote of the pit since the draft was filled (another program, another tablet's file; or a crash came between a save and the removal of its
// draft: then typed_anything says that nothing would be lost).
bool overtaken(const RecordDraft& draft, const SurveyModel& model);
// kConflict where it is: nothing of it may be written before somebody has looked.
Status not_overtaken(const RecordDraft& draft, const SurveyModel& model);
// Bases the draft on what stands now and keeps everything typed; true when it was overtaken, so that the person is told. To be called for drafts read
// from a file and after changes of the survey by others.
bool catch_up(RecordDraft* draft, const SurveyModel& model);

// What must still be said before it can be saved, in a crew's short words: "what was found, or 'nothing found'". Empty: it can be saved.
std::vector<std::string> missing(const RecordDraft& draft, const SurveyModel& model);

// Fields that the plan requires of a dug pit and that would stay blank if it were saved now, as `nearpit check` names them. Saving is allowed.
std::vector<std::string> blanks(const RecordDraft& draft, const SurveyModel& model, const std::string& crew);

// The action that saves the draft; `crew` says so, and has dug a pit that had no record, at `now` where the plan requires dug_at (else the session fills
// that in). Errors: kBadInput: something is missing, nothing
// was changed, `crew` is no name; kConflict: the draft is overtaken.
Result<Action> action_of(const RecordDraft& draft, const SurveyModel& model, const std::string& crew,
                         const WallTime& now);

// Typing by key pads. Digits and one '.', which is written "0." at the head; zeros at the head are dropped; anything else, and a digit beyond `most`
// digits, is not taken.
void type_digit(std::string* number, char digit_or_point, std::size_t most);
// Adds `by`, from 0 to 999999; "" and what is no number count as 0.
void step_count(std::string* count, int by);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_RECORD_DRAFT_H_
