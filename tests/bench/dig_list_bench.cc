// One record's effect on the dig list, walking order apart, on frames of 10^4, 10^5 and 10^6 nodes: it should cost the pit's neighbourhood, the same on each.
#include <benchmark/benchmark.h>

#include <cmath>
#include <memory>
#include <vector>

#include "base/random.h"
#include "survey/dig_list.h"

namespace nearpit {
namespace {

std::unique_ptr<SurveyGround> square_ground(NodeId nodes) {
  const double side = std::sqrt(static_cast<double>(nodes)) * 10;
  const MultiPolygon boundary{{{{0, 0}, {side, 0}, {side, side}, {0, side}}, {}}};
  const Lattice lattice{LatticeKind::kSquare, 10, {5, 5}, 90};
  auto ground = std::make_unique<SurveyGround>();
  ground->frame = Frame::clip(lattice, boundary).value();
  ground->areas = Areas::assign(ground->frame, {{"all", {}}}).value();
  ground->units = PrimaryUnits::of(ground->frame, ground->areas, DrawKind::kPits, 1);
  const auto drawn = static_cast<std::uint32_t>(ground->frame.size() / 25);
  ground->sample = draw_first_sample(ground->areas, ground->units, {drawn}, 1).value();
  ground->positive = {{0}, 1};
  return ground;
}

// A first-sample pit turns positive, its ring is dug negative, and all of it is taken back, at places spread over the frame.
void one_record(benchmark::State& state) {
  const auto ground = square_ground(static_cast<NodeId>(state.range(0)));
  DigList list(*ground);
  std::vector<NodeId> first;
  for (NodeId id = 0; id < ground->frame.size(); ++id) {
    if (ground->sample.holds[static_cast<std::size_t>(id)]) first.push_back(id);
  }
  SeededRandom random(7, RandomStream::kWorlds);
  std::vector<NodeId> at;
  for (int i = 0; i < 300; ++i)
    at.push_back(first[random.below(first.size())]);
  std::vector<NodeId> changed;
  std::size_t next = 0;
  std::int64_t records = 0;
  for (auto _ : state) {
    const NodeId id = at[next++ % at.size()];
    changed.clear();
    list.set_state(id, PitState::kPositive, &changed);
    const std::vector<NodeId> opened = changed;
    for (const NodeId other : opened) {
      if (other != id) list.set_state(other, PitState::kNegative, &changed);
    }
    for (const NodeId other : opened)
      list.set_state(other, PitState::kNoRecord, &changed);
    benchmark::DoNotOptimize(changed.data());
    records += static_cast<std::int64_t>(2 * opened.size());
  }
  state.SetItemsProcessed(records);
}
BENCHMARK(one_record)->Arg(10'000)->Arg(102'400)->Arg(1'000'000);

void make_the_list(benchmark::State& state) {
  const auto ground = square_ground(static_cast<NodeId>(state.range(0)));
  for (auto _ : state) {
    DigList list(*ground);
    benchmark::DoNotOptimize(&list);
  }
}
BENCHMARK(make_the_list)->Arg(10'000)->Arg(102'400)->Arg(1'000'000)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace nearpit
