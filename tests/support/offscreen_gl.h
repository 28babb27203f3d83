// An OpenGL context without a screen, drawn in software by Mesa: the real renderer for tests and benchmarks of what is drawn.
#ifndef NEARPIT_TESTS_SUPPORT_OFFSCREEN_GL_H_
#define NEARPIT_TESTS_SUPPORT_OFFSCREEN_GL_H_

#include <string>

namespace nearpit {

class OffscreenGl {
 public:
  // Current from here on. `problem()` says why there is none.
  OffscreenGl(int width, int height);
  OffscreenGl(const OffscreenGl&) = delete;
  OffscreenGl& operator=(const OffscreenGl&) = delete;
  ~OffscreenGl();

  bool ok() const { return problem_.empty(); }
  const std::string& problem() const { return problem_; }
  // "llvmpipe (LLVM 15.0.6, 256 bits)"
  std::string renderer() const;
  // Waits until everything is drawn, as showing it would.
  void finish() const;

 private:
  void* display_ = nullptr;
  void* surface_ = nullptr;
  void* context_ = nullptr;
  std::string problem_;
};

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_OFFSCREEN_GL_H_
