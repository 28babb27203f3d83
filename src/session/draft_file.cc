#include "session/draft_file.h"

#include <algorithm>
#include <filesystem>
#include <optional>
#include <string_view>
#include <system_error>

#include "exchange/text_file.h"
#include "record/json_text.h"
#include "store/user_folder.h"

namespace nearpit {
namespace {

constexpr std::size_t kMostBytes = 4u << 20;
constexpr int kMostKept = 1000;

// ---- to JSON ----

template <class Word>
void put_word(Json* json, const char* key, const std::optional<Word>& value) {
  if (value) (*json)[key] = std::string(word(*value));
}

Json draft_json(const RecordDraft& draft) {
  Json json = Json::object();
  json["pit"] = draft.pit;
  json["based_on"] = draft.based_on;
  json["amends"] = draft.amends;
  json["not_dug"] = draft.not_dug;
  put_word(&json, "reason", draft.reason);
  json["nothing_found"] = draft.nothing_found;
  json["counts"] = draft.counts;
  json["depth_cm"] = draft.depth_cm;
  put_word(&json, "stop", draft.stop);
  json["note"] = draft.note;
  json["judgement"] = draft.judgement;
  json["started_at"] = draft.started_at;
  json["why"] = draft.why;
  return json;
}

// ---- from JSON ----

// The members of one draft. A member that is not there keeps its default; one of another kind is wrong.
class DraftMembers {
 public:
  explicit DraftMembers(const Json& json) : json_(json), ok_(json.is_object()) {}

  void take(const char* key, bool* value) {
    const Json* found = find(key);
    if (found != nullptr && expect(found->is_boolean())) *value = found->get<bool>();
  }
  void take(const char* key, std::string* value) {
    const Json* found = find(key);
    if (found != nullptr && expect(found->is_string())) *value = found->get<std::string>();
  }
  void take(const char* key, std::vector<std::string>* values) {
    const Json* found = find(key);
    if (found == nullptr || !expect(found->is_array())) return;
    for (const Json& value : *found) {
      if (expect(value.is_string())) values->push_back(value.get<std::string>());
    }
  }
  template <class Word>
  void take_word(const char* key, std::optional<Word> (*of)(std::string_view), std::optional<Word>* value) {
    std::string text;
    take(key, &text);
    *value = of(text);
  }
  bool has(const char* key) const { return find(key) != nullptr; }
  bool ok() const { return ok_; }

 private:
  const Json* find(const char* key) const {
    if (!json_.is_object()) return nullptr;
    const auto found = json_.find(key);
    return found == json_.end() ? nullptr : &*found;
  }
  bool expect(bool right) {
    ok_ = ok_ && right;
    return right;
  }

  const Json& json_;
  bool ok_;
};

std::optional<RecordDraft> draft_of(const Json& json) {
  RecordDraft draft;
  DraftMembers members(json);
  if (!members.has("pit")) return std::nullopt;
  members.take("pit", &draft.pit);
  members.take("based_on", &draft.based_on);
  members.take("amends", &draft.amends);
  members.take("not_dug", &draft.not_dug);
  members.take_word("reason", not_dug_reason_of, &draft.reason);
  members.take("nothing_found", &draft.nothing_found);
  members.take("counts", &draft.counts);
  members.take("depth_cm", &draft.depth_cm);
  members.take_word("stop", stop_reason_of, &draft.stop);
  members.take("note", &draft.note);
  members.take("judgement", &draft.judgement);
  members.take("started_at", &draft.started_at);
  members.take("why", &draft.why);
  return members.ok() ? std::optional(draft) : std::nullopt;
}

// Nothing when the text is no list of drafts as this program writes it.
std::optional<std::vector<RecordDraft>> drafts_of(const std::string& text) {
  const auto document = read_json(text, "drafts");
  if (!document || !document->value.is_object()) return std::nullopt;
  const auto list = document->value.find("drafts");
  if (list == document->value.end() || !list->is_array()) return std::nullopt;
  std::vector<RecordDraft> drafts;
  for (const Json& json : *list) {
    auto draft = draft_of(json);
    if (!draft) return std::nullopt;
    drafts.push_back(std::move(*draft));
  }
  return drafts;
}

// Moves what is at the path to the first free name beside it. What can't be moved stays.
void keep_aside(const std::string& path) {
  std::error_code failed;
  for (int number = 1; number <= kMostKept; ++number) {
    const std::string aside = path + ".unreadable" + (number == 1 ? "" : "-" + std::to_string(number));
    if (std::filesystem::symlink_status(aside, failed).type() != std::filesystem::file_type::not_found) continue;
    std::filesystem::rename(path, aside, failed);
    return;
  }
}

}  // namespace

DraftFile::DraftFile(std::string folder, const std::string& survey_id)
    : folder_(std::move(folder)), name_(name_for_survey("drafts", survey_id) + ".json") {}

std::vector<RecordDraft> DraftFile::read() const {
  if (folder_.empty()) return {};
  const std::string path = folder_ + "/" + name_;
  const auto text = read_text_file(path, kMostBytes);
  if (!text && text.error().kind == ErrorKind::kNotFound) return {};
  auto drafts = text ? drafts_of(*text) : std::nullopt;
  if (drafts) return std::move(*drafts);
  keep_aside(path);
  return {};
}

Status DraftFile::write(const std::vector<RecordDraft>& drafts) const {
  if (drafts.empty()) return remove_user_file(folder_, name_);
  Json list = Json::array();
  for (const RecordDraft& draft : drafts)
    list.push_back(draft_json(draft));
  Json json = Json::object();
  json["drafts"] = std::move(list);
  // What is not UTF-8 is written with replacement characters: the rest must not be lost for it.
  const std::string text = json.dump(1, ' ', false, Json::error_handler_t::replace) + "\n";
  if (text.size() > kMostBytes) {
    return Error(ErrorKind::kBadInput, "half-typed records: " + std::to_string(text.size()) + " bytes, more than the " +
                                           std::to_string(kMostBytes) + " that are kept; save or discard some");
  }
  return replace_user_file(folder_, name_, text);
}

}  // namespace nearpit
