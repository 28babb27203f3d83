// A list of rows of one height, with buttons to page by beside it where it is longer than its box. Only rows in view are drawn.
#ifndef NEARPIT_UI_WIDGETS_PAGED_LIST_H_
#define NEARPIT_UI_WIDGETS_PAGED_LIST_H_

#include <functional>
#include <string_view>

#include "widgets/ui.h"

namespace nearpit::ui {

// Calls draw(index, box of the row).
void paged_list(Ui& ui, std::string_view name, const PixelBox& box, ScrollState* state, std::size_t rows,
                float row_height, const std::function<void(std::size_t, const PixelBox&)>& draw);

// Content of any height: draw(box) returns where it ended.
void paged_text(Ui& ui, std::string_view name, const PixelBox& box, ScrollState* state,
                const std::function<float(const PixelBox&)>& draw);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_PAGED_LIST_H_
