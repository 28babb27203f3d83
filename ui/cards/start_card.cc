#include "cards/start_card.h"

#include <algorithm>
#include <cstdint>

#include "base/numbers.h"
#include "base/text.h"
#include "desk/words.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr double kRow_mm = 14;

std::string name_of(const std::string& path) { return path.substr(path.rfind('/') + 1); }
std::string folder_of(const std::string& path) {
  const std::size_t slash = path.rfind('/');
  return slash == 0 ? "/" : path.substr(0, slash);
}

std::string size_in_words(std::int64_t bytes) {
  if (bytes >= 1'000'000) return format_fixed(static_cast<double>(bytes) / 1e6, 1) + " MB";
  return format_fixed(std::max(1.0, static_cast<double>(bytes) / 1e3), 0) + " kB";
}

// Two lines in a row of a list.
bool two_lines(Ui& ui, const std::string& name, const PixelBox& box, const std::string& first,
               const std::string& second) {
  const bool touched = ui.row(name, box, first, false);
  const Ui::Part part = ui.part(name);
  PixelBox inside = in_row(ui, box);
  ui.text(cut_top(&inside, inside.height() * 0.55F), first, {.tone = Tone::kOnKey, .shorten = true});
  ui.text(inside, second, {.size = TextSize::kSmall, .tone = Tone::kOnKey, .shorten = true});
  return touched;
}

void recent_surveys(Ui& ui, PixelBox box, const DeskView& desk, StartState& state, Sink& sink) {
  ui.text(cut_top(&box, ui.mm(line_mm(TextSize::kBase)), ui.mm(kGap_mm)),
          desk.recent.empty() ? "No survey was opened here yet." : "Opened lately");
  paged_list(ui, "recent", box, &state.recent, desk.recent.size(), ui.mm(kRow_mm),
             [&](std::size_t index, const PixelBox& row) {
               const std::string& path = desk.recent[index];
               if (two_lines(ui, "recent-" + std::to_string(index), row, name_of(path), folder_of(path)))
                 sink.send(OpenSurvey{path});
             });
}

void places(Ui& ui, PixelBox box, const DeskView& desk, Sink& sink) {
  const std::string what = "Look for a survey file (.gpkg), or a plan (.json) to make one from";
  ui.text(cut_top(&box, ui.text_height(what, box.width(), TextSize::kBase), ui.mm(kGap_mm)), what, {.lines = 2});
  for (std::size_t i = 0; i < desk.places.size() && box.height() >= ui.mm(kTarget_mm); ++i) {
    if (ui.button("place-" + std::to_string(i), cut_top(&box, ui.mm(kTarget_mm), ui.mm(kGap_mm)), desk.places[i].name,
                  {.align = Align::kLeft, .under = desk.places[i].path, .shorten = true})) {
      sink.send(BrowseFolder{desk.places[i].path});
    }
  }
}

void files(Ui& ui, PixelBox box, const FolderList& folder, StartState& state, Sink& sink) {
  PixelBox head = cut_top(&box, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  if (ui.button("places", cut_right(&head, ui.mm(24), ui.mm(kGap_mm)), "Other places", {.size = TextSize::kSmall}))
    sink.send(BrowseFolder{""});
  if (ui.button("up", cut_right(&head, ui.mm(24), ui.mm(kGap_mm)), "Folder above", {.size = TextSize::kSmall}) &&
      !folder.parent.empty()) {
    sink.send(BrowseFolder{folder.parent});
  }
  ui.text(head, folder.path, {.size = TextSize::kSmall, .lines = 3, .shorten = true});
  if (folder.entries.empty())
    ui.text(cut_top(&box, ui.mm(kTarget_mm)), "Nothing here that this program opens.", {.tone = Tone::kQuiet});
  paged_list(ui, "files", box, &state.files, folder.entries.size(), ui.mm(kRow_mm),
             [&](std::size_t index, const PixelBox& row) {
               const FolderEntry& entry = folder.entries[index];
               const std::string path = (folder.path == "/" ? "" : folder.path) + "/" + entry.name;
               const bool plan =
                   !entry.folder && !entry.name.ends_with(".gpkg") && fold_case(entry.name).ends_with(".json");
               const std::string what =
                   entry.folder ? "folder" : (plan ? "perhaps a plan, " : "survey, ") + size_in_words(entry.bytes);
               if (!two_lines(ui, "file-" + entry.name, row, entry.name, what)) return;
               if (entry.folder) {
                 state.files.offset = 0;
                 sink.send(BrowseFolder{path});
               } else if (plan) {
                 state.plan = path;
                 state.name = entry.name.substr(0, entry.name.rfind('.'));
               } else {
                 sink.send(OpenSurvey{path});
               }
             });
}

void make_from_plan(Ui& ui, PixelBox box, StartState& state, TypingState& typing, Sink& sink) {
  const auto line = [&] { return cut_top(&box, ui.mm(line_mm(TextSize::kBase)), ui.mm(kGap_mm)); };
  ui.text(line(), "A new survey from the plan " + name_of(state.plan), {.shorten = true});
  ui.text(cut_top(&box, ui.mm(2 * line_mm(TextSize::kSmall)), ui.mm(kGap_mm)),
          "The first sample is drawn now and stays. The file goes into " + folder_of(state.plan),
          {.size = TextSize::kSmall, .tone = Tone::kQuiet, .lines = 2, .shorten = true});
  if (ui.button("name", cut_top(&box, ui.mm(kTarget_mm), ui.mm(kGap_mm)), "File name: " + state.name + ".gpkg",
                {.align = Align::kLeft, .shorten = true})) {
    begin_typing(&typing, TypingFor::kFileName, "Name of the survey file", state.name, {}, 100);
  }
  PixelBox foot = cut_top(&box, ui.mm(kPrimary_mm));
  if (ui.button("back", cut_left(&foot, ui.mm(34), ui.mm(kGap_mm)), "Another file", {.least_mm = kPrimary_mm}))
    state.plan.clear();
  if (ui.button("make", foot, "Make the survey", {.kind = ButtonKind::kPrimary, .least_mm = kPrimary_mm}))
    sink.send(MakeSurvey{state.plan, folder_of(state.plan), state.name});
}

}  // namespace

void start_card(Ui& ui, const PixelBox& box, const DeskView& desk, StartState& state, TypingState& typing, Sink& sink) {
  const Ui::Part part = ui.part("start");
  PixelBox left = box;
  PixelBox head = cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  if (ui.button("keys", cut_right(&head, ui.mm(26), ui.mm(kGap_mm)), "Marks and keys", {.size = TextSize::kSmall}))
    sink.send(ShowCard{CardKind::kKeys});
  if (ui.button("sizes", cut_right(&head, ui.mm(26), ui.mm(kGap_mm)), "Sizes", {.size = TextSize::kSmall}))
    sink.send(ShowCard{CardKind::kSizes});
  if (ui.button("theme", cut_right(&head, ui.mm(26), ui.mm(kGap_mm)), desk.dusk ? "Sun colours" : "Dusk colours",
                {.size = TextSize::kSmall})) {
    sink.send(SetDusk{!desk.dusk});
  }
  ui.text(head, "Nearpit", {.size = TextSize::kLarge});
  PixelBox recent = cut_left(&left, left.width() * 0.45F, ui.mm(2 * kGap_mm));
  recent_surveys(ui, recent, desk, state, sink);
  if (!state.plan.empty()) {
    make_from_plan(ui, left, state, typing, sink);
  } else if (desk.folder) {
    files(ui, left, *desk.folder, state, sink);
  } else {
    places(ui, left, desk, sink);
  }
}

}  // namespace nearpit::ui
