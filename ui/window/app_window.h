// The window on the desktop: GLFW is known in app_window.cc and nowhere else. Turns its events into the queue's, draws when the idle policy says so.
#ifndef NEARPIT_UI_WINDOW_APP_WINDOW_H_
#define NEARPIT_UI_WINDOW_APP_WINDOW_H_

#include <string>

#include "base/status.h"
#include "session/environment.h"

namespace nearpit::ui {

// Opens the window, with the survey in `file` unless that is empty, and runs until it is closed or the process is asked to end (SIGTERM, SIGINT, SIGHUP);
// what is typed is kept by then. Errors: no display, no OpenGL 3.
//
// NEARPIT_WIDGETS=PATH writes the place of every control of the last drawn frame there, for tests that drive the window from outside; it takes nothing in.
// NEARPIT_WINDOW=1024x600 is the window's size at first; else it fills the screen.
Status run_window(Environment& environment, const std::string& file);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WINDOW_APP_WINDOW_H_
