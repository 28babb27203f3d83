#include "support/lattice_picture.h"

#include <algorithm>
#include <cstdlib>
#include <iostream>
#include <memory>
#include <sstream>
#include <utility>

namespace nearpit {
namespace {

[[noreturn]] void refuse(const std::string& what) {
  std::cerr << "lattice picture: " << what << '\n';
  std::abort();
}

std::vector<std::vector<std::string>> tokens_of(std::string_view picture) {
  std::vector<std::vector<std::string>> rows;
  std::istringstream lines{std::string(picture)};
  for (std::string line; std::getline(lines, line);) {
    std::istringstream words(line);
    std::vector<std::string> row;
    for (std::string word; words >> word;)
      row.push_back(word);
    if (!row.empty()) rows.push_back(row);
  }
  return rows;
}

std::uint32_t count_of(const std::string& text) {
  std::size_t used = 0;
  const unsigned long value = std::stoul(text, &used);
  if (used != text.size()) refuse("'" + text + "' is no count");
  return static_cast<std::uint32_t>(value);
}

PictureNode node_of(std::string token) {
  PictureNode node;
  if (token.front() == 'o') {
    node.first_sample = true;
    token.erase(0, 1);
  }
  if (token == "?") {
    node.mark = PictureMark::kNoRecord;
  } else if (token == "x") {
    node.mark = PictureMark::kGroundReason;
  } else if (token == "r") {
    node.mark = PictureMark::kAccessReason;
  } else if (token != ".") {
    const std::size_t bar = token.find('/');
    node.counts[0] = count_of(token.substr(0, bar));
    if (bar != std::string::npos) node.counts[1] = count_of(token.substr(bar + 1));
  }
  return node;
}

// A box about each run of nodes of a row: they do not meet, whatever the lattice.
MultiPolygon boundary_of(const Lattice& lattice, const std::vector<PictureNode>& nodes) {
  const double half = 0.4 * lattice.spacing_m;
  MultiPolygon boundary;
  for (std::size_t first = 0, last = 0; first < nodes.size(); first = ++last) {
    while (last + 1 < nodes.size() && nodes[last + 1].node.row == nodes[last].node.row &&
           nodes[last + 1].node.column == nodes[last].node.column + 1) {
      ++last;
    }
    const Point west = lattice.to_ground(nodes[first].node);
    const Point east = lattice.to_ground(nodes[last].node);
    boundary.push_back({{{west.x - half, west.y - half},
                         {east.x + half, west.y - half},
                         {east.x + half, west.y + half},
                         {west.x - half, west.y + half}},
                        {}});
  }
  return boundary;
}

}  // namespace

LatticePicture::LatticePicture(std::string_view picture, PicturePlan plan) : plan_(std::move(plan)) {
  const auto rows = tokens_of(picture);
  const auto letters = tokens_of(plan_.areas);
  for (std::size_t r = 0; r < rows.size(); ++r) {
    for (std::size_t c = 0; c < rows[r].size(); ++c) {
      if (rows[r][c] == "_") continue;
      PictureNode node = node_of(rows[r][c]);
      node.node = {static_cast<std::int32_t>(r + 1), static_cast<std::int32_t>(c + 1)};
      if (!letters.empty()) node.area = static_cast<AreaId>(letters.at(r).at(c).front() - 'a');
      areas_ = std::max<std::size_t>(areas_, node.area + 1u);
      nodes_.push_back(node);
    }
  }
  const Lattice lattice{.kind = plan_.kind, .spacing_m = 10, .origin = {5, 5}, .bearing_deg = 90};
  Result<Frame> frame = Frame::clip(lattice, boundary_of(lattice, nodes_));
  if (!frame) refuse(frame.error().one_line());
  frame_ = *frame;
  if (frame_.size() != static_cast<NodeId>(nodes_.size())) refuse("the frame has other nodes than the picture");
  for (std::size_t i = 0; i < nodes_.size(); ++i) {
    if (frame_.node(static_cast<NodeId>(i)) != nodes_[i].node) refuse("a node is not where it was drawn");
    area_list_.of_node.push_back(nodes_[i].area);
  }
  for (std::size_t area = 0; area < areas_; ++area) {
    area_list_.list.push_back({areas_ == 1 ? "all" : std::string(1, static_cast<char>('a' + area)), {}});
  }
  units_ = PrimaryUnits::of(frame_, area_list_, plan_.draw, plan_.every);
}

std::vector<std::vector<UnitId>> LatticePicture::marked() const {
  std::vector<std::vector<UnitId>> drawn(areas_);
  for (std::size_t i = 0; i < nodes_.size(); ++i) {
    if (nodes_[i].first_sample) drawn[nodes_[i].area].push_back(units_.of_node[i]);
  }
  for (auto& units : drawn) {
    std::sort(units.begin(), units.end());
    units.erase(std::unique(units.begin(), units.end()), units.end());
  }
  return drawn;
}

Survey LatticePicture::undug(const std::vector<std::vector<UnitId>>& drawn) const {
  auto ground = std::make_unique<SurveyGround>();
  ground->frame = frame_;
  ground->areas = area_list_;
  ground->units = units_;
  ground->sample = FirstSample::from_units(area_list_, units_, drawn);
  ground->neighbours = plan_.neighbours;
  ground->confinement = plan_.confinement;
  ground->ring_limit = plan_.ring_limit;
  ground->positive = {.finds = {0}, .at_least = plan_.at_least};
  return Survey(std::move(ground));
}

Survey LatticePicture::undug() const { return undug(marked()); }

Survey LatticePicture::survey() const {
  Survey survey = undug();
  for (std::size_t i = 0; i < nodes_.size(); ++i) {
    const auto id = static_cast<NodeId>(i);
    if (nodes_[i].mark != PictureMark::kNoRecord) survey.set_pit(id, head_of(record(id)));
  }
  return survey;
}

Survey LatticePicture::dug_out(const std::vector<std::vector<UnitId>>& drawn) const {
  Survey survey = undug(drawn);
  for (std::vector<NodeId> due = survey.dig_list().due(); !due.empty(); due = survey.dig_list().due()) {
    for (const NodeId id : due) {
      if (nodes_[static_cast<std::size_t>(id)].mark == PictureMark::kNoRecord)
        refuse("a due pit has no record to take");
      survey.set_pit(id, head_of(record(id)));
    }
  }
  return survey;
}

PitRecord LatticePicture::record(NodeId id) const {
  const PictureNode& node = nodes_[static_cast<std::size_t>(id)];
  PitRecord record;
  record.dug_at = "2026-05-04";
  record.counts = node.counts;
  record.weights_g.resize(node.counts.size());
  if (node.mark == PictureMark::kGroundReason || node.mark == PictureMark::kAccessReason) {
    record.status = PitStatus::kNotDug;
    record.reason =
        node.mark == PictureMark::kGroundReason ? NotDugReason::kStandingWater : NotDugReason::kNoPermission;
  }
  return record;
}

std::vector<Head> head_of(PitRecord record) {
  std::vector<Head> heads(1);
  heads[0].revision = "r1";
  heads[0].clock = 1;
  heads[0].writer = "w1";
  heads[0].record = std::move(record);
  return heads;
}

}  // namespace nearpit
