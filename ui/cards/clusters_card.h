// The clusters: each with its pits, finds, ground, and whether it is dug out.
#ifndef NEARPIT_UI_CARDS_CLUSTERS_CARD_H_
#define NEARPIT_UI_CARDS_CLUSTERS_CARD_H_

#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct ClustersState {
  ScrollState scroll;
};

void clusters_card(Ui& ui, const PixelBox& box, const SurveyView& survey, ClustersState& state, Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_CLUSTERS_CARD_H_
