// Opening a survey of 10^6 nodes with 10^4 records, and the figures of one with 160,000 nodes and 6,000 grid pits. Files are made in a temporary folder.
#include <benchmark/benchmark.h>

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <string>

#include "base/random.h"
#include "session/make_survey.h"
#include "session/session.h"

namespace nearpit {
namespace {

class BenchFolder {
 public:
  BenchFolder() {
    std::string name = (std::filesystem::temp_directory_path() / "nearpit-bench-XXXXXX").string();
    path_ = mkdtemp(name.data());
  }
  ~BenchFolder() { std::filesystem::remove_all(path_); }
  std::string operator/(const std::string& name) const { return (path_ / name).string(); }

 private:
  std::filesystem::path path_;
};

Environment bench_environment(const BenchFolder& folder) {
  Environment environment = real_environment().value();
  environment.memory = WriterMemory(folder / "config");
  return environment;
}

std::string plan_text(int side, int drawn) {
  const double edge = side * 10.0;
  const Json ring = {{0, 0}, {edge, 0}, {edge, edge}, {0, edge}, {0, 0}};
  const Json plan = {{"survey", "bench (invented)"},
                     {"crs", "local"},
                     {"boundary", {{"type", "Polygon"}, {"coordinates", Json::array({ring})}}},
                     {"lattice", {{"kind", "square"}, {"spacing_m", 10}, {"origin", {5, 5}}}},
                     {"pit", {{"shape", "square"}, {"size_m", 0.5}}},
                     {"finds", {"flaked stone", "modern"}},
                     {"positive", {{"finds", Json::array({"flaked stone"})}, {"at_least", 1}}},
                     {"initial", {{"draw", "pits"}, {"count", {{"all", drawn}}}, {"seed", 3}}}};
  return plan.dump();
}

// A square of `side` nodes a side, `drawn` of them in the first sample, the first `dug` recorded, a few of them positive.
std::string made_file(const BenchFolder& folder, Environment& environment, int side, int drawn, std::size_t dug) {
  const std::string plan = folder / "plan.json";
  const std::string file = folder / ("survey-" + std::to_string(side) + "-" + std::to_string(dug) + ".gpkg");
  std::ofstream(plan) << plan_text(side, drawn);
  make_survey(plan, file, environment).value();
  Session session = Session::open(file, environment, false).value();
  SeededRandom random(11, RandomStream::kWorlds);
  std::vector<Action> actions;
  for (const DigStop& stop : session.dig_order("", std::nullopt).due) {
    if (actions.size() == dug) break;
    RecordPit record;
    record.pit = session.model().label(stop.node);
    record.counts[0] = random.below(50) == 0 ? 3u : 0u;
    record.depth_cm = std::optional<double>(45.0);
    actions.push_back({record, "A", "", {}});
  }
  if (!actions.empty()) session.apply(actions).value();
  return file;
}

void open_a_million_nodes(benchmark::State& state) {
  const BenchFolder folder;
  Environment environment = bench_environment(folder);
  const std::string file = made_file(folder, environment, 1000, 40'000, 10'000);
  for (auto _ : state) {
    const Session session = Session::open(file, environment, true).value();
    benchmark::DoNotOptimize(&session);
  }
}
BENCHMARK(open_a_million_nodes)->Unit(benchmark::kMillisecond);

void figures_of_6000_grid_pits(benchmark::State& state) {
  const BenchFolder folder;
  Environment environment = bench_environment(folder);
  const std::string file = made_file(folder, environment, 400, 6'000, 6'000);
  for (auto _ : state) {
    Session session = Session::open(file, environment, true).value();
    benchmark::DoNotOptimize(session.figures().estimates.size());
  }
}
BENCHMARK(figures_of_6000_grid_pits)->Unit(benchmark::kMillisecond);

void save_one_pit(benchmark::State& state) {
  const BenchFolder folder;
  Environment environment = bench_environment(folder);
  const std::string file = made_file(folder, environment, 400, 6'000, 0);
  Session session = Session::open(file, environment, false).value();
  const std::vector<DigStop> due = session.dig_order("", std::nullopt).due;
  std::size_t next = 0;
  for (auto _ : state) {
    RecordPit record;
    record.pit = session.model().label(due[next++ % due.size()].node);
    benchmark::DoNotOptimize(session.apply({{record, "A", "", {}}}).value().revisions);
  }
}
BENCHMARK(save_one_pit)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace nearpit
