// A batch of actions carried out on the survey in memory, one after another, all or nothing. What comes out are the revisions to write; a refused batch
// leaves the survey as it was.
#ifndef NEARPIT_SESSION_JUDGE_BATCH_H_
#define NEARPIT_SESSION_JUDGE_BATCH_H_

#include <map>
#include <set>
#include <string>
#include <vector>

#include "base/status.h"
#include "record/action.h"
#include "session/log_fold.h"
#include "session/revision_maker.h"
#include "session/survey_model.h"

namespace nearpit {

class BatchJudge {
 public:
  BatchJudge(SurveyModel& model, const LogFold& log, RevisionMaker& maker) : model_(model), log_(log), maker_(maker) {}

  // Errors: every finding of every action, each "FILE:LINE: FIELD: …"; the model is then as before.
  Status judge(const std::vector<Action>& actions);
  // Puts the model back to what the log says (the write failed).
  void take_back();

  const std::vector<Revision>& revisions() const { return revisions_; }
  // What people must hear at once: records that say work had to stop.
  const std::vector<std::string>& cautions() const { return cautions_; }
  const std::vector<NodeId>& changed_nodes() const { return changed_; }
  const std::set<std::string>& changed_objects() const { return touched_; }

 private:
  // A pit recorded by this batch, to be judged when all of it is in.
  struct Recorded {
    PitName pit;
    std::string field;  // which field of the action names the pit
    ChosenBy chosen_by;
    Origin origin;
  };

  void note_known(const std::string& text);
  Status judge_one(const Action& action);
  Status carry_out(const RecordPit& given, const Action& action);
  Status carry_out(const WithdrawPit& given, const Action& action);
  Status carry_out(const BelongsTo& given, const Action& action);
  Status carry_out(const AskNeighbours& given, const Action& action);
  Status carry_out(const CloseArea& given, const Action& action);
  Status carry_out(const ReopenArea& given, const Action& action);

  // The pit named, with a record that is not withdrawn. Errors name the field.
  Result<PitName> recorded_pit(const std::string& field, const std::string& text) const;
  const std::vector<LogHead>& heads(const std::string& object) const;
  Status write(const std::string& object, std::string body, const std::string& by, const std::string& why);
  Status write_pit(const PitName& pit, const PitRecord& record, const std::string& by, const std::string& why);
  void caution_if_stopped(const PitName& pit, const PitRecord& record);
  void remember_recorded(const PitName& pit, const std::string& field, ChosenBy chosen_by, const Origin& origin);
  std::vector<std::string> not_reached() const;
  std::string free_area_name() const;

  SurveyModel& model_;
  const LogFold& log_;
  RevisionMaker& maker_;
  std::map<std::string, std::vector<LogHead>> written_;  // by object, what this batch made of it
  std::set<std::string> touched_;
  std::map<std::string, Origin> first_rows_;  // pits of the tables, to find one that comes twice
  std::set<std::string> known_before_;        // pits that had a record or that the design reached before the batch
  std::vector<Recorded> recorded_;
  std::vector<Revision> revisions_;
  std::vector<std::string> cautions_;
  std::vector<NodeId> changed_;
};

}  // namespace nearpit

#endif  // NEARPIT_SESSION_JUDGE_BATCH_H_
