#include "support/drawn_survey.h"

#include <algorithm>
#include <cstdlib>
#include <iostream>

namespace nearpit {
namespace {

constexpr double kSpacing_m = 10;

char drawn_at(const Picture& picture, const Node& node) {
  const auto row = static_cast<std::size_t>(node.row - 1);
  const auto column = static_cast<std::size_t>(node.column - 1);
  return row < picture.size() && column < picture[row].size() ? picture[row][column] : ' ';
}

bool in_first_sample(char drawn) { return std::string("o=@GAW").find(drawn) != std::string::npos; }

std::optional<PitRecord> record_of(char drawn) {
  switch (drawn) {
    case '=':
    case '-':
      return dug_record(0);
    case '@':
    case '#':
      return dug_record(1);
    case 'G':
    case 'g':
      return not_dug_record(NotDugReason::kPaved);
    case 'A':
    case 'a':
      return not_dug_record(NotDugReason::kNoPermission);
    case 'W':
    case 'w':
      return withdrawn_record();
    default:
      return std::nullopt;
  }
}

char standing_of(const DigList& list, NodeId id) {
  if (!list.in_design(id)) return list.state(id) == PitState::kNoRecord ? '.' : 'j';
  switch (list.state(id)) {
    case PitState::kPositive:
      return '#';
    case PitState::kNegative:
      return '-';
    case PitState::kNotDugGround:
    case PitState::kNotDugAccess:
      return 'n';
    case PitState::kNoRecord:
      break;
  }
  if (list.due(id)) return static_cast<char>('0' + list.ring(id));
  return list.halted(id) ? 'h' : 'c';
}

}  // namespace

Frame drawn_frame(const Picture& picture, LatticeKind kind) {
  const Lattice lattice{kind, kSpacing_m, {0, 0}, 90};
  MultiPolygon cells;
  for (std::size_t row = 0; row < picture.size(); ++row) {
    for (std::size_t column = 0; column < picture[row].size(); ++column) {
      if (picture[row][column] == ' ') continue;
      const Point at =
          lattice.to_ground(Node{static_cast<std::int32_t>(row + 1), static_cast<std::int32_t>(column + 1)});
      cells.push_back({{{at.x - 1, at.y - 1}, {at.x + 1, at.y - 1}, {at.x + 1, at.y + 1}, {at.x - 1, at.y + 1}}, {}});
    }
  }
  Result<Frame> frame = Frame::clip(lattice, cells);
  if (!frame) {
    std::cerr << "a picture that is no frame: " << frame.error().one_line() << '\n';
    std::abort();
  }
  return std::move(frame).value();
}

Areas one_area(const Frame& frame) {
  return {{{"all", {}}}, std::vector<AreaId>(static_cast<std::size_t>(frame.size()), 0)};
}

Areas drawn_areas(const Frame& frame, const Picture& letters) {
  if (letters.empty()) return one_area(frame);
  std::string names;
  for (NodeId id = 0; id < frame.size(); ++id)
    names += drawn_at(letters, frame.node(id));
  std::sort(names.begin(), names.end());
  names.erase(std::unique(names.begin(), names.end()), names.end());
  Areas areas;
  for (const char name : names)
    areas.list.push_back({std::string(1, name), {}});
  for (NodeId id = 0; id < frame.size(); ++id) {
    areas.of_node.push_back(static_cast<AreaId>(names.find(drawn_at(letters, frame.node(id)))));
  }
  return areas;
}

std::unique_ptr<const SurveyGround> drawn_ground(const Picture& picture, const DrawnRules& rules) {
  auto ground = std::make_unique<SurveyGround>();
  ground->frame = drawn_frame(picture, rules.kind);
  ground->areas = drawn_areas(ground->frame, rules.areas);
  ground->units = PrimaryUnits::of(ground->frame, ground->areas, DrawKind::kPits, 1);
  std::vector<std::vector<UnitId>> drawn(ground->areas.list.size());
  for (NodeId id = 0; id < ground->frame.size(); ++id) {
    const auto index = static_cast<std::size_t>(id);
    if (!in_first_sample(drawn_at(picture, ground->frame.node(id)))) continue;
    drawn[ground->areas.of_node[index]].push_back(ground->units.of_node[index]);
  }
  ground->sample = FirstSample::from_units(ground->areas, ground->units, drawn);
  ground->neighbours = rules.neighbours;
  ground->confinement = rules.confinement;
  ground->ring_limit = rules.ring_limit;
  ground->positive = {{0}, 1};
  return ground;
}

PitRecord dug_record(std::uint32_t count) {
  PitRecord record;
  record.counts = {count};
  record.weights_g = {std::nullopt};
  record.dug_at = "2026-05-04";
  return record;
}

PitRecord not_dug_record(NotDugReason reason) {
  PitRecord record = dug_record(0);
  record.status = PitStatus::kNotDug;
  record.reason = reason;
  return record;
}

PitRecord withdrawn_record() {
  PitRecord record = dug_record(0);
  record.status = PitStatus::kWithdrawn;
  return record;
}

Head head_of(const PitRecord& record, std::int64_t clock, const std::string& writer) {
  return {writer + std::to_string(clock), clock, writer, record};
}

Survey drawn_survey(const Picture& picture, const DrawnRules& rules) {
  Survey survey(drawn_ground(picture, rules));
  for (NodeId id = 0; id < survey.ground().frame.size(); ++id) {
    const std::optional<PitRecord> record = record_of(drawn_at(picture, survey.ground().frame.node(id)));
    if (record) survey.set_pit(id, {head_of(*record)});
  }
  return survey;
}

NodeId node_at(const Survey& survey, std::int32_t row, std::int32_t column) {
  return survey.ground().frame.find({row, column});
}

Picture standing_of(const DigList& list) {
  const Frame& frame = list.ground().frame;
  Picture picture(static_cast<std::size_t>(frame.node(frame.size() - 1).row));
  for (NodeId id = 0; id < frame.size(); ++id) {
    const Node node = frame.node(id);
    std::string& line = picture[static_cast<std::size_t>(node.row - 1)];
    line.resize(std::max(line.size(), static_cast<std::size_t>(node.column)), ' ');
    line[static_cast<std::size_t>(node.column - 1)] = standing_of(list, id);
  }
  return picture;
}

}  // namespace nearpit
