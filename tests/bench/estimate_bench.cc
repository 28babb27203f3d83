// How the cost of Horvitz-Thompson grows with the number of met networks: pits group by size, transects by the set of rows that a network lies in.
#include <benchmark/benchmark.h>

#include <algorithm>

#include "base/random.h"
#include "estimate/hansen_hurwitz.h"
#include "estimate/horvitz_thompson.h"

namespace nearpit {
namespace {

struct Sample {
  SampleDesign design;
  std::vector<MetNetwork> networks;
  std::vector<double> y;
};

// A fifth of the networks hold 2 to 40 nodes, the rest one; all carry finds.
Sample pits(std::uint32_t networks) {
  SeededRandom random(7, RandomStream::kWorlds);
  Sample sample;
  sample.design = {
      .strata = {{100 * networks, networks}}, .drawn = {}, .nodes = 100 * networks, .one_node_units = true};
  std::uint32_t next = 0;
  for (std::uint32_t k = 0; k < networks; ++k) {
    sample.design.drawn.push_back({0, next});
    const auto size = k % 5 == 0 ? static_cast<std::uint32_t>(2 + random.below(39)) : 1u;
    sample.networks.emplace_back();
    for (std::uint32_t i = 0; i < size; ++i)
      sample.networks.back().units.push_back({0, next++});
    sample.y.push_back(static_cast<double>(1 + random.below(20)));
  }
  return sample;
}

// A tenth of the rows drawn; each network lies in a drawn row and up to `reach` rows either side. As many rows as networks: few networks
// share a set of rows, which is the dearest case.
Sample transects(std::uint32_t networks, std::uint32_t reach) {
  SeededRandom random(7, RandomStream::kWorlds);
  const std::uint32_t rows = networks;
  Sample sample;
  sample.design = {.strata = {{rows, rows / 10}}, .drawn = {}, .nodes = 400ull * rows, .one_node_units = false};
  for (std::uint32_t row = 0; row < rows / 10; ++row)
    sample.design.drawn.push_back({0, 10 * row + 5});
  for (std::uint32_t k = 0; k < networks; ++k) {
    const std::uint32_t drawn = sample.design.drawn[random.below(rows / 10)].unit;
    const auto first = drawn - static_cast<std::uint32_t>(random.below(reach + 1));
    const auto last = drawn + static_cast<std::uint32_t>(random.below(reach + 1));
    sample.networks.emplace_back();
    for (std::uint32_t row = first; row <= last; ++row)
      sample.networks.back().units.push_back({0, row});
    sample.y.push_back(static_cast<double>(1 + random.below(20)));
  }
  return sample;
}

void horvitz_thompson_pits(benchmark::State& state) {
  const Sample sample = pits(static_cast<std::uint32_t>(state.range(0)));
  for (auto _ : state)
    benchmark::DoNotOptimize(horvitz_thompson(sample.design, sample.networks, sample.y));
}
BENCHMARK(horvitz_thompson_pits)->Arg(2'000)->Arg(10'000)->Unit(benchmark::kMillisecond);

void horvitz_thompson_transects(benchmark::State& state) {
  const Sample sample = transects(static_cast<std::uint32_t>(state.range(0)), 4);
  for (auto _ : state)
    benchmark::DoNotOptimize(horvitz_thompson(sample.design, sample.networks, sample.y));
}
BENCHMARK(horvitz_thompson_transects)->Arg(2'000)->Arg(10'000)->Unit(benchmark::kMillisecond);

void hansen_hurwitz_transects(benchmark::State& state) {
  const Sample sample = transects(static_cast<std::uint32_t>(state.range(0)), 4);
  for (auto _ : state)
    benchmark::DoNotOptimize(hansen_hurwitz(sample.design, sample.networks, sample.y));
}
BENCHMARK(hansen_hurwitz_transects)->Arg(2'000)->Arg(10'000)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace nearpit
