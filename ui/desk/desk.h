// The desk: the survey that is open, what is half typed, and what was chosen. Carries out what cards ask for, through the session's one write path, and
// then works out anew what they see. Knows no screen.
#ifndef NEARPIT_UI_DESK_DESK_H_
#define NEARPIT_UI_DESK_DESK_H_

#include <memory>
#include <string>
#include <vector>

#include "desk/desk_view.h"
#include "desk/draft_book.h"
#include "session/environment.h"
#include "session/preferences.h"
#include "session/session.h"

namespace nearpit::ui {

class Desk {
 public:
  // Reads the preferences; on the first start of all the glass is calibrated first. `environment` must outlive the desk.
  explicit Desk(Environment& environment);

  void carry_out(const Request& request);
  // What a new day changes: pits today, times without a date. Whether there is one.
  bool look_at_the_clock();
  // From now to the next midnight where the survey lies, at least 1.
  std::int64_t ms_to_midnight() const;
  const DeskView& view() const { return view_; }

 private:
  void carry_out_one(const ShowCard& request);
  void carry_out_one(const BrowseFolder& request);
  void carry_out_one(const OpenSurvey& request);
  void carry_out_one(const MakeSurvey& request);
  void carry_out_one(const CloseSurvey& request);
  void carry_out_one(const ChoosePit& request);
  void carry_out_one(const WalkTo& request);
  void carry_out_one(const GridPitsFirst& request);
  void carry_out_one(const OpenRecord& request);
  void carry_out_one(const KeepDraft& request);
  void carry_out_one(const DropDraft& request);
  void carry_out_one(const SaveRecord& request);
  void carry_out_one(const WithdrawRecord& request);
  void carry_out_one(const MoveRecord& request);
  void carry_out_one(const OpenNeighbours& request);
  void carry_out_one(const SetCrew& request);
  void carry_out_one(const SetDusk& request);
  void carry_out_one(const SetMillimetre& request);
  void carry_out_one(const DismissNotice& request);

  void say(const Error& error);
  void keep_preferences();
  void open(const std::string& path);
  void read_drafts();
  bool told(const Status& kept);
  void put_draft_away();
  void refuse(const std::string& label, const std::string& why);
  bool may_change(const std::string& why);
  // One write; on success the record's card closes and the list is shown.
  void write(const Action& action, const std::string& label, const std::string& done);
  void others_wrote();
  // After anything changed in the survey.
  void survey_changed();
  void figures_if_shown();
  void list_due();
  void propose();
  void draft_changed();
  ChosenPit chosen_pit(const PitName& name);
  DueRow due_row(const DigStop& stop) const;
  const Survey& survey() const { return session_->model().survey(); }
  WallTime now() const;

  Environment& environment_;
  PreferenceFile preference_file_;
  Preferences preferences_;
  std::unique_ptr<Session> session_;
  std::unique_ptr<DraftBook> book_;
  bool drafts_refused_ = false;  // the last time
  std::string today_;            // of what is shown
  NodeId walk_to_ = kNoNode;     // what the crew is walking to
  DeskView view_;
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_DESK_DESK_H_
