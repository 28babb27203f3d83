#include "field_map/map_marks.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <tuple>

namespace nearpit::ui {
namespace {

constexpr double kEdgeTolerance_m = 0.001;

int telling(const PitMark& pit) {
  if (pit.conflict) return 6;
  switch (pit.mark) {
    case Mark::kPositive:
      return 5;
    case Mark::kHalted:
      return 4;
    case Mark::kDue:
      return 3;
    case Mark::kNotDug:
      return 2;
    case Mark::kNegative:
      return 1;
    case Mark::kPlain:
      break;
  }
  return 0;
}

auto order_key(const PitMark& pit) { return std::tuple(-telling(pit), pit.node == kNoNode, pit.node, pit.free_label); }

Mark recorded_mark(const PitRecord& record, const PositiveRule& rule) {
  if (record.status == PitStatus::kNotDug) return Mark::kNotDug;
  return rule.positive(record) ? Mark::kPositive : Mark::kNegative;
}

void fill_unrecorded(const Survey& survey, PitMark* pit) {
  const DigList& list = survey.dig_list();
  if (list.halted(pit->node)) {
    pit->mark = Mark::kHalted;
  } else if (list.due(pit->node)) {
    pit->mark = Mark::kDue;
  } else if (list.in_design(pit->node)) {
    pit->mark = Mark::kNotDug;
  } else if (survey.asked_for(pit->node)) {
    pit->asked = true;
    pit->mark = list.near_stop_work(pit->node) ? Mark::kHalted : Mark::kDue;
  }
}

bool shows(const PitMark& pit) { return pit.mark != Mark::kPlain || pit.conflict; }

// Every node that may have a mark, ascending.
std::vector<NodeId> candidates(const Survey& survey) {
  const DigList& list = survey.dig_list();
  std::vector<NodeId> few = list.halted();
  for (const auto& [id, entry] : survey.pits())
    few.push_back(id);
  for (const auto& [object, area] : survey.closed_areas()) {
    if (area.open_again) continue;
    for (const NodeId id : survey.nodes_in(area)) {
      if (list.in_design(id)) few.push_back(id);
    }
  }
  const std::vector<NodeId> asked = survey.asked();
  few.insert(few.end(), asked.begin(), asked.end());
  std::sort(few.begin(), few.end());
  std::vector<NodeId> all = list.due();
  const auto middle = static_cast<std::ptrdiff_t>(all.size());
  all.insert(all.end(), few.begin(), few.end());
  std::inplace_merge(all.begin(), all.begin() + middle, all.end());
  all.erase(std::unique(all.begin(), all.end()), all.end());
  return all;
}

std::int32_t cell_number(double cells) {
  constexpr double kMost = 1 << 30;
  return static_cast<std::int32_t>(std::clamp(std::floor(cells), -kMost, kMost));
}

// Nodes lie inside their cells, never where two meet, in shifted rows too.
double node_offset(const Lattice& lattice) { return lattice.rows_shift() ? 0.25 : 0.5; }

std::int32_t cell_row(const Lattice& lattice, double v) { return cell_number(v / lattice.row_distance_m() + 0.5); }
std::int32_t cell_column(const Lattice& lattice, double u) {
  return cell_number(u / lattice.spacing_m + node_offset(lattice));
}

struct AlongBox {
  Along low{std::numeric_limits<double>::infinity(), std::numeric_limits<double>::infinity()};
  Along high{-std::numeric_limits<double>::infinity(), -std::numeric_limits<double>::infinity()};
};

Ring corners_of(const Box& box) { return {box.low, {box.high.x, box.low.y}, box.high, {box.low.x, box.high.y}}; }

// What the box measures along the lattice, a little more.
AlongBox along_box(const Lattice& lattice, const Box& box) {
  AlongBox found;
  for (const Point& corner : corners_of(box)) {
    const Along at = lattice.along(corner);
    found.low = {std::min(found.low.u, at.u - kEdgeTolerance_m), std::min(found.low.v, at.v - kEdgeTolerance_m)};
    found.high = {std::max(found.high.u, at.u + kEdgeTolerance_m), std::max(found.high.v, at.v + kEdgeTolerance_m)};
  }
  return found;
}

bool inside(const Box& box, const Point& at) {
  return at.x >= box.low.x && at.x <= box.high.x && at.y >= box.low.y && at.y <= box.high.y;
}

constexpr auto kByCell = [](const auto& a, const auto& b) {
  return a.row != b.row ? a.row < b.row : a.column < b.column;
};
constexpr auto kByColumn = [](const auto& a, const auto& b) { return a.column < b.column; };

}  // namespace

bool more_telling(const PitMark& first, const PitMark& second) { return order_key(first) < order_key(second); }

PitMark mark_of(const SurveyModel& model, NodeId id) {
  const Survey& survey = model.survey();
  const SurveyGround& ground = survey.ground();
  PitMark pit;
  pit.node = id;
  pit.place = ground.frame.ground(id);
  pit.first_sample = ground.sample.holds[static_cast<std::size_t>(id)];
  const PitEntry* entry = survey.pit(id);
  pit.conflict = entry && entry->verdict.conflict != Conflict::kNone;
  if (!entry || entry->withdrawn()) {
    fill_unrecorded(survey, &pit);
    return pit;
  }
  pit.mark = recorded_mark(entry->record(), ground.positive);
  pit.judgement = !survey.dig_list().in_design(id);
  if (entry->record().place) pit.place = *entry->record().place;
  return pit;
}

MapMarks::MapMarks(const SurveyModel& model) : lattice_(model.survey().ground().frame.lattice()) {
  const Survey& survey = model.survey();
  mark_bits_.assign(static_cast<std::size_t>(survey.ground().frame.size()) / 64 + 1, 0);
  const std::vector<NodeId> nodes = candidates(survey);
  marked_.reserve(nodes.size());
  for (const NodeId id : nodes) {
    const PitMark pit = mark_of(model, id);
    if (!shows(pit)) continue;
    marked_.push_back(pit);
    mark_bits_[static_cast<std::size_t>(id) / 64] |= std::uint64_t{1} << (id % 64);
  }
  for (const auto& [label, entry] : survey.off_grid_pits()) {
    PitMark pit;
    pit.free_label = static_cast<std::int32_t>(free_labels_.size());
    pit.place = entry.record().place.value_or(Point{});
    pit.conflict = entry.verdict.conflict != Conflict::kNone;
    if (!entry.withdrawn()) pit.mark = recorded_mark(entry.record(), survey.ground().positive);
    pit.judgement = !entry.withdrawn();
    if (!shows(pit)) continue;
    marked_.push_back(pit);
    free_labels_.push_back(label);
  }
  Level base;
  base.reserve(marked_.size());
  for (std::uint32_t i = 0; i < marked_.size(); ++i)
    base.push_back(cell_of(marked_[i], i));
  std::sort(base.begin(), base.end(), kByCell);
  levels_.push_back(std::move(base));
  while (!coarsest(levels_.back()))
    levels_.push_back(coarser(levels_.back()));
}

bool MapMarks::has_mark(NodeId id) const {
  return (mark_bits_[static_cast<std::size_t>(id) / 64] >> (id % 64) & 1) != 0;
}

// No coarser cells would bring any two together: those on both sides of the origin never meet.
bool MapMarks::coarsest(const Level& level) {
  return std::all_of(level.begin(), level.end(), [](const Cell& cell) {
    return (cell.row == 0 || cell.row == -1) && (cell.column == 0 || cell.column == -1);
  });
}

MapMarks::Cell MapMarks::cell_of(const PitMark& mark, std::uint32_t index) const {
  const Along at = lattice_.along(mark.place);
  return {cell_row(lattice_, at.v), cell_column(lattice_, at.u), index};
}

// Two rows of cells become one at a time, each of them in order already.
MapMarks::Level MapMarks::coarser(const Level& level) const {
  constexpr std::int32_t kFirst = std::numeric_limits<std::int32_t>::min();
  Level out, both;
  for (auto lower = level.begin(); lower != level.end();) {
    const std::int32_t row = lower->row >> 1;
    const auto upper = std::lower_bound(lower, level.end(), Cell{2 * row + 1, kFirst, 0}, kByCell);
    const auto end = std::lower_bound(upper, level.end(), Cell{2 * row + 2, kFirst, 0}, kByCell);
    both.resize(static_cast<std::size_t>(end - lower));
    std::merge(lower, upper, upper, end, both.begin(), kByColumn);
    for (const Cell& fine : both) {
      const Cell cell{row, fine.column >> 1, fine.mark};
      if (out.empty() || out.back().row != cell.row || out.back().column != cell.column) {
        out.push_back(cell);
      } else if (more_telling(marked_[cell.mark], marked_[out.back().mark])) {
        out.back() = cell;
      }
    }
    lower = end;
  }
  return out;
}

std::size_t MapMarks::level_of(double apart_m) const {
  if (!(apart_m > lattice_.spacing_m)) return 0;
  std::size_t level = 1;
  while (std::ldexp(lattice_.row_distance_m(), static_cast<int>(level)) < apart_m && level < 31)
    ++level;
  return level;
}

void MapMarks::visible(const Box& ground, double apart_m, std::vector<PitMark>* out) const {
  out->clear();
  const std::size_t wanted = level_of(apart_m);
  const std::size_t shift = std::min(wanted, levels_.size() - 1);
  const Level& level = levels_[shift];
  const AlongBox shown = along_box(lattice_, ground);
  const std::int32_t last_row = cell_row(lattice_, shown.high.v) >> shift;
  const std::int32_t first_column = cell_column(lattice_, shown.low.u) >> shift;
  const std::int32_t last_column = cell_column(lattice_, shown.high.u) >> shift;
  auto at = level.begin();
  for (std::int32_t row = cell_row(lattice_, shown.low.v) >> shift; row <= last_row;) {
    at = std::lower_bound(at, level.end(), Cell{row, first_column, 0}, kByCell);
    for (; at != level.end() && at->row == row && at->column <= last_column; ++at) {
      if (inside(ground, marked_[at->mark].place)) out->push_back(marked_[at->mark]);
    }
    if (at == level.end()) break;
    row = at->row > row ? at->row : row + 1;
  }
}

bool plain_nodes(const SurveyModel& model, const Box& ground, std::size_t most, std::vector<NodeId>* out) {
  out->clear();
  const Frame& frame = model.survey().ground().frame;
  const std::vector<Run>& own = frame.runs();
  if (own.empty()) return true;
  std::vector<Run> shown;
  std::size_t count = 0;
  auto at = own.begin();
  for (const Run& run : clip_to_runs(frame.lattice(), {{corners_of(ground), {}}}, {own.front().row, own.back().row})) {
    at = std::lower_bound(at, own.end(), run.row, [](const Run& a, std::int32_t row) { return a.row < row; });
    for (auto part = at; part != own.end() && part->row == run.row; ++part) {
      const std::int32_t first = std::max(run.first, part->first);
      const std::int32_t last = std::min(run.last, part->last);
      if (first > last) continue;
      shown.push_back({run.row, first, last, part->start + (first - part->first)});
      count += static_cast<std::size_t>(last - first) + 1;
      if (count > most) return false;
    }
  }
  for (const Run& run : shown) {
    for (NodeId id = run.start; id <= run.start + (run.last - run.first); ++id)
      out->push_back(id);
  }
  return true;
}

}  // namespace nearpit::ui
