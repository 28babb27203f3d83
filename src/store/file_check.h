// Is a survey file whole? Every finding says where, what, and what to do. Reads only.
#ifndef NEARPIT_STORE_FILE_CHECK_H_
#define NEARPIT_STORE_FILE_CHECK_H_

#include <string>
#include <vector>

#include "base/status.h"
#include "store/layers.h"
#include "store/survey_file.h"

namespace nearpit {

struct FileProblem {
  std::string kind;   // "pages", "identity", "schema", "chain", "gap", "orphan", "layer", …
  std::string where;  // table, revision, layer and label
  std::string what;
  std::string action;  // what to do
};

// The database's own checks (integrity_check, foreign_key_check), GeoPackage identity, our schema and triggers, the writers' sequences and SHA-256
// chains, parents that are not there.
std::vector<FileProblem> check_file(SurveyFile& file);
// The layers against what the log says they should be.
std::vector<FileProblem> check_layers(SurveyFile& file, const LayerRows& expected);

}  // namespace nearpit

#endif  // NEARPIT_STORE_FILE_CHECK_H_
