// One tablet with one small invented survey on a real file, and a folder for other files, for tests of what stands around a session.
#ifndef NEARPIT_TESTS_SESSION_ONE_SURVEY_H_
#define NEARPIT_TESTS_SESSION_ONE_SURVEY_H_

#include <string>

#include "session/two_devices.h"

namespace nearpit {

class TemporaryFolder {
 public:
  TemporaryFolder();
  TemporaryFolder(const TemporaryFolder&) = delete;
  TemporaryFolder& operator=(const TemporaryFolder&) = delete;
  ~TemporaryFolder();
  const std::string& path() const { return path_; }
  std::string path(const std::string& name) const { return path_ + "/" + name; }

 private:
  std::string path_;
};

void put_text(const std::string& path, const std::string& text);
std::string text_of(const std::string& path);
unsigned mode_of(const std::string& path);

// Five pits by five in the zone Pacific/Auckland; the first sample is T1-1, T3-3 and T5-5, a pit with a flake is positive. `require` is a list of JSON.
class OneSurvey {
 public:
  explicit OneSurvey(const std::string& require = "[]");

  TemporaryFolder folder;
  Device device;
};

const PitRecord& record_of(const Session& session, const std::string& pit);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SESSION_ONE_SURVEY_H_
