// The whole glass: map at the left, one card at the right, the strip below; or one thing over all of it where a crew types, opens a survey or sets
// sizes. Draws what the desk shows and hands what is asked for to the sink.
#ifndef NEARPIT_UI_SCREEN_H_
#define NEARPIT_UI_SCREEN_H_

#include "cards/clusters_card.h"
#include "cards/day_card.h"
#include "cards/dig_list_card.h"
#include "cards/keys_card.h"
#include "cards/office_card.h"
#include "cards/record_card.h"
#include "cards/sizes_card.h"
#include "cards/start_card.h"
#include "cards/typing_card.h"
#include "field_map/field_map.h"

namespace nearpit::ui {

// What the screen remembers of itself between frames; nothing of it is a record.
struct ScreenState {
  DigListState dig_list;
  RecordCardState record;
  DayCardState day;
  ClustersState clusters;
  StartState start;
  SizesState sizes;
  OfficeState office;
  KeysState keys;
  TypingState typing;
  FieldMapState map;
  ScrollState notice;
  std::string notice_read;  // what the notice's scroll belongs to
  ScrollState whole;        // on a glass too low for a card
  bool map_shown = false;   // on a glass too narrow for map and card: the map is shown
  std::string showing;      // which card, of which pit
};

// What a touch would act on: another text when another card, panel or notice came under the finger.
std::string under_the_finger(const DeskView& desk, const ScreenState& state);

void draw_screen(Ui& ui, const DeskView& desk, ScreenState& state, Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_SCREEN_H_
