// Two tablets with a copy each of one small invented survey, for tests of what comes together. Clocks are set by the test.
#ifndef NEARPIT_TESTS_SESSION_TWO_DEVICES_H_
#define NEARPIT_TESTS_SESSION_TWO_DEVICES_H_

#include <string>

#include "session/session.h"

namespace nearpit {

class SetClock : public Clock {
 public:
  explicit SetClock(const std::int64_t* minute) : minute_(minute) {}
  WallTime now() override { return {1'770'000'000'000 + *minute_ * 60'000, 0}; }

 private:
  const std::int64_t* minute_;
};

struct Device {
  Device(const std::string& folder, const std::string& name);
  Session open();

  std::int64_t minute = 0;
  std::string file;
  Environment environment;
};

class TwoDevices {
 public:
  TwoDevices();
  TwoDevices(const TwoDevices&) = delete;
  TwoDevices& operator=(const TwoDevices&) = delete;
  ~TwoDevices();

 private:
  std::string folder_;  // before the devices: they live in it

 public:
  Device a;
  Device b;
};

// Puts every revision of `from` that `into` lacks into it, as another tablet's.
void take_in(const std::string& from, const std::string& into);
// Puts one revision of an unheard-of writer into the file.
void add_foreign_revision(const std::string& file, const std::string& object, const std::string& body);

// A row of a table: a pit of the first sample with so many flakes.
Action dug(const std::string& pit, std::uint32_t flakes);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SESSION_TWO_DEVICES_H_
