// A survey as a session holds it in memory: the plan, its labels, and the survey folded from the log. Objects of the log <-> survey values; no writing.
#ifndef NEARPIT_SESSION_SURVEY_MODEL_H_
#define NEARPIT_SESSION_SURVEY_MODEL_H_

#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "base/clock.h"
#include "base/status.h"
#include "lattice/label.h"
#include "record/plan.h"
#include "session/log_fold.h"
#include "survey/survey.h"

namespace nearpit {

// A pit as somebody named it: a node of the frame, or a free label off the grid.
struct PitName {
  NodeId node = kNoNode;  // kNoNode: off the grid
  std::string object;     // "pit/T7-12"
  std::string label;      // as the plan writes it, or the free label
};

constexpr std::size_t kLongestFreeLabel = 40;  // code points

class SurveyModel {
 public:
  SurveyModel(Plan plan, std::unique_ptr<const SurveyGround> ground);

  const Plan& plan() const { return plan_; }
  const Labels& labels() const { return labels_; }
  const TimeZone& zone() const { return zone_; }
  const Survey& survey() const { return survey_; }
  Survey& survey() { return survey_; }

  std::string label(NodeId id) const { return labels_.write(survey_.ground().frame.node(id)); }
  std::vector<std::string> labels_of(const std::vector<NodeId>& ids) const;
  // Errors: a node label outside the frame; a text that can be no label. In the form "'T99-1' is …; legal: …".
  Result<PitName> name_of(std::string_view text) const;
  const PitEntry* entry(const PitName& pit) const;

  // Sets an object of the survey to what its heads say; appends nodes whose standing may have changed. No heads: forgets it. Error: a body that can't be read.
  Status set_object(const std::string& object, const std::vector<LogHead>& heads, std::vector<NodeId>* changed);

 private:
  Plan plan_;
  TimeZone zone_;
  Survey survey_;
  Labels labels_;
};

}  // namespace nearpit

#endif  // NEARPIT_SESSION_SURVEY_MODEL_H_
