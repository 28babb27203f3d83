// What a frame of the window costs, on real OpenGL drawn in software, at 1280 x 800 and 144 dots an inch: panning the map, and from a saved pit to the
// frame that shows it. Surveys of 10^4 nodes with 400 grid pits and of 10^6 with 10^5, a tenth of them recorded. A frame grows with the
// marks in view (nodes and records, until they are thinned), a save with what is recorded and due.
#include <benchmark/benchmark.h>
#include <stdlib.h>

#include <cmath>
#include <filesystem>
#include <fstream>
#include <memory>
#include <string>

#include "desk/desk.h"
#include "screen.h"
#include "session/make_survey.h"
#include "support/offscreen_gl.h"
#include "widgets/frontend.h"

namespace nearpit::ui {
namespace {

constexpr int kWidth = 1280;
constexpr int kHeight = 800;

std::string plan_of(int side, int grid_pits) {
  const std::string far = std::to_string(side * 10);
  return R"({"survey": "bench", "crs": "local", "boundary": {"type": "Polygon", "coordinates": [[[0,0],[)" + far +
         ",0],[" + far + "," + far + "],[0," + far +
         R"(],[0,0]]]}, "lattice": {"kind": "square", "spacing_m": 10, "origin": [5, 5]}, "neighbours": 8,
  "pit": {"shape": "square", "size_m": 0.5}, "finds": ["flake", "sherd"], "positive": {"finds": ["flake"], "at_least": 1},
  "initial": {"draw": "pits", "count": {"all": )" +
         std::to_string(grid_pits) + R"(}, "seed": 7}})";
}

// A survey of side x side nodes in a folder of its own, open on the desk, with everything that a frame needs.
class Window {
 public:
  Window(int side, int grid_pits) : gl_(kWidth, kHeight) {
    char name[] = "/tmp/nearpit-bench-XXXXXX";
    folder_ = mkdtemp(name);
    environment_ = std::make_unique<Environment>(std::move(real_environment()).value());
    environment_->user_folder = folder_;
    environment_->memory = WriterMemory(folder_);
    std::ofstream(folder_ + "/plan.json") << plan_of(side, grid_pits);
    const std::string file = folder_ + "/survey.gpkg";
    static_cast<void>(make_survey(folder_ + "/plan.json", file, *environment_).value());
    record(file, grid_pits / 10);
    desk_ = std::make_unique<Desk>(*environment_);
    desk_->carry_out(SetMillimetre{glass_.px_per_mm});
    desk_->carry_out(OpenSurvey{file});
    static_cast<void>(frontend_.start_gl());
  }
  Window(const Window&) = delete;
  Window& operator=(const Window&) = delete;
  ~Window() {
    frontend_.stop_gl();
    std::filesystem::remove_all(folder_);
  }

  void frame() {
    frontend_.frame(&queue_, glass_, sun_theme(), [this](Ui& ui) { draw_screen(ui, desk_->view(), screen_, sink_); });
    for (const Request& request : sink_.take())
      desk_->carry_out(request);
    frontend_.render();
    gl_.finish();
  }
  InputQueue& queue() { return queue_; }
  Desk& desk() { return *desk_; }
  int triangles() const { return frontend_.triangles(); }

 private:
  void record(const std::string& file, int pits) {
    auto session = Session::open(file, *environment_, false);
    std::vector<Action> actions;
    const DigOrder order = session->dig_order("", std::nullopt);
    for (int i = 0; i < pits; ++i) {
      RecordPit pit;
      pit.pit = session->model().label(order.due[static_cast<std::size_t>(i)].node);
      pit.counts[0] = i % 7 == 0 ? 2u : 0u;
      actions.push_back({pit, "A", "", {}});
    }
    static_cast<void>(session->apply(actions).value());
  }

  OffscreenGl gl_;
  std::string folder_;
  std::unique_ptr<Environment> environment_;
  std::unique_ptr<Desk> desk_;
  Frontend frontend_;
  ScreenState screen_;
  Sink sink_;
  InputQueue queue_;
  const Glass glass_{kWidth, kHeight, 144 / 25.4};
};

void pan_frame(benchmark::State& state) {
  const bool large = state.range(0) > 100;
  Window window(static_cast<int>(state.range(0)), large ? 100'000 : 400);
  for (int i = 0; i < 5; ++i)
    window.frame();
  const Pixel middle{300, 300};
  for (int i = 0; i < state.range(1); ++i) {
    window.queue().add(WheelTurned{middle, 1});
    window.frame();
  }
  window.queue().add(PointerPressed{middle});
  window.frame();
  int step = 0;
  for (auto _ : state) {
    ++step;
    const float there = std::fmod(static_cast<float>(step) * 7, 120.0F);
    window.queue().add(PointerMoved{{middle.x + there, middle.y + 20 + there / 2}});
    window.frame();
  }
  state.counters["triangles"] = window.triangles();
}
// Side of the survey in nodes, and how many steps of the wheel nearer than the whole.
BENCHMARK(pan_frame)
    ->Args({100, 0})
    ->Args({100, 6})
    ->Args({1000, 0})
    ->Args({1000, 10})
    ->Unit(benchmark::kMillisecond)
    ->UseRealTime();

void save_and_show(benchmark::State& state) {
  const bool large = state.range(0) > 100;
  Window window(static_cast<int>(state.range(0)), large ? 100'000 : 400);
  for (int i = 0; i < 5; ++i)
    window.frame();
  for (auto _ : state) {
    Desk& desk = window.desk();
    desk.carry_out(OpenRecord{desk.view().survey->proposed->label});
    RecordDraft draft = *desk.view().survey->draft;
    draft.nothing_found = true;
    desk.carry_out(KeepDraft{draft});
    desk.carry_out(SaveRecord{});
    window.frame();
  }
}
BENCHMARK(save_and_show)->Arg(100)->Arg(1000)->Unit(benchmark::kMillisecond)->UseRealTime()->Iterations(20);

void open_and_show(benchmark::State& state) {
  for (auto _ : state) {
    state.PauseTiming();
    auto window = std::make_unique<Window>(static_cast<int>(state.range(0)), 400);
    const std::string file = window->desk().view().survey->file;
    state.ResumeTiming();
    window->desk().carry_out(OpenSurvey{file});
    window->frame();
    state.PauseTiming();
    window.reset();
    state.ResumeTiming();
  }
}
BENCHMARK(open_and_show)->Arg(100)->Unit(benchmark::kMillisecond)->UseRealTime()->Iterations(3);

}  // namespace
}  // namespace nearpit::ui
