#include "exchange/pits_csv.h"

#include <map>
#include <utility>

#include "base/clock.h"
#include "base/numbers.h"
#include "base/text.h"
#include "exchange/csv_table.h"
#include "exchange/pit_cells.h"
#include "exchange/pits_columns.h"
#include "exchange/table_findings.h"

namespace nearpit {
namespace {

constexpr NumberRange kDepth_cm{0, 1000};
constexpr NumberRange kMesh_mm{0, 100, true};
constexpr NumberRange kGround_m{-1e8, 1e8};

std::optional<bool> yes_or_no(std::string_view text) {
  if (text == "yes") return true;
  if (text == "no") return false;
  return std::nullopt;
}

bool holds_time(const Given<PitTime>& time) { return time && *time; }

Given<std::string> text_of(const Given<PitTime>& time) {
  if (!time) return std::nullopt;
  if (!*time) return Given<std::string>(std::in_place);
  return Given<std::string>(std::in_place, (*time)->text);
}

// A time and a date alone can't be put in order: the date may be any time of its day.
void check_order(const Given<PitTime>& started, const Given<PitTime>& dug, const PitCells& cells) {
  if (!holds_time(started) || !holds_time(dug)) return;
  const ParsedTime& from = (*started)->parsed;
  const ParsedTime& to = (*dug)->parsed;
  if (from.date_only != to.date_only || to.time.utc_ms >= from.time.utc_ms) return;
  cells.refuse(PitColumn::kDugAt, in_quotes(cells.text(PitColumn::kDugAt)) + " is before started_at " +
                                      in_quotes(cells.text(PitColumn::kStartedAt)) + "; correct one of the two");
}

// Counts and weights of a pit that was not dug.
template <class T>
void clear_zeros(const std::string& prefix, const Plan& plan, const PitCells& cells,
                 std::map<std::size_t, std::optional<T>>* values) {
  for (auto& [find, value] : *values) {
    if (value && *value > T{0}) {
      cells.refuse(prefix + plan.finds[find], in_quotes(format_trimmed(static_cast<double>(*value), 6)) +
                                                  " doesn't go with status not_dug; clear it or write status dug");
    }
    value.reset();
  }
}

void check_not_dug(const Plan& plan, const PitCells& cells, RecordPit* record) {
  if (cells.cleared(PitColumn::kReason)) {
    cells.refuse(PitColumn::kReason, "missing; status not_dug needs one; legal: " + all_not_dug_reasons());
  }
  for (const PitColumn column : {PitColumn::kDepth, PitColumn::kStop}) {
    if (!cells.filled(column)) continue;
    cells.refuse(column,
                 in_quotes(cells.text(column)) + " doesn't go with status not_dug; clear it or write status dug");
  }
  clear_zeros("find:", plan, cells, &record->counts);
  clear_zeros("weight:", plan, cells, &record->weights_g);
}

template <class T>
bool says(const Given<T>& given, T value) {
  return given && *given == value;
}

// What must hold within a row, whatever the survey's state.
void check_row(const Plan& plan, const PitCells& cells, RecordPit* record) {
  if (record->status) {
    const PitStatus status = record->status->value_or(PitStatus::kDug);
    if (status == PitStatus::kNotDug) check_not_dug(plan, cells, record);
    if (status != PitStatus::kNotDug && cells.filled(PitColumn::kReason)) {
      cells.refuse(PitColumn::kReason, in_quotes(cells.text(PitColumn::kReason)) +
                                           " goes with status not_dug only; clear it or write status not_dug");
    }
    if (status == PitStatus::kWithdrawn && !cells.filled(PitColumn::kWhy)) {
      cells.refuse(PitColumn::kWhy, "missing; say why the record is withdrawn");
    }
  }
  if (cells.cleared(PitColumn::kNote)) {
    if (says(record->reason, NotDugReason::kOther)) {
      cells.refuse(PitColumn::kNote, "missing; reason \"other\" needs one that says why");
    }
    if (says(record->stop, StopReason::kOther)) {
      cells.refuse(PitColumn::kNote, "missing; stop \"other\" needs one that says why");
    }
  }
  const bool x = cells.filled(PitColumn::kX);
  const PitColumn other = x ? PitColumn::kY : PitColumn::kX;
  if (x != cells.filled(PitColumn::kY) && cells.cleared(other)) cells.refuse(other, "missing; x and y go together");
}

void read_finds(const PitsColumns& columns, const Plan& plan, const PitCells& cells, RecordPit* record) {
  for (const auto& [find, field] : columns.counts) {
    if (const auto count = cells.count(field, "find:" + plan.finds[find])) record->counts.emplace(find, *count);
  }
  for (const auto& [find, field] : columns.weights) {
    if (const auto grams = cells.weight(field, "weight:" + plan.finds[find])) record->weights_g.emplace(find, *grams);
  }
}

RecordPit read_record(const PitsColumns& columns, const Plan& plan, const PitCells& cells) {
  RecordPit record;
  record.pit = cells.name(PitColumn::kPit).value_or(std::nullopt).value_or("");
  record.status = cells.word_of(PitColumn::kStatus, pit_status_of, all_pit_statuses());
  record.reason = cells.word_of(PitColumn::kReason, not_dug_reason_of, all_not_dug_reasons());
  record.crew = cells.name(PitColumn::kCrew);
  const Given<PitTime> started = cells.time(PitColumn::kStartedAt);
  const Given<PitTime> dug = cells.time(PitColumn::kDugAt);
  check_order(started, dug, cells);
  record.started_at = text_of(started);
  record.dug_at = text_of(dug);
  record.depth_cm = cells.number(PitColumn::kDepth, kDepth_cm);
  record.stop = cells.word_of(PitColumn::kStop, stop_reason_of, all_stop_reasons());
  record.chosen_by = cells.word_of(PitColumn::kChosenBy, chosen_by_of, all_chosen_by());
  record.x = cells.number(PitColumn::kX, kGround_m);
  record.y = cells.number(PitColumn::kY, kGround_m);
  record.moved = cells.note(PitColumn::kMoved);
  record.mesh_mm = cells.number(PitColumn::kMesh, kMesh_mm);
  record.backfilled = cells.word_of(PitColumn::kBackfilled, yes_or_no, "yes, no");
  record.bag = cells.name(PitColumn::kBag);
  record.note = cells.note(PitColumn::kNote);
  read_finds(columns, plan, cells, &record);
  check_row(plan, cells, &record);
  return record;
}

// The labels of the rows so far, to find one that comes again.
class LabelsSeen {
 public:
  void check(const PitCells& cells) {
    const std::string_view label = cells.text(PitColumn::kPit);
    if (label.empty()) {
      if (cells.cleared(PitColumn::kPit))
        cells.refuse(PitColumn::kPit, "is empty; write the pit's label, such as T7-12");
      return;
    }
    const auto [first, fresh] = lines_.emplace(fold_case(label), cells.line());
    if (fresh) return;
    cells.refuse(PitColumn::kPit, in_quotes(label) + " stands twice, first on line " + std::to_string(first->second) +
                                      "; keep one row for each pit");
  }

 private:
  std::map<std::string, int> lines_;
};

}  // namespace

Result<std::vector<Action>> read_pits_csv(std::string_view text, const std::string& file, const Plan& plan) {
  NEARPIT_ASSIGN(zone, TimeZone::named(plan.time_zone));
  std::vector<CsvFault> faults;
  NEARPIT_ASSIGN(table, read_csv(text, file, &faults));
  TableFindings findings(file);
  const PitsColumns columns = PitsColumns::of(table, plan.finds, &findings);
  for (const CsvFault& fault : faults)
    findings.add(fault.line, "", fault.what);
  if (table.rows.empty() && faults.empty()) {
    findings.add(table.header_line, "", "no rows below the header; write one for each pit");
  }
  LabelsSeen seen;
  std::vector<Action> actions;
  for (const CsvRow& row : table.rows) {
    const PitCells cells(row, columns, zone, &findings);
    seen.check(cells);
    Action action;
    action.what = read_record(columns, plan, cells);
    action.by = cells.name(PitColumn::kBy).value_or(std::nullopt).value_or("");
    action.why = cells.note(PitColumn::kWhy).value_or(std::nullopt).value_or("");
    action.origin = {file, row.line};
    actions.push_back(std::move(action));
  }
  if (!findings.none()) return findings.error();
  return actions;
}

}  // namespace nearpit
