#include "window/app_window.h"

#define GLFW_INCLUDE_NONE
#include <GLFW/glfw3.h>

#include <algorithm>
#include <atomic>
#include <chrono>
#include <csignal>
#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <memory>
#include <optional>
#include <thread>

#include "base/numbers.h"
#include "stage.h"

namespace nearpit::ui {
namespace {

// Lives as long as GLFW is up.
struct Library {
  bool up = false;
  Library() { up = glfwInit() == GLFW_TRUE; }
  Library(const Library&) = delete;
  Library& operator=(const Library&) = delete;
  ~Library() {
    if (up) glfwTerminate();
  }
};

std::string last_error() {
  const char* text = nullptr;
  glfwGetError(&text);
  return text == nullptr ? "no display" : text;
}

Error no_window(const std::string& why) {
  return Error(ErrorKind::kIo,
               "no window can be opened: " + why + "; the same work can be done by command, see 'nearpit --help'");
}

// Waits in a thread of its own for a signal that asks the process to end, because little may be done inside a signal's handler. Made before any
// other thread, so that none of them takes the signals.
class EndWatch {
 public:
  EndWatch() {
    sigemptyset(&signals_);
    for (const int signal : {SIGTERM, SIGINT, SIGHUP})
      sigaddset(&signals_, signal);
    pthread_sigmask(SIG_BLOCK, &signals_, &before_);
    thread_ = std::thread([this] {
      int signal = 0;
      sigwait(&signals_, &signal);
      asked_ = true;
      if (wakes_) glfwPostEmptyEvent();
    });
  }
  EndWatch(const EndWatch&) = delete;
  EndWatch& operator=(const EndWatch&) = delete;
  ~EndWatch() {
    wakes_ = false;
    if (!asked_) pthread_kill(thread_.native_handle(), SIGTERM);
    thread_.join();
    pthread_sigmask(SIG_SETMASK, &before_, nullptr);
  }
  bool asked() const { return asked_; }
  // From here on the event loop is woken.
  void wake_window(bool on) { wakes_ = on; }

 private:
  sigset_t signals_{};
  sigset_t before_{};
  std::atomic<bool> asked_{false};
  std::atomic<bool> wakes_{false};
  std::thread thread_;
};

struct Size {
  int width = 1280;
  int height = 800;
};

std::optional<Size> wished_size() {
  const char* text = std::getenv("NEARPIT_WINDOW");
  if (text == nullptr) return std::nullopt;
  const std::string size(text);
  const std::size_t cross = size.find('x');
  if (cross == std::string::npos) return std::nullopt;
  const auto width = parse_int(size.substr(0, cross));
  const auto height = parse_int(size.substr(cross + 1));
  if (!width || !height || *width < 200 || *height < 200 || *width > 16384 || *height > 16384) return std::nullopt;
  return Size{static_cast<int>(*width), static_cast<int>(*height)};
}

std::optional<Key> key_of(int key, int modifiers) {
  switch (key) {
    case GLFW_KEY_TAB:
      return (modifiers & GLFW_MOD_SHIFT) != 0 ? Key::kBackTab : Key::kTab;
    case GLFW_KEY_ENTER:
    case GLFW_KEY_KP_ENTER:
      return Key::kEnter;
    case GLFW_KEY_ESCAPE:
      return Key::kEscape;
    case GLFW_KEY_BACKSPACE:
      return Key::kBackspace;
    case GLFW_KEY_DELETE:
      return Key::kDelete;
    case GLFW_KEY_LEFT:
      return Key::kLeft;
    case GLFW_KEY_RIGHT:
      return Key::kRight;
    case GLFW_KEY_UP:
      return Key::kUp;
    case GLFW_KEY_DOWN:
      return Key::kDown;
    case GLFW_KEY_HOME:
      return Key::kHome;
    case GLFW_KEY_END:
      return Key::kEnd;
    case GLFW_KEY_PAGE_UP:
      return Key::kPageUp;
    case GLFW_KEY_PAGE_DOWN:
      return Key::kPageDown;
    default:
      return std::nullopt;
  }
}

bool may_repeat(Key key) { return key != Key::kEnter && key != Key::kEscape; }

class AppWindow {
 public:
  explicit AppWindow(Environment& environment) : stage_(environment, now) {}
  AppWindow(const AppWindow&) = delete;
  AppWindow& operator=(const AppWindow&) = delete;
  ~AppWindow() {
    if (window_ == nullptr) return;
    stage_.frontend().stop_gl();
    glfwDestroyWindow(window_);
  }

  Status open();
  void run(const std::string& file, const EndWatch& end);

 private:
  static AppWindow& of(GLFWwindow* window) { return *static_cast<AppWindow*>(glfwGetWindowUserPointer(window)); }
  void take_events();
  void add(const InputEvent& event) { stage_.add(event); }
  void measure();
  void draw();
  void tell_widgets() const;
  Pixel pointer() const {
    double x = 0;
    double y = 0;
    glfwGetCursorPos(window_, &x, &y);
    return on_glass(x, y);
  }
  // Window coordinates are not always pixels.
  Pixel on_glass(double x, double y) const {
    return {static_cast<float>(x * pixels_x_), static_cast<float>(y * pixels_y_)};
  }
  static Milliseconds now() {
    return std::chrono::duration_cast<std::chrono::milliseconds>(std::chrono::steady_clock::now().time_since_epoch())
        .count();
  }

  Library library_;
  GLFWwindow* window_ = nullptr;
  Stage stage_;
  float width_px_ = 0;
  float height_px_ = 0;
  double guessed_px_per_mm_ = 96 / 25.4;
  double pixels_x_ = 1;
  double pixels_y_ = 1;
  bool repeats_ = false;  // the last key was held down
};

Status AppWindow::open() {
  if (!library_.up) return no_window(last_error());
  glfwWindowHint(GLFW_CONTEXT_VERSION_MAJOR, 3);
  glfwWindowHint(GLFW_CONTEXT_VERSION_MINOR, 0);
  const std::optional<Size> wished = wished_size();
  GLFWmonitor* monitor = glfwGetPrimaryMonitor();
  Size size = wished.value_or(Size{});
  if (monitor != nullptr && !wished) glfwGetMonitorWorkarea(monitor, nullptr, nullptr, &size.width, &size.height);
  glfwWindowHint(GLFW_MAXIMIZED, wished ? GLFW_FALSE : GLFW_TRUE);
  window_ = glfwCreateWindow(size.width, size.height, "Nearpit", nullptr, nullptr);
  if (window_ == nullptr) return no_window(last_error());
  glfwMakeContextCurrent(window_);
  glfwSwapInterval(1);
  NEARPIT_TRY(stage_.frontend().start_gl());
  if (const std::string& complaint = stage_.frontend().fonts().complaint(); !complaint.empty())
    std::fprintf(stderr, "note: %s\n", complaint.c_str());
  if (monitor != nullptr) {
    int width_mm = 0;
    int height_mm = 0;
    glfwGetMonitorPhysicalSize(monitor, &width_mm, &height_mm);
    const GLFWvidmode* mode = glfwGetVideoMode(monitor);
    float scale_x = 1;
    glfwGetWindowContentScale(window_, &scale_x, nullptr);
    guessed_px_per_mm_ = guessed_px_per_mm(mode == nullptr ? 0 : mode->width, width_mm, scale_x);
  }
  take_events();
  return ok_status();
}

void AppWindow::take_events() {
  glfwSetWindowUserPointer(window_, this);
  glfwSetCursorPosCallback(
      window_, [](GLFWwindow* window, double x, double y) { of(window).add(PointerMoved{of(window).on_glass(x, y)}); });
  glfwSetMouseButtonCallback(window_, [](GLFWwindow* window, int button, int action, int) {
    if (button != GLFW_MOUSE_BUTTON_LEFT) return;
    const Pixel at = of(window).pointer();
    of(window).add(action == GLFW_PRESS ? InputEvent(PointerPressed{at}) : InputEvent(PointerReleased{at}));
  });
  glfwSetScrollCallback(window_, [](GLFWwindow* window, double, double steps) {
    of(window).add(WheelTurned{of(window).pointer(), static_cast<float>(steps)});
  });
  glfwSetKeyCallback(window_, [](GLFWwindow* window, int key, int, int action, int modifiers) {
    of(window).repeats_ = action == GLFW_REPEAT;
    const auto own = key_of(key, modifiers);
    // A key that is held down moves and rubs out again and again, and does nothing else twice.
    if (action == GLFW_RELEASE || !own || (action == GLFW_REPEAT && !may_repeat(*own))) return;
    of(window).add(KeyStruck{*own});
  });
  glfwSetCharCallback(window_, [](GLFWwindow* window, unsigned int character) {
    if (of(window).repeats_ && !of(window).stage_.typing()) return;
    of(window).add(CharacterTyped{static_cast<char32_t>(character)});
  });
  const auto redraw = [](GLFWwindow* window) { of(window).stage_.redraw(); };
  glfwSetWindowRefreshCallback(window_, redraw);
  glfwSetFramebufferSizeCallback(window_, [](GLFWwindow* window, int, int) { of(window).stage_.redraw(); });
}

void AppWindow::measure() {
  int width = 0;
  int height = 0;
  glfwGetFramebufferSize(window_, &width, &height);
  int window_width = 0;
  int window_height = 0;
  glfwGetWindowSize(window_, &window_width, &window_height);
  if (window_width > 0 && window_height > 0) {
    pixels_x_ = static_cast<double>(width) / window_width;
    pixels_y_ = static_cast<double>(height) / window_height;
  }
  width_px_ = static_cast<float>(width);
  height_px_ = static_cast<float>(height);
}

void AppWindow::tell_widgets() const {
  const char* path = std::getenv("NEARPIT_WIDGETS");
  if (path == nullptr) return;
  const std::string beside = std::string(path) + ".new";
  std::ofstream(beside) << widget_lines(stage_.frontend().log());
  std::rename(beside.c_str(), path);
}

void AppWindow::draw() {
  measure();
  if (!stage_.frame(width_px_, height_px_, guessed_px_per_mm_)) return;
  stage_.frontend().render();
  glfwSwapBuffers(window_);
  if (stage_.next().next == Next::kWait) tell_widgets();
}

void AppWindow::run(const std::string& file, const EndWatch& end) {
  if (!file.empty()) stage_.open(file);
  while (glfwWindowShouldClose(window_) == GLFW_FALSE && !end.asked()) {
    const IdleStep step = stage_.next();
    if (step.next == Next::kDraw) {
      draw();
      glfwPollEvents();
    } else if (step.wait_at_most) {
      glfwWaitEventsTimeout(std::max(0.001, static_cast<double>(*step.wait_at_most) / 1000));
    } else {
      glfwWaitEvents();
    }
  }
}

}  // namespace

Status run_window(Environment& environment, const std::string& file) {
  EndWatch end;
  const auto window = std::make_unique<AppWindow>(environment);
  NEARPIT_TRY(window->open());
  end.wake_window(true);
  window->run(file, end);
  end.wake_window(false);
  return ok_status();
}

}  // namespace nearpit::ui
