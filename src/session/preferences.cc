#include "session/preferences.h"

#include <algorithm>
#include <string_view>
#include <utility>

#include "base/text.h"
#include "exchange/text_file.h"
#include "record/json_text.h"
#include "store/user_folder.h"

namespace nearpit {
namespace {

constexpr const char* kName = "window.json";
constexpr std::size_t kMostBytes = 1u << 20;
constexpr std::size_t kMostPath = 4096;
constexpr std::size_t kMostSurveys = 500;
constexpr std::size_t kMostId = 100;

bool is_path(std::string_view text) { return text.starts_with('/') && is_name(text, kMostPath); }

bool is_scale(double px_per_mm) { return px_per_mm >= kLeastPxPerMm && px_per_mm <= kMostPxPerMm; }

bool is_crew(const std::string& survey_id, const std::string& crew) {
  return is_name(survey_id, kMostId) && is_name(crew, kMostCrew);
}

// Null when the member is not there.
const Json* member(const Json& object, const char* key) {
  if (!object.is_object()) return nullptr;
  const auto found = object.find(key);
  return found == object.end() ? nullptr : &*found;
}

void take_recent(const Json& list, std::vector<std::string>* recent) {
  if (!list.is_array()) return;
  for (const Json& path : list) {
    if (recent->size() == kMostRecent) return;
    if (!path.is_string()) continue;
    const auto text = path.get<std::string>();
    if (is_path(text) && std::find(recent->begin(), recent->end(), text) == recent->end()) recent->push_back(text);
  }
}

void take_crews(const Json& crews, std::map<std::string, std::string>* crew_of) {
  if (!crews.is_object()) return;
  for (const auto& [id, crew] : crews.items()) {
    if (crew.is_string() && is_crew(id, crew.get<std::string>())) (*crew_of)[id] = crew.get<std::string>();
  }
}

Json crews_json(const std::map<std::string, std::string>& crew_of) {
  std::vector<std::pair<std::string, std::string>> kept;
  for (auto crew = crew_of.rbegin(); crew != crew_of.rend() && kept.size() < kMostSurveys; ++crew) {
    if (is_crew(crew->first, crew->second)) kept.push_back(*crew);
  }
  Json json = Json::object();
  for (const auto& [id, crew] : kept)
    json[id] = crew;
  return json;
}

}  // namespace

void opened(Preferences* preferences, const std::string& absolute_path) {
  if (!is_path(absolute_path)) return;
  std::vector<std::string>& recent = preferences->recent;
  std::erase(recent, absolute_path);
  recent.insert(recent.begin(), absolute_path);
  if (recent.size() > kMostRecent) recent.resize(kMostRecent);
}

Preferences PreferenceFile::read() const {
  Preferences preferences;
  const auto text = read_text_file(folder_ + "/" + kName, kMostBytes);
  if (folder_.empty() || !text) return preferences;
  const auto document = read_json(*text, kName);
  if (!document) return preferences;
  const Json& json = document->value;
  if (const Json* dusk = member(json, "dusk"); dusk != nullptr && dusk->is_boolean()) {
    preferences.dusk = dusk->get<bool>();
  }
  if (const Json* scale = member(json, "px_per_mm"); scale != nullptr && scale->is_number()) {
    if (is_scale(scale->get<double>())) preferences.px_per_mm = scale->get<double>();
  }
  if (const Json* recent = member(json, "recent")) take_recent(*recent, &preferences.recent);
  if (const Json* crews = member(json, "crew_of")) take_crews(*crews, &preferences.crew_of);
  return preferences;
}

Status PreferenceFile::write(const Preferences& preferences) const {
  Json json = Json::object();
  json["dusk"] = preferences.dusk;
  if (preferences.px_per_mm && is_scale(*preferences.px_per_mm)) json["px_per_mm"] = *preferences.px_per_mm;
  std::vector<std::string> recent;
  take_recent(Json(preferences.recent), &recent);
  json["recent"] = recent;
  json["crew_of"] = crews_json(preferences.crew_of);
  return replace_user_file(folder_, kName, json.dump(1) + "\n");
}

}  // namespace nearpit
