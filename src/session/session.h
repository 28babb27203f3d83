// A survey file under work: open it, ask it, change it. The one write path: apply() checks action values, carries them out in memory, writes them
// in one transaction, and answers with the new revision. Derived figures are cached by revision.
#ifndef NEARPIT_SESSION_SESSION_H_
#define NEARPIT_SESSION_SESSION_H_

#include <functional>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "base/status.h"
#include "estimate/figures.h"
#include "record/action.h"
#include "session/dig_order.h"
#include "session/environment.h"
#include "session/survey_model.h"
#include "store/file_check.h"
#include "store/survey_file.h"

namespace nearpit {

struct Applied {
  std::size_t actions = 0;
  std::size_t revisions = 0;
  std::vector<std::string> notes;  // what the person should know: a new writer began, who this is can't be remembered
};

struct CheckReport {
  bool whole = false;
  bool complete = false;
  std::vector<FileProblem> problems;  // what makes it not whole first, then what makes it not complete
};

class Session {
 public:
  // Errors: as SurveyFile::open; a plan or a record in the file that can't be read.
  static Result<Session> open(const std::string& path, Environment& environment, bool read_only);

  // All or nothing. Errors: every finding of the batch; the file can't be written (then nothing was recorded). What others wrote meanwhile is taken in first;
  // `still_holds`, if given, then looks at the survey while nobody else can write, and its error refuses everything.
  Result<Applied> apply(const std::vector<Action>& actions,
                        const std::function<Status(const SurveyModel&)>& still_holds = {});

  DigOrder dig_order(const std::string& crew, const std::optional<Point>& from) const;
  // All records, or only revisions whose wall time lies not later than the day (2026-05-04, in the plan's zone).
  const Figures& figures();
  Result<Figures> figures_of_day(const std::string& day);
  // What was written of a pit, oldest first; withdrawn records too. Errors: the file can't be read.
  struct PastRecord {
    WallTime at;
    std::string by;
    std::string why;
    PitRecord record;
  };
  Result<std::vector<PastRecord>> history(const PitName& pit);
  // Everything that check_survey says of this file.
  CheckReport check();

  const SurveyModel& model() const { return *model_; }
  const SurveyFile& file() const { return file_; }
  // How many revisions the log holds; figures and lists are of this revision.
  std::int64_t revision() const { return log_.revisions(); }
  const std::string& survey_id() const { return survey_id_; }
  // Wall time of the last revision in the file, by order of writing; nothing while there is none.
  const std::optional<WallTime>& last_written() const { return last_written_; }

 private:
  Session(SurveyFile file, Environment& environment, std::unique_ptr<SurveyModel> model)
      : file_(std::move(file)), environment_(&environment), model_(std::move(model)) {}

  // Reads what the file holds beyond what is in memory.
  Status catch_up();
  FigureSettings figure_settings() const;

  SurveyFile file_;
  Environment* environment_;
  std::unique_ptr<SurveyModel> model_;
  LogFold log_;
  std::int64_t last_rowid_ = 0;
  std::optional<WallTime> last_written_;
  std::string survey_id_;
  std::optional<Figures> figures_;
  std::int64_t figures_revision_ = -1;
};

// The check of a survey file, also of one whose plan or records can't be read. Errors: no such file; not a survey file; pages that can't be read.
Result<CheckReport> check_survey(const std::string& path, Environment& environment);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_SESSION_H_
