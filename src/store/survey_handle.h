// What a SurveyFile keeps behind its header.
#ifndef NEARPIT_STORE_SURVEY_HANDLE_H_
#define NEARPIT_STORE_SURVEY_HANDLE_H_

#include <string>

#include "store/sqlite_handle.h"
#include "store/survey_file.h"

namespace nearpit {

struct SurveyFile::Handle {
  store::Connection db;
  std::string path;  // as given
  bool read_only = false;
  bool too_new = false;  // its schema is a later one than this program's; then read_only
  bool broken = false;   // a step of the open transaction failed: it can't be committed
};

}  // namespace nearpit

#endif  // NEARPIT_STORE_SURVEY_HANDLE_H_
