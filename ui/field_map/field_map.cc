#include "field_map/field_map.h"

#include <imgui.h>

#include <algorithm>
#include <cmath>

#include "cards/history_lines.h"
#include "desk/words.h"
#include "field_map/hatch.h"
#include "field_map/map_pick.h"
#include "field_map/scale_bar.h"
#include "widgets/packed_colour.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr double kLeastMark_mm = 1.6;
constexpr double kMostMark_mm = 6.5;
constexpr float kMarkToSpacing = 0.7F;
constexpr float kLeastPlainSpacing_px = 3;
constexpr std::size_t kMostPlain = 25'000;
constexpr double kLabelSpacing_mm = 14;
constexpr std::size_t kMostLabels = 400;
constexpr double kPick_mm = 12;
constexpr double kFitMargin_mm = 6;
constexpr double kZoomStep = 1.5;
constexpr double kWheelStep = 1.2;
constexpr double kHatch_mm = 3;
constexpr double kHistory_mm = 40;
constexpr double kSideBySide_mm = 80;
constexpr double kButtons_mm = 4 * kTarget_mm + 5 * kGap_mm;  // the column of four, and what lies above and below it

// One frame's map.
struct Map {
  Ui& ui;
  const PixelBox& box;
  const SurveyView& survey;
  const MapView& view;
  const SurveyGround& ground;
  float spacing_px;
  float mark_px;

  Pixel at(const Point& place) const { return to_screen(view, box, place); }
  ImVec2 corner(const Point& place) const {
    const Pixel pixel = at(place);
    return {pixel.x, pixel.y};
  }
  double apart_m() const { return mark_px * 0.9 / view.px_per_m; }
  bool plain_shown() const { return spacing_px >= kLeastPlainSpacing_px; }
};

MarkShape shape_of(const PitMark& mark) {
  switch (mark.mark) {
    case Mark::kPlain:
      return MarkShape::kDot;
    case Mark::kDue:
      return mark.asked ? MarkShape::kDueAsked : MarkShape::kDue;
    case Mark::kHalted:
      return MarkShape::kHalted;
    case Mark::kNegative:
      return MarkShape::kNegative;
    case Mark::kPositive:
      return MarkShape::kPositive;
    case Mark::kNotDug:
      return MarkShape::kNotDug;
  }
  return MarkShape::kDot;
}

void ring_line(const Map& map, const Ring& ring, const Colour& colour, float thickness) {
  ImDrawList* list = map.ui.list();
  list->PathClear();
  ImVec2 last{-1e9F, -1e9F};
  for (const Point& point : ring) {
    const ImVec2 here = map.corner(point);
    if (std::abs(here.x - last.x) + std::abs(here.y - last.y) < 1) continue;  // finer than a pixel
    list->PathLineTo(here);
    last = here;
  }
  list->PathStroke(packed(colour), ImDrawFlags_Closed, thickness);
}

void outlines(const Map& map, const MultiPolygon& polygons, const Colour& colour, float thickness) {
  for (const Polygon& polygon : polygons) {
    ring_line(map, polygon.outer, colour, thickness);
    for (const Ring& hole : polygon.holes)
      ring_line(map, hole, colour, thickness);
  }
}

void closed_ground(const Map& map) {
  const Theme& theme = map.ui.theme();
  const Box seen = visible_ground(map.view, map.box);
  for (const MultiPolygon& closed : map.survey.closed_outlines) {
    for (const auto& [from, to] : hatch_lines(closed, seen, map.ui.mm(kHatch_mm) / map.view.px_per_m))
      map.ui.list()->AddLine(map.corner(from), map.corner(to), packed(theme.hatch), 1);
    outlines(map, closed, theme.hatch, std::max(1.0F, map.ui.mm(0.4)));
  }
}

// The ground of each positive pit, filled; then the cluster's outline.
void clusters(const Map& map) {
  const Lattice& lattice = map.ground.frame.lattice();
  const Theme& theme = map.ui.theme();
  const Point origin = lattice.to_ground(Along{0, 0});
  const auto turned = [&](double u, double v) {
    const Point there = lattice.to_ground(Along{u, v});
    return ImVec2(static_cast<float>((there.x - origin.x) * map.view.px_per_m),
                  static_cast<float>((origin.y - there.y) * map.view.px_per_m));
  };
  const double half_u = lattice.spacing_m / 2;
  const double half_v = lattice.row_distance_m() / 2;
  const ImVec2 corners[4] = {turned(-half_u, -half_v), turned(half_u, -half_v), turned(half_u, half_v),
                             turned(-half_u, half_v)};
  for (const Cluster& cluster : map.survey.clusters) {
    for (const NodeId node : cluster.network.nodes) {
      const Pixel middle = map.at(map.ground.frame.ground(node));
      const float reach = map.spacing_px;
      if (middle.x < map.box.left - reach || middle.x > map.box.right + reach || middle.y < map.box.top - reach ||
          middle.y > map.box.bottom + reach)
        continue;
      const auto put = [&](const ImVec2& by) { return ImVec2(middle.x + by.x, middle.y + by.y); };
      map.ui.list()->AddQuadFilled(put(corners[0]), put(corners[1]), put(corners[2]), put(corners[3]),
                                   packed(theme.cluster));
    }
  }
  for (const MultiPolygon& outline : map.survey.cluster_outlines)
    outlines(map, outline, theme.outline, std::max(1.5F, map.ui.mm(0.5)));
}

void pits(const Map& map, FieldMapState& state) {
  const Box seen = visible_ground(map.view, map.box);
  state.plain.clear();
  if (map.plain_shown()) plain_nodes(*map.survey.model, seen, kMostPlain, &state.plain);
  const float dot_px = std::max(1.6F, std::min(map.mark_px, map.spacing_px) * 0.6F);
  for (const NodeId node : state.plain) {
    if (!map.survey.marks->has_mark(node)) map.ui.mark(MarkShape::kDot, map.at(map.ground.frame.ground(node)), dot_px);
  }
  map.survey.marks->visible(seen, map.apart_m(), &state.drawn);
  // Positives last, so that nothing covers them.
  for (const bool positive : {false, true}) {
    for (const PitMark& mark : state.drawn) {
      if ((mark.mark == Mark::kPositive) == positive) draw_pit_mark(map.ui, mark, map.at(mark.place), map.mark_px);
    }
  }
}

std::string label_of(const SurveyView& survey, const PitMark& mark) {
  if (mark.node != kNoNode) return survey.model->label(mark.node);
  return survey.marks->free_labels()[static_cast<std::size_t>(mark.free_label)];
}

void labels(const Map& map, const FieldMapState& state) {
  if (map.spacing_px < map.ui.mm(kLabelSpacing_mm) || state.plain.size() + state.drawn.size() > kMostLabels) return;
  const auto under = [&](const Point& place) {
    const Pixel middle = map.at(place);
    return Pixel{middle.x, middle.y + map.mark_px * 0.6F};
  };
  for (const NodeId node : state.plain) {
    if (!map.survey.marks->has_mark(node))
      map.ui.map_text(under(map.ground.frame.ground(node)), map.survey.model->label(node));
  }
  for (const PitMark& mark : state.drawn)
    map.ui.map_text(under(mark.place), label_of(map.survey, mark));
}

// Four ticks at the corners of a square around the pit.
void corner_ticks(const Map& map, const Point& place) {
  const Pixel middle = map.at(place);
  const float half = std::max(map.mark_px * 0.75F, map.ui.mm(2.5));
  const float tick = half * 0.5F;
  const float thick = std::max(2.0F, map.ui.mm(0.6));
  const Colour& ink = map.ui.theme().outline;
  for (const float x : {-1.0F, 1.0F}) {
    for (const float y : {-1.0F, 1.0F}) {
      const Pixel corner{middle.x + x * half, middle.y + y * half};
      map.ui.line(corner, {corner.x - x * tick, corner.y}, ink, thick);
      map.ui.line(corner, {corner.x, corner.y - y * tick}, ink, thick);
    }
  }
}

void next_pit(const Map& map) {
  if (!map.survey.proposed) return;
  const Point& place = map.survey.proposed->stop.place;
  const Pixel middle = map.at(place);
  const float thick = std::max(2.0F, map.ui.mm(0.7));
  if (map.survey.walk_from_place)
    map.ui.line(map.at(*map.survey.walk_from_place), middle, map.ui.theme().focus, std::max(1.0F, map.ui.mm(0.3)));
  // The chosen pit has its ticks already.
  if (map.survey.chosen && map.survey.chosen->name.node == map.survey.proposed->stop.node) return;
  map.ui.list()->AddCircle({middle.x, middle.y}, std::max(map.mark_px * 0.95F, map.ui.mm(3)),
                           packed(map.ui.theme().focus), 0, thick);
}

void scale_and_north(const Map& map) {
  Ui& ui = map.ui;
  const ScaleBar bar = scale_bar(map.view.px_per_m, ui.mm(40));
  const float left = map.box.left + ui.mm(3);
  const float bottom = map.box.bottom - ui.mm(3);
  const float thick = std::max(2.0F, ui.mm(0.5));
  const Colour& ink = ui.theme().outline;
  ui.fill({left - ui.mm(1), bottom - ui.mm(7), left + bar.px + ui.mm(1), bottom + ui.mm(1)}, ui.theme().map.fill);
  ui.line({left, bottom}, {left + bar.px, bottom}, ink, thick);
  ui.line({left, bottom - ui.mm(1.5)}, {left, bottom}, ink, thick);
  ui.line({left + bar.px, bottom - ui.mm(1.5)}, {left + bar.px, bottom}, ink, thick);
  ui.text({left, bottom - ui.mm(6.5), left + std::max(bar.px, ui.mm(16)), bottom - ui.mm(2)}, bar.text,
          {.size = TextSize::kSmall, .tone = Tone::kOnMap});
  ui.fill({map.box.left + ui.mm(2), map.box.top + ui.mm(2), map.box.left + ui.mm(25), map.box.top + ui.mm(8)},
          ui.theme().map.fill);
  const float x = map.box.left + ui.mm(5);
  const float top = map.box.top + ui.mm(3);
  ui.line({x, top + ui.mm(9)}, {x, top}, ink, thick);
  ui.line({x, top}, {x - ui.mm(1.5), top + ui.mm(3)}, ink, thick);
  ui.line({x, top}, {x + ui.mm(1.5), top + ui.mm(3)}, ink, thick);
  ui.text({x + ui.mm(3), top, x + ui.mm(26), top + ui.mm(5)}, "grid north",
          {.size = TextSize::kSmall, .tone = Tone::kOnMap});
}

// One line of the panel: what the pit is, and why it is due or what was last written of it.
void chosen_lines(Ui& ui, PixelBox box, const ChosenPit& pit, Tone tone) {
  const float label = std::min(ui.text_width(pit.name.label, TextSize::kBase) + 1, box.width() * 0.5F);
  PixelBox first = cut_top(&box, box.height() / 2);
  ui.text(cut_left(&first, label, ui.mm(2)), pit.name.label, {.tone = tone, .shorten = true});
  ui.text(first, pit.state, {.size = TextSize::kSmall, .tone = tone, .lines = 1, .shorten = true});
  std::string second;
  for (const std::string& why : pit.why)
    second += (second.empty() ? "" : ", ") + why;
  if (second.empty() && !pit.history.empty()) second = pit.history.front().what;
  ui.text(box, second, {.size = TextSize::kSmall, .tone = tone, .shorten = true});
}

std::string verb_for(const ChosenPit& pit) {
  const bool recorded = pit.mark.mark == Mark::kNegative || pit.mark.mark == Mark::kPositive ||
                        (pit.mark.mark == Mark::kNotDug && !pit.history.empty());
  if (recorded) return "Open record";
  return pit.mark.mark == Mark::kPlain || pit.mark.asked ? "Record as judgement" : "Record";
}

// The chosen pit: what it is and what to do with it; touching it shows everything that was written of it.
void chosen_panel(Ui& ui, PixelBox* box, const SurveyView& survey, FieldMapState& state, Sink& sink) {
  const ChosenPit& pit = *survey.chosen;
  const bool details = state.details && !pit.history.empty();
  const bool narrow = box->width() < ui.mm(kSideBySide_mm);
  // On a narrow map the button stands under what the pit is, and its history takes the room of both.
  const bool openable = !(survey.draft && survey.draft->pit == pit.name.label) && !(narrow && details);
  const float row_height = ui.mm(kTarget_mm + 2 + (narrow && openable ? kTarget_mm + kGap_mm : 0));
  const float room = box->height() - row_height - ui.mm(kButtons_mm);
  const float history = details ? std::clamp(room, ui.mm(kTarget_mm), ui.mm(kHistory_mm)) : 0;
  PixelBox panel = cut_bottom(box, row_height + history);
  ui.fill(panel, ui.theme().ground.fill);
  ui.line({panel.left, panel.top}, {panel.right, panel.top}, ui.theme().line, std::max(1.0F, ui.mm(0.4)));
  PixelBox row = cut_top(&panel, row_height).inset(ui.mm(1));
  if (openable) {
    const float gap = ui.mm(kGap_mm);
    const PixelBox button = narrow ? cut_bottom(&row, ui.mm(kTarget_mm), gap) : cut_right(&row, ui.mm(27), gap);
    if (ui.button("record-chosen", button, verb_for(pit), {.size = TextSize::kSmall}))
      sink.send(OpenRecord{pit.name.label});
  }
  if (pit.history.empty()) {
    chosen_lines(ui, row, pit, Tone::kPlain);
  } else {
    if (ui.row("history", row, details ? "less" : "history", details)) state.details = !state.details;
    const Ui::Part part = ui.part("history");
    PixelBox inside = in_row(ui, row);
    ui.text(cut_right(&inside, ui.mm(5), ui.mm(1)), details ? "\xE2\x86\x93" : "\xE2\x86\x91",
            {.align = Align::kCentre, .tone = details ? Tone::kOnChosen : Tone::kOnKey});
    chosen_lines(ui, inside, pit, details ? Tone::kOnChosen : Tone::kOnKey);
  }
  if (!details) return;
  PixelBox lines = panel.inset(ui.mm(1));
  lines.top += ui.mm(kGap_mm - 2);
  paged_text(ui, "history-lines", lines, &state.history,
             [&](const PixelBox& start) { return history_lines(ui, start, pit.history); });
}

struct Moves {
  double zoom = 1;
  bool fit = false;
  bool to_next = false;
  float x = 0;
  float y = 0;
};

void buttons_and_keys(Ui& ui, const PixelBox& box, Moves* moves) {
  const float side = ui.mm(kTarget_mm);
  PixelBox column = box.inset(ui.mm(2));
  column.left = column.right - side;
  const ButtonLook look{.size = TextSize::kLarge};
  if (ui.button("nearer", cut_top(&column, side, ui.mm(kGap_mm)), "+", look) || ui.take(U'+') || ui.take(U'='))
    moves->zoom = kZoomStep;
  if (ui.button("farther", cut_top(&column, side, ui.mm(kGap_mm)), "\xE2\x88\x92", look) || ui.take(U'-'))
    moves->zoom = 1 / kZoomStep;
  if (ui.button("whole", cut_top(&column, side, ui.mm(kGap_mm)), "All", {.size = TextSize::kSmall}) || ui.take(U'f'))
    moves->fit = true;
  if (ui.button("to-next", cut_top(&column, side), "Next", {.size = TextSize::kSmall}) || ui.take(U'm'))
    moves->to_next = true;
  if (ui.ring_shown()) return;
  const float step = ui.mm(kPrimary_mm);
  if (ui.take(Key::kLeft)) moves->x = step;
  if (ui.take(Key::kRight)) moves->x = -step;
  if (ui.take(Key::kUp)) moves->y = step;
  if (ui.take(Key::kDown)) moves->y = -step;
}

// All of the survey, left of the column of buttons.
MapView whole_survey(const Ui& ui, const Box& ground, const PixelBox& box) {
  PixelBox free = box;
  free.right -= ui.mm(kTarget_mm + 2);
  const MapView view = fitted(ground, free, ui.mm(kFitMargin_mm));
  return panned(view, free.middle().x - box.middle().x, free.middle().y - box.middle().y);
}

}  // namespace

void draw_pit_mark(Ui& ui, const PitMark& mark, Pixel middle, float size_px) {
  ui.mark(shape_of(mark), middle, size_px);
  if (mark.judgement) ui.mark(MarkShape::kUnderStroke, middle, size_px);
  if (mark.conflict) ui.mark(MarkShape::kFlag, middle, size_px);
}

void field_map(Ui& ui, const PixelBox& box, const SurveyView& survey, FieldMapState& state, Sink& sink) {
  const Ui::Part part = ui.part("map");
  const SurveyGround& ground = survey.model->survey().ground();
  const Box whole = bounding_box(survey.model->plan().boundary);
  const double spacing = ground.frame.lattice().spacing_m;
  PixelBox map_box = box;
  if (!state.view || state.of != survey.file || state.box != box) {
    const bool same = state.view && state.of == survey.file;
    if (!same) state.view = whole_survey(ui, whole, box);
    state.of = survey.file;
    state.box = box;
  }
  ui.fill(box, ui.theme().map.fill);
  ImDrawList* list = ui.list();
  list->PushClipRect({box.left, box.top}, {box.right, box.bottom}, true);
  const auto spacing_px = static_cast<float>(spacing * state.view->px_per_m);
  const float mark_px = std::clamp(spacing_px * kMarkToSpacing, ui.mm(kLeastMark_mm), ui.mm(kMostMark_mm));
  const Map map{ui, box, survey, *state.view, ground, spacing_px, mark_px};
  clusters(map);
  closed_ground(map);
  for (const PlanArea& area : survey.model->plan().areas)
    outlines(map, area.boundary, ui.theme().area_line, std::max(1.0F, ui.mm(0.3)));
  outlines(map, survey.model->plan().boundary, ui.theme().outline, std::max(2.0F, ui.mm(0.6)));
  pits(map, state);
  labels(map, state);
  next_pit(map);
  if (survey.chosen) corner_ticks(map, survey.chosen->mark.place);
  list->PopClipRect();
  ui.outline(box, ui.theme().line, std::max(1.0F, ui.mm(0.4)));
  if (survey.chosen) chosen_panel(ui, &map_box, survey, state, sink);
  scale_and_north({ui, map_box, survey, *state.view, ground, spacing_px, mark_px});
  Moves moves;
  buttons_and_keys(ui, map_box, &moves);

  const Touch touch = ui.touch("ground", map_box, &state.touch);
  const ZoomLimits limits = zoom_limits(whole, spacing, box, static_cast<float>(ui.glass().px_per_mm));
  MapView next = panned(*state.view, touch.drag_x + moves.x, touch.drag_y + moves.y);
  if (touch.wheel != 0) next = zoomed(next, box, touch.pointer, std::pow(kWheelStep, touch.wheel), limits);
  if (moves.zoom != 1) next = zoomed(next, box, map_box.middle(), moves.zoom, limits);
  if (moves.fit) next = whole_survey(ui, whole, box);
  if (moves.to_next && survey.proposed) {
    next.centre = survey.proposed->stop.place;
    next = panned(next, map_box.middle().x - box.middle().x, map_box.middle().y - box.middle().y);
  }
  if (touch.tapped) {
    const Point place = to_ground(*state.view, box, *touch.tapped);
    const auto pit = nearest_pit(*survey.model, *survey.marks, place, ui.mm(kPick_mm) / state.view->px_per_m,
                                 map.apart_m(), map.plain_shown() && !state.plain.empty());
    sink.send(ChoosePit{pit ? label_of(survey, *pit) : ""});
  }
  state.view = kept_near(next, box, whole);
}

}  // namespace nearpit::ui
