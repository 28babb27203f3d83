#include "field_map/marked_survey.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include "support/random_ground.h"

namespace nearpit::ui {
namespace {

std::unique_ptr<SurveyGround> sampled_ground(Frame frame, std::uint32_t drawn, std::uint64_t seed) {
  auto ground = std::make_unique<SurveyGround>();
  ground->frame = std::move(frame);
  ground->areas = one_area(ground->frame);
  ground->units = PrimaryUnits::of(ground->frame, ground->areas, DrawKind::kPits, 1);
  ground->sample = draw_first_sample(ground->areas, ground->units, {drawn}, seed).value();
  ground->neighbours = default_rule(ground->frame.lattice().kind);
  ground->positive = {{0}, 1};
  return ground;
}

PitRecord random_record(TestRandom& random) {
  if (random.chance(0.1)) return withdrawn_record();
  if (random.chance(0.15)) {
    return not_dug_record(random.chance(0.5) ? NotDugReason::kPaved : NotDugReason::kNoPermission);
  }
  return dug_record(random.chance(0.35) ? 1 : 0);
}

std::vector<Head> random_heads(TestRandom& random) {
  std::vector<Head> heads{head_of(random_record(random), 1, "a")};
  if (random.chance(0.1)) heads.push_back(head_of(random_record(random), 2, "b"));
  return heads;
}

void move_heads(TestRandom& random, const Point& node, double most_m, std::vector<Head>* heads) {
  for (Head& head : *heads)
    head.record.place = Point{node.x + random.real(-most_m, most_m), node.y + random.real(-most_m, most_m)};
}

NodeId random_node(TestRandom& random, const Frame& frame) { return random.between(0, frame.size() - 1); }

void record_pits(TestRandom& random, Survey* survey) {
  const Frame& frame = survey->ground().frame;
  for (int pits = frame.size() / 8; pits > 0; --pits) {
    const std::vector<NodeId> due = survey->dig_list().due();
    const bool judgement = due.empty() || random.chance(0.2);
    const NodeId id = judgement ? random_node(random, frame) : random.one_of(due);
    std::vector<Head> heads = random_heads(random);
    if (random.chance(0.2)) move_heads(random, frame.ground(id), 2, &heads);
    for (Head& head : heads)
      head.record.opens_neighbours = judgement && random.chance(0.7);
    survey->set_pit(id, std::move(heads));
  }
  for (int pit = random.between(0, 5); pit > 0; --pit) {
    std::vector<Head> heads = random_heads(random);
    move_heads(random, frame.ground(random_node(random, frame)), 5 * frame.lattice().spacing_m, &heads);
    survey->set_off_grid("J" + std::to_string(pit), std::move(heads));
  }
}

void close_ground(TestRandom& random, Survey* survey) {
  const Frame& frame = survey->ground().frame;
  const double spacing = frame.lattice().spacing_m;
  for (int area = random.between(0, 3); area > 0; --area) {
    ClosedArea closed;
    closed.polygon = {
        {random_star(random, frame.ground(random_node(random, frame)), spacing, random.real(2, 5) * spacing), {}}};
    closed.open_again = random.chance(0.2);
    survey->set_closed_area("area/" + std::to_string(area), std::move(closed));
  }
  for (int stop = random.between(0, 2); stop > 0; --stop) {
    survey->set_stop_work("stop/" + std::to_string(stop), {frame.ground(random_node(random, frame)),
                                                           random.real(1, 4) * spacing, "", random.chance(0.2)});
  }
}

}  // namespace

SurveyModel drawn_model(const Picture& picture, const DrawnRules& rules) {
  SurveyModel model(Plan{}, drawn_ground(picture, rules));
  const Survey drawn = drawn_survey(picture, rules);
  for (const auto& [id, entry] : drawn.pits())
    model.survey().set_pit(id, entry.heads);
  return model;
}

SurveyModel random_model(TestRandom& random, LatticeKind kind, NodeId least, NodeId most) {
  MultiPolygon boundary;
  Frame frame = random_frame(random, kind, least, most, &boundary);
  const auto drawn = static_cast<std::uint32_t>(std::max(1, frame.size() / random.between(4, 12)));
  SurveyModel model(Plan{}, sampled_ground(std::move(frame), drawn, static_cast<std::uint64_t>(random.between(0, 9))));
  record_pits(random, &model.survey());
  close_ground(random, &model.survey());
  return model;
}

SurveyModel large_model(std::int32_t side, double bearing_deg, std::uint32_t drawn, std::uint32_t recorded) {
  const Lattice lattice{LatticeKind::kSquare, 10, {500000, 4000000}, bearing_deg};
  const auto corner = [&](double u, double v) { return lattice.to_ground(Along{u * 10 - 5, v * 10 - 5}); };
  const MultiPolygon boundary{{{corner(0, 0), corner(side, 0), corner(side, side), corner(0, side)}, {}}};
  SurveyModel model(Plan{}, sampled_ground(Frame::clip(lattice, boundary).value(), drawn, 1));
  const std::vector<NodeId> due = model.survey().dig_list().due();
  for (std::size_t i = 0; i < recorded; ++i) {
    const NodeId id = due[i * due.size() / recorded];
    model.survey().set_pit(id, {head_of(dug_record(i % 10 == 0 ? 1 : 0))});
  }
  return model;
}

Box node_bounds(const SurveyModel& model) {
  const Frame& frame = model.survey().ground().frame;
  constexpr double kFar = std::numeric_limits<double>::infinity();
  Box box{{kFar, kFar}, {-kFar, -kFar}};
  for (NodeId id = 0; id < frame.size(); ++id) {
    const Point at = frame.ground(id);
    box.low = {std::min(box.low.x, at.x), std::min(box.low.y, at.y)};
    box.high = {std::max(box.high.x, at.x), std::max(box.high.y, at.y)};
  }
  return box;
}

Box random_box(TestRandom& random, const Box& bounds, double part) {
  const Point at{random.real(bounds.low.x, bounds.high.x), random.real(bounds.low.y, bounds.high.y)};
  const double width = (bounds.high.x - bounds.low.x) * part / 2;
  const double height = (bounds.high.y - bounds.low.y) * part / 2;
  return {{at.x - width, at.y - height}, {at.x + width, at.y + height}};
}

bool box_holds(const Box& box, const Point& at) {
  return at.x >= box.low.x && at.x <= box.high.x && at.y >= box.low.y && at.y <= box.high.y;
}

bool same_pit(const PitMark& a, const PitMark& b) {
  return a.node == b.node && a.free_label == b.free_label && a.place == b.place && a.mark == b.mark &&
         a.first_sample == b.first_sample && a.judgement == b.judgement && a.conflict == b.conflict &&
         a.asked == b.asked;
}

}  // namespace nearpit::ui
