#include "cards/clusters_card.h"

#include <string>
#include <vector>

#include "base/numbers.h"
#include "base/text.h"
#include "desk/words.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr double kRow_mm = 17;

std::string finds_of(const Cluster& cluster, const SurveyModel& model) {
  std::vector<std::string> finds;
  for (std::size_t i = 0; i < cluster.finds.size(); ++i) {
    if (cluster.finds[i] > 0) finds.push_back(model.plan().finds[i] + " " + std::to_string(cluster.finds[i]));
  }
  return join(finds, ", ");
}

}  // namespace

void clusters_card(Ui& ui, const PixelBox& box, const SurveyView& survey, ClustersState& state, Sink& sink) {
  const Ui::Part part = ui.part("clusters");
  const SurveyModel& model = *survey.model;
  PixelBox left = box;
  std::size_t open = 0;
  for (const Cluster& cluster : survey.clusters)
    open += cluster.closed() ? 0u : 1u;
  const std::string head = survey.clusters.empty() ? "No cluster yet: no grid pit was positive."
                                                   : counted(survey.clusters.size(), "cluster", "clusters") + ", " +
                                                         std::to_string(open) + " not dug out yet";
  ui.text(cut_top(&left, ui.mm(2 * line_mm(TextSize::kBase)), ui.mm(kGap_mm)), head, {.lines = 2});
  paged_list(ui, "list", left, &state.scroll, survey.clusters.size(), ui.mm(kRow_mm),
             [&](std::size_t index, const PixelBox& row) {
               const Cluster& cluster = survey.clusters[index];
               const std::string label = model.label(cluster.label);
               const bool chosen = survey.chosen && survey.chosen->name.label == label;
               if (ui.row(label, row, label, chosen)) sink.send(ChoosePit{label});
               const Ui::Part inner = ui.part(label);
               const Tone tone = chosen ? Tone::kOnChosen : Tone::kOnKey;
               PixelBox inside = in_row(ui, row);
               ui.text(cut_top(&inside, ui.mm(line_mm(TextSize::kBase))),
                       label + ": " + counted(cluster.network.nodes.size(), "positive pit", "positive pits") +
                           ", about " + format_significant(cluster.area_m2, 2) + " m\xC2\xB2",
                       {.tone = tone, .shorten = true});
               ui.text(cut_top(&inside, ui.mm(line_mm(TextSize::kSmall))), finds_of(cluster, model),
                       {.size = TextSize::kSmall, .tone = tone, .shorten = true});
               std::string rest = cluster.closed()
                                      ? "dug out: nothing around it is left to dig"
                                      : counted(cluster.network.open.size(), "pit", "pits") + " around it still to dig";
               if (cluster.network.cut_at_edge) rest += "; cut at the edge of its block";
               ui.text(cut_top(&inside, ui.mm(line_mm(TextSize::kSmall))), rest,
                       {.size = TextSize::kSmall, .tone = tone, .shorten = true});
             });
}

}  // namespace nearpit::ui
