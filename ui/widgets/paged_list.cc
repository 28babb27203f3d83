#include "widgets/paged_list.h"

#include <algorithm>
#include <cmath>
#include <string>

namespace nearpit::ui {
namespace {

// Cuts the column of paging buttons off *box and lets them act.
void page_buttons(Ui& ui, std::string_view name, PixelBox* box, ScrollState* state) {
  PixelBox column = cut_right(box, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  const float most = std::max(0.0F, state->content - column.height());
  const float page = column.height() * 0.8F;
  const Ui::Part part = ui.part(name);
  const PixelBox up = cut_top(&column, (column.height() - ui.mm(kGap_mm)) / 2, ui.mm(kGap_mm));
  if (ui.button("up", up, "\xE2\x86\x91", {.size = TextSize::kLarge})) state->offset -= page;
  if (ui.button("down", column, "\xE2\x86\x93", {.size = TextSize::kLarge})) state->offset += page;
  state->offset = std::clamp(state->offset, 0.0F, most);
}

}  // namespace

void paged_list(Ui& ui, std::string_view name, const PixelBox& box, ScrollState* state, std::size_t rows,
                float row_height, const std::function<void(std::size_t, const PixelBox&)>& draw) {
  PixelBox area = box;
  const float step = row_height + ui.mm(kGap_mm);
  const float content = rows == 0 ? 0 : static_cast<float>(rows) * step - ui.mm(kGap_mm);
  state->content = content;
  if (content > box.height() + 1) page_buttons(ui, name, &area, state);
  const PixelBox start = ui.begin_scroll(name, area, state);
  // One row beyond the edges, so that the keyboard's ring can go on to it.
  const auto row_at = [&](float y) { return static_cast<long>(std::floor((y - start.top) / step)); };
  const auto first = static_cast<std::size_t>(std::max(0L, row_at(area.top) - 1));
  const auto last = static_cast<std::size_t>(std::max(0L, row_at(area.bottom) + 2));
  for (std::size_t row = first; row < std::min(rows, last); ++row) {
    const float top = start.top + static_cast<float>(row) * step;
    draw(row, {area.left, top, area.right - ui.mm(kGap_mm) / 2, top + row_height});
  }
  ui.end_scroll(start.top + content);
}

void paged_text(Ui& ui, std::string_view name, const PixelBox& box, ScrollState* state,
                const std::function<float(const PixelBox&)>& draw) {
  PixelBox area = box;
  if (state->content > box.height() + 1) page_buttons(ui, name, &area, state);
  PixelBox start = ui.begin_scroll(name, area, state);
  start.right -= ui.mm(kGap_mm) / 2;
  ui.end_scroll(draw(start));
}

}  // namespace nearpit::ui
