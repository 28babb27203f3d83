#include "support/offscreen_gl.h"

#include <EGL/egl.h>
#include <EGL/eglext.h>
#include <GL/gl.h>

namespace nearpit {

OffscreenGl::OffscreenGl(int width, int height) {
  const auto get_display =
      reinterpret_cast<PFNEGLGETPLATFORMDISPLAYEXTPROC>(eglGetProcAddress("eglGetPlatformDisplayEXT"));
  if (get_display == nullptr) {
    problem_ = "EGL has no platform displays";
    return;
  }
  EGLDisplay display = get_display(EGL_PLATFORM_SURFACELESS_MESA, EGL_DEFAULT_DISPLAY, nullptr);
  if (display == EGL_NO_DISPLAY || eglInitialize(display, nullptr, nullptr) == EGL_FALSE) {
    problem_ = "no surfaceless EGL display";
    return;
  }
  display_ = display;
  const EGLint wanted[] = {EGL_SURFACE_TYPE,
                           EGL_PBUFFER_BIT,
                           EGL_RENDERABLE_TYPE,
                           EGL_OPENGL_BIT,
                           EGL_RED_SIZE,
                           8,
                           EGL_GREEN_SIZE,
                           8,
                           EGL_BLUE_SIZE,
                           8,
                           EGL_NONE};
  EGLConfig config = nullptr;
  EGLint configs = 0;
  if (eglChooseConfig(display, wanted, &config, 1, &configs) == EGL_FALSE || configs == 0) {
    problem_ = "no EGL configuration for OpenGL on a pixel buffer";
    return;
  }
  const EGLint size[] = {EGL_WIDTH, width, EGL_HEIGHT, height, EGL_NONE};
  surface_ = eglCreatePbufferSurface(display, config, size);
  eglBindAPI(EGL_OPENGL_API);
  context_ = eglCreateContext(display, config, EGL_NO_CONTEXT, nullptr);
  if (context_ == EGL_NO_CONTEXT || eglMakeCurrent(display, surface_, surface_, context_) == EGL_FALSE)
    problem_ = "EGL gives no OpenGL context";
}

OffscreenGl::~OffscreenGl() {
  if (display_ == nullptr) return;
  eglMakeCurrent(display_, EGL_NO_SURFACE, EGL_NO_SURFACE, EGL_NO_CONTEXT);
  if (context_ != nullptr) eglDestroyContext(display_, context_);
  if (surface_ != nullptr) eglDestroySurface(display_, surface_);
  eglTerminate(display_);
}

std::string OffscreenGl::renderer() const {
  const auto* name = glGetString(GL_RENDERER);
  return name == nullptr ? "" : reinterpret_cast<const char*>(name);
}

void OffscreenGl::finish() const { glFinish(); }

}  // namespace nearpit
