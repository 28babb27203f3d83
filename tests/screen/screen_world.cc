#include "screen/screen_world.h"

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <memory>

#include "session/make_survey.h"
#include "session/preferences.h"

namespace nearpit::ui {
namespace {

constexpr std::int64_t kMorning_ms = 1'777'885'200'000;  // 2026-05-04T09:00:00Z
constexpr std::int64_t kMinute_ms = 60'000;

class WorldClock : public Clock {
 public:
  explicit WorldClock(const std::int64_t* minute) : minute_(minute) {}
  WallTime now() override { return {kMorning_ms + *minute_ * kMinute_ms, 0}; }

 private:
  const std::int64_t* minute_;
};

std::string json_list(const std::vector<std::string>& words) {
  std::string list;
  for (const std::string& word : words)
    list += (list.empty() ? "\"" : ", \"") + word + "\"";
  return "[" + list + "]";
}

std::string new_folder() {
  std::string name = std::filesystem::canonical(std::filesystem::temp_directory_path()) / "nearpit-screen-XXXXXX";
  if (mkdtemp(name.data()) == nullptr) std::abort();
  return name;
}

}  // namespace

std::string plan_text(const PlanSays& says) {
  const std::string edge = std::to_string(says.side * 10);
  const std::vector<std::string> telling(says.finds.begin(),
                                         says.finds.begin() + std::min<long>(2, static_cast<long>(says.finds.size())));
  std::string text = "{\"survey\": \"" + says.survey +
                     "\", \"crs\": \"local\",\n\"boundary\": {\"type\": \"Polygon\", " +
                     "\"coordinates\": [[[0, 0], [" + edge + ", 0], [" + edge + ", " + edge + "], [0, " + edge +
                     "], [0, 0]]]},\n\"lattice\": {\"kind\": \"square\", \"spacing_m\": 10, \"origin\": [5, 5]},\n" +
                     "\"pit\": {\"shape\": \"square\", \"size_m\": 0.5},\n\"finds\": " + json_list(says.finds) +
                     ",\n\"positive\": {\"finds\": " + json_list(telling) + ", \"at_least\": 1},\n";
  if (!says.crews.empty()) text += "\"crews\": " + json_list(says.crews) + ",\n";
  if (!says.require.empty()) text += "\"record\": {\"require\": " + json_list(says.require) + "},\n";
  return text + "\"initial\": {\"draw\": \"listed\", \"as\": \"pits\", \"how\": \"drawn for this test\", \"pits\": " +
         json_list(says.first_sample) + "}}\n";
}

ScreenWorld::ScreenWorld() : folder_(new_folder()), user_folder_(new_folder()), reader_(environment("reader")) {
  // The window's list of places begins with the home folder.
  setenv("HOME", folder_.c_str(), 1);
}

ScreenWorld::~ScreenWorld() {
  std::error_code ignored;
  std::filesystem::remove_all(folder_, ignored);
  std::filesystem::remove_all(user_folder_, ignored);
}

void ScreenWorld::put(const std::string& name, const std::string& text) const {
  std::ofstream(path(name), std::ios::binary) << text;
}

void ScreenWorld::measured(double px_per_mm, bool dusk) const {
  const PreferenceFile file(user_folder_);
  Preferences preferences = file.read();
  preferences.dusk = dusk;
  preferences.px_per_mm = px_per_mm > 0 ? std::optional(px_per_mm) : std::nullopt;
  file.write(preferences).value();
}

std::string ScreenWorld::make(const PlanSays& says, const std::string& name) {
  put(name + ".json", plan_text(says));
  Environment maker = environment();
  make_survey(path(name + ".json"), path(name + ".gpkg"), maker).value();
  return path(name + ".gpkg");
}

Environment ScreenWorld::environment(const std::string& device) const {
  Environment environment;
  environment.clock = std::make_unique<WorldClock>(&minute);
  environment.memory = WriterMemory(user_folder_ + (device == "tablet" ? "" : "/" + device));
  environment.device = device;
  environment.user_folder = user_folder_;
  return environment;
}

Session ScreenWorld::read(const std::string& file) { return Session::open(file, reader_, true).value(); }

const PitRecord* ScreenWorld::record(const Session& session, const std::string& pit) const {
  const auto name = session.model().name_of(pit);
  const PitEntry* entry = name ? session.model().entry(*name) : nullptr;
  return entry == nullptr || entry->withdrawn() ? nullptr : &entry->record();
}

void ScreenWorld::apply_elsewhere(const std::string& file, const std::vector<Action>& actions) const {
  Environment other = environment("other");
  Session::open(file, other, false).value().apply(actions).value();
}

void ScreenWorld::write_elsewhere(const std::string& file, const std::string& pit, std::uint32_t found) const {
  Environment other = environment("other");
  Session session = Session::open(file, other, false).value();
  RecordPit record;
  record.pit = pit;
  record.status.emplace(PitStatus::kDug);
  record.counts[0] = found;
  const bool again = session.model().entry(*session.model().name_of(pit)) != nullptr;
  session.apply({{record, "other crew", again ? "counted again" : "", {}}}).value();
}

}  // namespace nearpit::ui
