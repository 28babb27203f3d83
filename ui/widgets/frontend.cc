#include "widgets/frontend.h"

#include <GL/gl.h>
#include <backends/imgui_impl_opengl3.h>
#include <imgui.h>

#include <algorithm>
#include <cmath>

#include "widgets/focus_order.h"

namespace nearpit::ui {
namespace {

// Time only drives animations of the library that nothing here uses.
constexpr float kFrame_s = 1.0F / 60;

bool is_arrow(Key key) { return key == Key::kLeft || key == Key::kRight || key == Key::kUp || key == Key::kDown; }

}  // namespace

Frontend::Frontend() : context_(ImGui::CreateContext()) {
  ImGui::SetCurrentContext(context_);
  ImGuiIO& io = ImGui::GetIO();
  io.IniFilename = nullptr;
  io.LogFilename = nullptr;
  io.ConfigInputTextCursorBlink = false;
  io.BackendFlags |= ImGuiBackendFlags_RendererHasVtxOffset;
  ImGuiStyle& style = ImGui::GetStyle();
  style.WindowPadding = {0, 0};
  style.WindowBorderSize = 0;
  style.WindowMinSize = {1, 1};
}

Frontend::~Frontend() { ImGui::DestroyContext(context_); }

Status Frontend::start_gl() {
  ImGui::SetCurrentContext(context_);
  if (!ImGui_ImplOpenGL3_Init("#version 130")) {
    return Error(ErrorKind::kIo,
                 "the window can't be drawn: OpenGL 3.0 is missing; install libgl1-mesa-dri, or use the commands "
                 "(nearpit --help)");
  }
  gl_ = true;
  return ok_status();
}

void Frontend::stop_gl() {
  ImGui::SetCurrentContext(context_);
  if (gl_) ImGui_ImplOpenGL3_Shutdown();
  gl_ = false;
}

void Frontend::begin(const FrameInput& input) {
  ImGuiIO& io = ImGui::GetIO();
  if (rebuild_) {
    fonts_.build(io.Fonts, glass_.px_per_mm, theme_);
    io.FontDefault = fonts_.of(TextSize::kBase);
    if (gl_) {
      ImGui_ImplOpenGL3_DestroyFontsTexture();
      ImGui_ImplOpenGL3_CreateFontsTexture();
    }
    rebuild_ = false;
  }
  io.DeltaTime = kFrame_s;
  io.DisplaySize = {glass_.width_px, glass_.height_px};
  io.MousePos = {input.pointer.x, input.pointer.y};
  io.MouseDown[0] = input.down;
  if (gl_) {
    // Its first call uploads the letters once more; from then on the texture has them.
    ImGui_ImplOpenGL3_NewFrame();
    io.Fonts->ClearTexData();
  }
  ImGui::NewFrame();
}

void Frontend::frame(InputQueue* queue, const Glass& glass, const Theme& theme, const std::function<void(Ui&)>& draw) {
  ImGui::SetCurrentContext(context_);
  rebuild_ = rebuild_ || glass.px_per_mm != glass_.px_per_mm || theme.ground.fill != theme_.ground.fill;
  glass_ = glass;
  theme_ = theme;
  const FrameInput input = queue->next_frame();
  if (input.pressed) ring_.shown = false;
  ring_.act_on.clear();
  const bool strikes = input.key == Key::kEnter || (input.character == U' ' && !ring_.typing);
  if (ring_.shown && strikes) ring_.act_on = ring_.path;
  FrameInput given = input;
  if (!ring_.act_on.empty()) given.key.reset(), given.character.reset();
  ring_.typing = false;
  begin(given);
  ImGui::SetNextWindowPos({0, 0});
  ImGui::SetNextWindowSize({glass.width_px, glass.height_px});
  ImGui::Begin("glass", nullptr,
               ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove | ImGuiWindowFlags_NoSavedSettings |
                   ImGuiWindowFlags_NoNav | ImGuiWindowFlags_NoBackground | ImGuiWindowFlags_NoScrollWithMouse |
                   ImGuiWindowFlags_NoBringToFrontOnFocus);
  log_ = {};
  Ui ui(glass_, theme_, &fonts_, given, &ring_, &log_, ImGui::GetWindowDrawList());
  ui.fill(ui.window(), theme.ground.fill);
  draw(ui);
  ring_.moved = false;
  // What it stood on is gone (a panel closed by it): keys are the card's again.
  if (find_widget(log_, ring_.path) == nullptr) ring_.shown = false;
  FrameInput left;
  left.key = ui.take_key();
  move_ring(left);
  rebuild_ = ui.wants_letters();
  ImGui::End();
  ImGui::Render();
}

void Frontend::move_ring(const FrameInput& input) {
  if (!input.key) return;
  const bool moves = input.key == Key::kTab || input.key == Key::kBackTab || (ring_.shown && is_arrow(*input.key));
  if (input.key == Key::kEscape) ring_.shown = false;
  if (!moves) return;
  // The first Tab shows the ring where it was, if that is still there.
  if (!ring_.shown && find_widget(log_, ring_.path) != nullptr) {
    ring_.shown = ring_.moved = true;
    return;
  }
  ring_.path = next_focus(log_, ring_.path, *input.key);
  ring_.shown = ring_.moved = true;
}

void Frontend::render() {
  ImGui::SetCurrentContext(context_);
  glViewport(0, 0, static_cast<int>(glass_.width_px), static_cast<int>(glass_.height_px));
  glClearColor(static_cast<float>(theme_.ground.fill.red) / 255, static_cast<float>(theme_.ground.fill.green) / 255,
               static_cast<float>(theme_.ground.fill.blue) / 255, 1);
  glClear(GL_COLOR_BUFFER_BIT);
  ImGui_ImplOpenGL3_RenderDrawData(ImGui::GetDrawData());
}

std::vector<unsigned char> Frontend::read_pixels() const {
  const int width = static_cast<int>(glass_.width_px);
  const int height = static_cast<int>(glass_.height_px);
  const std::size_t stride = 3 * static_cast<std::size_t>(width);
  std::vector<unsigned char> upside_down(stride * static_cast<std::size_t>(height));
  glPixelStorei(GL_PACK_ALIGNMENT, 1);
  glReadPixels(0, 0, width, height, GL_RGB, GL_UNSIGNED_BYTE, upside_down.data());
  std::vector<unsigned char> pixels(upside_down.size());
  for (std::size_t row = 0; row < static_cast<std::size_t>(height); ++row) {
    const auto* from = upside_down.data() + stride * (static_cast<std::size_t>(height) - 1 - row);
    std::copy_n(from, stride, pixels.data() + stride * row);
  }
  return pixels;
}

int Frontend::triangles() const {
  ImGui::SetCurrentContext(context_);
  const ImDrawData* data = ImGui::GetDrawData();
  return data == nullptr ? 0 : data->TotalIdxCount / 3;
}

}  // namespace nearpit::ui
