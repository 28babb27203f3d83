// The field map's marks at 10^4, 10^5 and 10^6 nodes, a tenth of them marked, on a map of 700 x 700 px: making them (once a revision), and finding those
// to draw (once a frame) with the whole survey in view and with spacings 60 px wide. Frames should cost what is drawn, not what there is.
#include <benchmark/benchmark.h>

#include <cmath>
#include <map>
#include <memory>
#include <vector>

#include "field_map/map_marks.h"
#include "field_map/map_pick.h"
#include "field_map/map_view.h"

namespace nearpit::ui {
namespace {

constexpr double kSpacing_m = 10;
constexpr PixelBox kMapBox{0, 0, 700, 700};
constexpr double kApart_px = 8;

Head dug(std::uint32_t finds) {
  Head head{"r", 1, "w", {}};
  head.record.dug_at = "2026-05-04";
  head.record.counts = {finds};
  head.record.weights_g = {std::nullopt};
  return head;
}

// Rows run 37 degrees off east. Seven in a hundred are of the first sample; one in a hundred is dug, a tenth of these positive.
SurveyModel make_model(NodeId nodes) {
  const double side = std::sqrt(static_cast<double>(nodes)) * kSpacing_m;
  const Lattice lattice{LatticeKind::kSquare, kSpacing_m, {500000, 4000000}, 53};
  const auto corner = [&](double u, double v) { return lattice.to_ground(Along{u - 5, v - 5}); };
  auto ground = std::make_unique<SurveyGround>();
  ground->frame =
      Frame::clip(lattice, {{{corner(0, 0), corner(side, 0), corner(side, side), corner(0, side)}, {}}}).value();
  ground->areas = Areas::assign(ground->frame, {{"all", {}}}).value();
  ground->units = PrimaryUnits::of(ground->frame, ground->areas, DrawKind::kPits, 1);
  const auto drawn = static_cast<std::uint32_t>(nodes / 100 * 7);
  ground->sample = draw_first_sample(ground->areas, ground->units, {drawn}, 1).value();
  ground->positive = {{0}, 1};
  SurveyModel model(Plan{}, std::move(ground));
  const std::vector<NodeId> due = model.survey().dig_list().due();
  for (std::size_t i = 0; i < due.size(); i += 7)
    model.survey().set_pit(due[i], {dug(i % 70 == 0 ? 1 : 0)});
  return model;
}

// Made once for all benchmarks of a size.
const SurveyModel& model_of(std::int64_t nodes) {
  static std::map<std::int64_t, SurveyModel> models;
  const auto found = models.find(nodes);
  if (found != models.end()) return found->second;
  return models.emplace(nodes, make_model(static_cast<NodeId>(nodes))).first->second;
}

MapView whole(const SurveyModel& model) {
  const Frame& frame = model.survey().ground().frame;
  const double across = 1.4 * std::sqrt(static_cast<double>(frame.size())) * kSpacing_m;
  const Point middle = frame.lattice().to_ground(Along{across / 2.8, across / 2.8});
  return {middle, kMapBox.width() / across};
}

MapView close(const SurveyModel& model) { return {whole(model).centre, 60 / kSpacing_m}; }

void make_marks(benchmark::State& state) {
  const SurveyModel& model = model_of(state.range(0));
  std::size_t marked = 0;
  for (auto _ : state) {
    const MapMarks marks(model);
    marked = marks.marked().size();
  }
  state.counters["marked"] = static_cast<double>(marked);
}

void find_visible(benchmark::State& state, MapView (*view_of)(const SurveyModel&)) {
  const SurveyModel& model = model_of(state.range(0));
  const MapMarks marks(model);
  const MapView view = view_of(model);
  std::vector<PitMark> drawn;
  std::vector<NodeId> nodes;
  for (auto _ : state) {
    const Box ground = visible_ground(view, kMapBox);
    marks.visible(ground, kApart_px / view.px_per_m, &drawn);
    if (!marks.thinned(kApart_px / view.px_per_m)) plain_nodes(model, ground, 10000, &nodes);
    benchmark::DoNotOptimize(drawn.data());
    benchmark::DoNotOptimize(nodes.data());
  }
  state.counters["drawn"] = static_cast<double>(drawn.size());
  state.counters["nodes"] = static_cast<double>(nodes.size());
}

void visible_whole(benchmark::State& state) { find_visible(state, whole); }
void visible_close(benchmark::State& state) { find_visible(state, close); }

void pick(benchmark::State& state) {
  const SurveyModel& model = model_of(state.range(0));
  const MapMarks marks(model);
  const MapView view = close(model);
  for (auto _ : state) {
    benchmark::DoNotOptimize(
        nearest_pit(model, marks, view.centre, 72 / view.px_per_m, kApart_px / view.px_per_m, true));
  }
}

BENCHMARK(make_marks)->Arg(10'000)->Arg(102'400)->Arg(1'000'000)->Unit(benchmark::kMillisecond);
BENCHMARK(visible_whole)->Arg(10'000)->Arg(102'400)->Arg(1'000'000)->Unit(benchmark::kMicrosecond);
BENCHMARK(visible_close)->Arg(10'000)->Arg(102'400)->Arg(1'000'000)->Unit(benchmark::kMicrosecond);
BENCHMARK(pick)->Arg(10'000)->Arg(102'400)->Arg(1'000'000)->Unit(benchmark::kMicrosecond);

}  // namespace
}  // namespace nearpit::ui
