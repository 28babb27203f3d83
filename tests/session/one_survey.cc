#include "session/one_survey.h"

#include <stdlib.h>
#include <sys/stat.h>

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <iterator>

#include "session/make_survey.h"

namespace nearpit {
namespace {

std::string plan(const std::string& require) {
  return R"plan({
  "survey": "five by five (invented)", "crs": "local", "time_zone": "Pacific/Auckland",
  "boundary": {"type": "Polygon", "coordinates": [[[0, 0], [50, 0], [50, 50], [0, 50], [0, 0]]]},
  "lattice": {"kind": "square", "spacing_m": 10, "origin": [5, 5]},
  "pit": {"shape": "square", "size_m": 0.5}, "finds": ["flake", "土器"],
  "positive": {"finds": ["flake"], "at_least": 1},
  "record": {"require": )plan" +
         require + R"plan(},
  "initial": {"draw": "listed", "as": "pits", "pits": ["T1-1", "T3-3", "T5-5"], "how": "drawn for this test"}})plan";
}

}  // namespace

TemporaryFolder::TemporaryFolder()
    : path_((std::filesystem::canonical(std::filesystem::temp_directory_path()) / "nearpit-one-XXXXXX").string()) {
  if (mkdtemp(path_.data()) == nullptr) std::abort();
}

TemporaryFolder::~TemporaryFolder() { std::filesystem::remove_all(path_); }

void put_text(const std::string& path, const std::string& text) { std::ofstream(path, std::ios::binary) << text; }

std::string text_of(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(file), {}};
}

unsigned mode_of(const std::string& path) {
  struct stat facts {};
  return ::stat(path.c_str(), &facts) == 0 ? facts.st_mode & 07777 : 0;
}

OneSurvey::OneSurvey(const std::string& require) : device(folder.path(), "one") {
  put_text(folder.path("plan.json"), plan(require));
  make_survey(folder.path("plan.json"), device.file, device.environment).value();
}

const PitRecord& record_of(const Session& session, const std::string& pit) {
  return session.model().entry(session.model().name_of(pit).value())->record();
}

}  // namespace nearpit
