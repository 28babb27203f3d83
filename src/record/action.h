// Action values: everything that changes a survey, as data. A tap, a command, a table row and a replayed test all make these, and the session alone
// carries them out (one write path). schema/action.schema.json describes the JSON form.
#ifndef NEARPIT_RECORD_ACTION_H_
#define NEARPIT_RECORD_ACTION_H_

#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "base/status.h"
#include "lattice/polygon.h"
#include "survey/pit_record.h"

namespace nearpit {

// Where an action came from, for error lines. The place is empty when it came from no file.
struct Origin {
  std::string place;  // the file's name as it was given: "PITS.csv", "ACTION.json"
  int line = 0;       // of the row or action, counted from 1
};

// A field that was given: a value, or empty to clear it. A field not given keeps its value (new records: its default).
template <class T>
using Given = std::optional<std::optional<T>>;

// Record a pit, or a further revision of its record. All text is checked for its form already; what depends on the survey's
// state (due, judgement, conflict) is judged by the session.
struct RecordPit {
  std::string pit;  // as written
  Given<PitStatus> status;
  Given<NotDugReason> reason;
  Given<std::string> crew;
  Given<std::string> started_at;
  Given<std::string> dug_at;
  Given<double> depth_cm;
  Given<StopReason> stop;
  Given<ChosenBy> chosen_by;
  Given<double> x;
  Given<double> y;
  Given<std::string> moved;
  Given<double> mesh_mm;
  Given<bool> backfilled;
  Given<std::string> bag;
  Given<std::string> note;
  std::map<std::size_t, std::optional<std::uint32_t>> counts;  // by index of the plan's finds; nothing: cleared (0)
  std::map<std::size_t, std::optional<double>> weights_g;
};

struct WithdrawPit {
  std::string pit;
};
// The record of `pit` belongs to `other`: withdrawn here, recorded there.
struct BelongsTo {
  std::string pit;
  std::string other;
};
// A judgement positive opens its neighbours, as judgement pits.
struct AskNeighbours {
  std::string pit;
};
struct CloseArea {
  std::string name;  // empty: "closed area n"
  MultiPolygon polygon;
  std::vector<std::int32_t> rows;
  NotDugReason reason = NotDugReason::kOther;
};
struct ReopenArea {
  std::string area;  // name
};
struct Action {
  std::variant<RecordPit, WithdrawPit, BelongsTo, AskNeighbours, CloseArea, ReopenArea> what;
  std::string by;  // who says so; may be empty for rows of a table
  std::string why;
  Origin origin;
};

// One action or a list of them. Error lines begin "FILE:LINE: ".
Result<std::vector<Action>> read_actions(std::string_view text, const std::string& file);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_ACTION_H_
