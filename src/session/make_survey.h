// A plan file becomes a survey file: everything is read and checked, the first sample drawn, the file written in one go.
#ifndef NEARPIT_SESSION_MAKE_SURVEY_H_
#define NEARPIT_SESSION_MAKE_SURVEY_H_

#include <string>
#include <vector>

#include "base/status.h"
#include "session/environment.h"

namespace nearpit {

struct MadeArea {
  std::string name;
  std::uint32_t primary_units = 0;
  std::size_t drawn = 0;
};

struct MadeSurvey {
  std::string survey;
  std::string units;      // what the areas' primary units are called: pits, transects, systematic starts
  std::int64_t pits = 0;  // of the frame
  std::int64_t first_sample = 0;
  double boundary_m2 = 0;
  std::string crs;
  std::vector<MadeArea> areas;
  std::vector<std::string> warnings;
};

// Errors: everything that is wrong with the plan; `file` exists; the folder can't be written.
Result<MadeSurvey> make_survey(const std::string& plan_path, const std::string& file, Environment& environment);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_MAKE_SURVEY_H_
