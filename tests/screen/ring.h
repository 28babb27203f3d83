// The keyboard's ring in tests.
#ifndef NEARPIT_TESTS_SCREEN_RING_H_
#define NEARPIT_TESTS_SCREEN_RING_H_

#include <stdexcept>
#include <string>

#include "screen/screen_driver.h"

namespace nearpit::ui {

// Tab until the ring stands on the control.
inline void ring_to(ScreenDriver& screen, const std::string& path) {
  for (int i = 0; i < 200; ++i) {
    if (screen.focused() != nullptr && screen.focused()->path == path) return;
    screen.key(Key::kTab);
  }
  throw std::runtime_error("Tab never comes to " + path);
}

}  // namespace nearpit::ui

#endif  // NEARPIT_TESTS_SCREEN_RING_H_
