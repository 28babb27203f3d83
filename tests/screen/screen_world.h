// What stands around the window in a test: a folder with plans and invented surveys, a person's own folder, a clock. It outlives the window, so that a test
// can throw one away in the middle of anything and start another.
#ifndef NEARPIT_TESTS_SCREEN_SCREEN_WORLD_H_
#define NEARPIT_TESTS_SCREEN_SCREEN_WORLD_H_

#include <cstdint>
#include <string>
#include <vector>

#include "session/session.h"

namespace nearpit::ui {

// A square of pits 10 m apart on a local grid, each one's record positive with any of the first two finds.
struct PlanSays {
  std::string survey = "five by five (invented)";
  int side = 5;
  std::vector<std::string> first_sample = {"T1-1", "T3-3", "T5-5"};
  std::vector<std::string> finds = {"flake", "sherd", "brick"};
  std::vector<std::string> crews = {};
  std::vector<std::string> require = {};
};
std::string plan_text(const PlanSays& says);

class ScreenWorld {
 public:
  ScreenWorld();
  ScreenWorld(const ScreenWorld&) = delete;
  ScreenWorld& operator=(const ScreenWorld&) = delete;
  ~ScreenWorld();

  const std::string& folder() const { return folder_; }
  std::string path(const std::string& name) const { return folder_ + "/" + name; }
  std::string user_folder() const { return user_folder_; }

  void put(const std::string& name, const std::string& text) const;
  // The glass was measured on an earlier start; `px_per_mm` of 0: this is the first start of all.
  void measured(double px_per_mm, bool dusk = false) const;
  // The path of a new survey file made from the plan.
  std::string make(const PlanSays& says = {}, const std::string& name = "survey");

  // As a program on this machine has it, with the world's clock.
  Environment environment(const std::string& device = "tablet") const;
  // The file as it is on the disk now, read by somebody else.
  Session read(const std::string& file);
  // Nothing where no record stands.
  const PitRecord* record(const Session& session, const std::string& pit) const;
  // Another program writes.
  void apply_elsewhere(const std::string& file, const std::vector<Action>& actions) const;
  // Another program records so many of the first find.
  void write_elsewhere(const std::string& file, const std::string& pit, std::uint32_t found) const;

  std::int64_t minute = 0;  // after 2026-05-04 09:00

 private:
  std::string folder_;
  std::string user_folder_;
  Environment reader_;
};

}  // namespace nearpit::ui

#endif  // NEARPIT_TESTS_SCREEN_SCREEN_WORLD_H_
