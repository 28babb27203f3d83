#include "record/action.h"

#include <algorithm>
#include <array>
#include <utility>

#include "base/text.h"
#include "lattice/frame.h"
#include "record/action_keys.h"
#include "record/json_fields.h"

namespace nearpit {
namespace {

constexpr std::size_t kMostActions = 10'000;
constexpr std::size_t kLongestLabel = 60;
constexpr std::size_t kLongestName = 100;

// Words of later versions: known, and not carried out by this one.
constexpr std::array<std::string_view, 7> kNotYet{"stop_work",   "lift",         "settle",       "share",
                                                  "acknowledge", "close_survey", "reopen_survey"};

std::string label(const Fields& action, std::string_view key) {
  return action.name(key, Need::kRequired, kLongestLabel).value_or("");
}

std::vector<std::int32_t> rows_of(const Fields& action, const Json& value) {
  std::vector<std::int32_t> rows;
  const std::string legal = "a list of 1 to 100000 row numbers";
  if (!value.is_array() || value.empty() || value.size() > 100'000) {
    action.findings()->add(action.at("rows"), shown(value) + " is no list of rows; legal: " + legal);
    return rows;
  }
  for (std::size_t i = 0; i < value.size(); ++i) {
    const std::string place = child_pointer(action.at("rows"), i);
    const auto row = whole_of(action.findings(), value[i], place, 1, kMostNodes);
    if (row) rows.push_back(static_cast<std::int32_t>(*row));
  }
  std::sort(rows.begin(), rows.end());
  if (const auto twice = std::adjacent_find(rows.begin(), rows.end()); twice != rows.end()) {
    action.findings()->add(action.at("rows"), "row " + std::to_string(*twice) + " stands twice; legal: each row once");
  }
  return rows;
}

void read_ground_to_close(const Fields& action, CloseArea* close) {
  const Json* polygon = action.find("polygon");
  const Json* rows = action.find("rows");
  if (polygon != nullptr && rows != nullptr) {
    return action.refuse("rows", "has no place beside \"polygon\"; give one of them");
  }
  if (polygon == nullptr && rows == nullptr) {
    return action.findings()->add_missing(
        action.pointer(), "polygon", "a Polygon or MultiPolygon in ground metres, or \"rows\": a list of row numbers");
  }
  if (rows != nullptr) {
    close->rows = rows_of(action, *rows);
  } else {
    close->polygon = geometry_of(action.findings(), *polygon, action.at("polygon"), closed_polygon_keys());
  }
}

// `why_needed` is set when the reason does not say enough by itself.
CloseArea close_area(const Fields& action, bool* why_needed) {
  CloseArea close;
  close.name = action.name("area", Need::kOptional, kLongestName).value_or("");
  read_ground_to_close(action, &close);
  *why_needed = false;
  const std::string legal = "one of " + all_not_dug_reasons();
  const Json* reason = action.take("reason", Need::kRequired, legal);
  if (reason == nullptr) return close;
  const auto known = reason->is_string() ? not_dug_reason_of(reason->get_ref<const std::string&>()) : std::nullopt;
  if (!known) action.findings()->add(action.at("reason"), shown(*reason) + " is no reason; legal: " + legal);
  close.reason = known.value_or(NotDugReason::kOther);
  *why_needed = known == NotDugReason::kOther;
  return close;
}

// The part that depends on the word.
void read_what(const std::string& word, const Fields& fields, Action* action) {
  bool why_needed = true;
  if (word == "withdraw") {
    action->what = WithdrawPit{label(fields, "pit")};
  } else if (word == "belongs_to") {
    BelongsTo moved{label(fields, "pit"), label(fields, "other")};
    if (!moved.pit.empty() && moved.pit == moved.other) {
      fields.findings()->add(fields.at("other"), in_quotes(moved.other) + " is the pit itself; legal: another pit");
    }
    action->what = std::move(moved);
  } else if (word == "ask_neighbours") {
    action->what = AskNeighbours{label(fields, "pit")};
  } else if (word == "close_area") {
    action->what = close_area(fields, &why_needed);
  } else {
    action->what = ReopenArea{fields.name("area", Need::kRequired, kLongestName).value_or("")};
  }
  action->by = fields.name("by", Need::kRequired, kLongestName).value_or("");
  action->why = fields.note("why", why_needed ? Need::kRequired : Need::kOptional, 2000).value_or("");
}

// What is wrong with the word itself; empty when nothing is.
std::string word_problem(const Json& word) {
  const std::string legal = "; legal: " + quoted_list(action_words());
  if (!word.is_string()) return shown(word) + " is no action" + legal;
  const auto& text = word.get_ref<const std::string&>();
  const std::span<const std::string_view> known = action_words();
  if (std::find(known.begin(), known.end(), text) != known.end()) return "";
  if (std::find(kNotYet.begin(), kNotYet.end(), text) != kNotYet.end()) {
    return shown(word) + " is not carried out by this version" + legal;
  }
  if (text == "record")
    return shown(word) + " is not taken from here; record pits with nearpit log FILE PITS.csv" + legal;
  return shown(word) + " is no action" + legal;
}

Action read_action(const Json& json, const std::string& pointer, const std::string& file, Findings* findings) {
  Action action;
  action.origin = {file, findings->line(pointer)};
  if (!json.is_object()) {
    findings->add(pointer, shown(json) + " is no action; legal: {\"action\": …, \"by\": …, …}");
    return action;
  }
  const auto word = json.find("action");
  if (word == json.end()) {
    findings->add_missing(pointer, "action", quoted_list(action_words()));
    return action;
  }
  const std::string problem = word_problem(*word);
  if (!problem.empty()) {
    findings->add(child_pointer(pointer, "action"), problem);
    return action;
  }
  const auto name = word->get<std::string>();
  const Fields fields(findings, json, pointer, action_keys(name));
  read_what(name, fields, &action);
  return action;
}

}  // namespace

Result<std::vector<Action>> read_actions(std::string_view text, const std::string& file) {
  NEARPIT_ASSIGN(document, read_json(text, file));
  Findings findings(document, file);
  std::vector<Action> actions;
  const Json& json = document.value;
  if (!json.is_array()) {
    actions.push_back(read_action(json, "", file, &findings));
  } else if (json.empty() || json.size() > kMostActions) {
    findings.add("",
                 "a list of " + std::to_string(json.size()) + " actions; legal: 1 to " + std::to_string(kMostActions));
  } else {
    for (std::size_t i = 0; i < json.size(); ++i) {
      actions.push_back(read_action(json[i], child_pointer("", i), file, &findings));
    }
  }
  if (!findings.none()) return findings.error();
  return actions;
}

}  // namespace nearpit
