// What the file's layers should say: derived from the survey in memory, whole or for the nodes that changed.
#ifndef NEARPIT_SESSION_LAYER_CONTENT_H_
#define NEARPIT_SESSION_LAYER_CONTENT_H_

#include <set>
#include <string>
#include <vector>

#include "session/survey_model.h"
#include "store/layers.h"

namespace nearpit {

LayerRows layer_rows(const SurveyModel& model);

// `nodes` may hold a node twice; `objects` are the log's objects that a write touched.
LayerChanges layer_changes(const SurveyModel& model, std::vector<NodeId> nodes, const std::set<std::string>& objects);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_LAYER_CONTENT_H_
