#include "cards/day_card.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <set>
#include <string>
#include <vector>

#include "base/numbers.h"
#include "base/text.h"
#include "desk/words.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr int kDigits = 2;
constexpr double kBar_mm = 5;

std::string figure(double value) { return format_significant(value, kDigits); }

// The same with thousands set apart: "22 000".
std::string big(double value) {
  std::string text = figure(value);
  const std::size_t whole = std::min(text.find_first_of(".e"), text.size());
  for (std::size_t at = whole; at > 3 + (text.front() == '-' ? 1u : 0u);) {
    at -= 3;
    text.insert(at, "\xC2\xA0");
  }
  return text;
}

// Writes text down a column.
struct Column {
  Ui& ui;
  PixelBox left;

  void put(const std::string& text, TextSize size = TextSize::kBase, Tone tone = Tone::kPlain) {
    const float height = ui.text_height(text, left.width(), size);
    ui.text(cut_top(&left, height), text, {.size = size, .tone = tone, .lines = 60, .shorten = true, .top = true});
  }
  void gap(double mm) { left.top += ui.mm(mm); }
};

void progress_sentences(Column& column, const Progress& progress) {
  std::string text = std::to_string(progress.first_sample_dug) + " of " +
                     counted(progress.first_sample, "grid pit is", "grid pits are") + " recorded. " +
                     counted(progress.dug, "pit", "pits") + " dug, " + std::to_string(progress.positive) +
                     " positive; " + std::to_string(progress.not_dug) + " not dug.";
  if (progress.judgement > 0) {
    text += " " + counted(progress.judgement, "judgement pit stands", "judgement pits stand") +
            " apart and in no figure below.";
  }
  column.put(text);
  column.gap(1);
  std::string open = counted(progress.due, "pit is", "pits are") + " still to dig";
  if (progress.halted > 0) open += ", " + counted(progress.halted, "is", "are") + " halted";
  if (progress.conflicts > 0)
    open += "; " + counted(progress.conflicts, "pit has", "pits have") + " records that disagree";
  column.put(progress.complete ? "The plan's digging is done." : open + ".");
}

// Reasons by what they bear on. Those of a single find stand below its own figure instead.
struct SharedReasons {
  std::vector<std::string> of_all;
  std::vector<std::string> of_clusters;   // only the ways that count the pits next to finds
  std::vector<std::string> of_grid_pits;  // only the grid pits alone
  std::set<std::string> all;
};

SharedReasons shared_reasons(const Figures& figures) {
  struct Where {
    std::set<std::string> of;
    bool clusters = false;
    bool grid_pits = false;
  };
  std::map<std::string, Where> found;
  std::vector<std::string> order;
  std::set<std::string> kinds;
  for (const Estimate& estimate : figures.estimates) {
    kinds.insert(estimate.of);
    for (const std::string& why : estimate.why) {
      if (!found.contains(why)) order.push_back(why);
      Where& where = found[why];
      where.of.insert(estimate.of);
      (estimate.estimator == Estimator::kFirstSampleOnly ? where.grid_pits : where.clusters) = true;
    }
  }
  SharedReasons shared;
  for (const std::string& why : order) {
    const Where& where = found[why];
    if (where.of.size() == 1 && kinds.size() > 1) continue;
    shared.all.insert(why);
    auto& list = where.clusters && where.grid_pits ? shared.of_all
                 : where.clusters                  ? shared.of_clusters
                                                   : shared.of_grid_pits;
    list.push_back(why);
  }
  return shared;
}

void reason_lines(Column& column, const std::string& head, const std::vector<std::string>& reasons) {
  if (reasons.empty()) return;
  column.put(head);
  for (const std::string& reason : reasons)
    column.put("\xC2\xB7 " + reason_in_words(reason), TextSize::kSmall);
  column.gap(1);
}

void open_reasons(Column& column, const Figures& figures, const SharedReasons& shared) {
  const bool final = std::all_of(figures.estimates.begin(), figures.estimates.end(),
                                 [](const Estimate& estimate) { return estimate.status == FigureStatus::kFinal; });
  column.put(final ? "The figures are final for this plan." : "The figures are not final.");
  reason_lines(column, "For all of them:", shared.of_all);
  reason_lines(column, "With the pits next to finds:", shared.of_clusters);
  reason_lines(column, "For the grid pits alone:", shared.of_grid_pits);
}

// The three ways of a figure, in a crew's words.
std::string way(Estimator estimator) {
  switch (estimator) {
    case Estimator::kHansenHurwitz:
      return "clusters by their average";
    case Estimator::kHorvitzThompson:
      return "clusters by their chance of being met";
    case Estimator::kFirstSampleOnly:
      return "grid pits alone";
  }
  return "";
}

struct Shown {
  double value = 0;
  std::optional<LikelyRange> range;
};

// Positive pits are shown as how many of the grid's, finds as how many a pit.
Shown shown(const Estimate& estimate, double pits) {
  const double factor = estimate.per_m2 ? 1 : pits;
  Shown out{estimate.mean_per_pit * factor, estimate.range};
  if (out.range) out.range->lower *= factor, out.range->upper *= factor;
  return out;
}

std::string likely(const LikelyRange& range, double factor) {
  return ", likely " + big(range.lower * factor) + " to " + big(range.upper * factor);
}

std::string sentence(const Estimate& estimate, double pits, double area_m2) {
  const Shown figures = shown(estimate, pits);
  std::string text = "about " + big(figures.value) +
                     (estimate.per_m2 ? " a pit" : " of " + std::to_string(std::lround(pits)) + " pits");
  if (figures.range) text += likely(*figures.range, 1);
  if (!estimate.per_m2) return text + ".";
  text += "; " + figure(*estimate.per_m2) + "\xC2\xA0per\xC2\xA0m\xC2\xB2; about " + big(estimate.total) +
          " on the whole ground";
  if (estimate.ground.range) text += likely(*estimate.ground.range, area_m2);
  return text + ".";
}

// The likely range as a bar with ends, the figure as a square on it.
void bar(Ui& ui, const PixelBox& box, const Shown& figures, double most) {
  const auto at = [&](double value) {
    return box.left + static_cast<float>(std::clamp(value / most, 0.0, 1.0)) * box.width();
  };
  const float middle = (box.top + box.bottom) / 2;
  const float thin = std::max(1.0F, ui.mm(0.3));
  ui.line({box.left, middle}, {box.right, middle}, ui.theme().hatch, thin);
  if (figures.range) {
    const float half = ui.mm(1.2);
    const PixelBox range{at(figures.range->lower), middle - half, at(figures.range->upper), middle + half};
    ui.fill(range, ui.theme().primary.fill);
    ui.line({range.left, box.top}, {range.left, box.bottom}, ui.theme().line, thin * 2);
    ui.line({range.right, box.top}, {range.right, box.bottom}, ui.theme().line, thin * 2);
  }
  const float dot = ui.mm(1.4);
  const PixelBox square{at(figures.value) - dot, middle - dot, at(figures.value) + dot, middle + dot};
  ui.fill(square, ui.theme().chosen.fill);
  ui.outline(square, ui.theme().line, thin * 2);
}

void figures_of(Column& column, const std::vector<const Estimate*>& rows, double pits, double area_m2,
                const SharedReasons& shared, const std::string& name) {
  Ui& ui = column.ui;
  column.gap(3);
  column.put(name);
  double most = 0;
  for (const Estimate* row : rows) {
    const Shown figures = shown(*row, pits);
    most = std::max({most, figures.value, figures.range ? figures.range->upper : 0});
  }
  most *= 1.04;  // the largest mark stands inside
  if (most <= 0) {
    column.put("none found so far", TextSize::kSmall);
    return;
  }
  for (const Estimate* row : rows) {
    column.gap(1.5);
    column.put(way(row->estimator) + ": " + sentence(*row, pits, area_m2), TextSize::kSmall);
    PixelBox line = cut_top(&column.left, ui.mm(kBar_mm));
    line.left += ui.mm(2);
    line.right -= ui.mm(2);
    bar(ui, line, shown(*row, pits), most);
    for (const std::string& why : row->why) {
      if (!shared.all.contains(why)) column.put(reason_in_words(why), TextSize::kSmall, Tone::kQuiet);
    }
  }
  const PixelBox scale = cut_top(&column.left, ui.mm(line_mm(TextSize::kSmall)));
  ui.text(scale, "0", {.size = TextSize::kSmall, .tone = Tone::kQuiet});
  ui.text(scale, big(most) + (rows.front()->per_m2 ? " a pit" : " pits"),
          {.size = TextSize::kSmall, .align = Align::kRight, .tone = Tone::kQuiet});
}

std::string title_of(const Estimate& estimate, const SurveyModel& model) {
  if (estimate.of != "target") return estimate.of;
  std::vector<std::string> finds;
  for (const std::size_t find : model.plan().positive.finds)
    finds.push_back(model.plan().finds[find]);
  return "target finds: " + list_in_words(finds);
}

void missed(Column& column, const Figures& figures, double confidence) {
  if (!figures.missed_cluster_pits) return;
  column.gap(3);
  column.put("A cluster of up to " + counted(*figures.missed_cluster_pits, "pit", "pits") +
             " could have been missed by the grid pits (chance 1 in " + format_trimmed(1 / (1 - confidence), 0) +
             " or more), even if each of its pits would prove positive.");
}

void method(Column& column, double confidence) {
  column.gap(3);
  column.put(
      "How: clusters by their average is the Hansen-Hurwitz estimate, by their chance of being met the "
      "Horvitz-Thompson "
      "estimate, of adaptive cluster sampling (Thompson 1990). Likely ranges are t ranges at " +
          format_trimmed(confidence * 100, 1) +
          " %, for pits like these on this grid. They say nothing of ground that was not sampled, and never that "
          "ground is empty.",
      TextSize::kSmall, Tone::kQuiet);
}

}  // namespace

void day_card(Ui& ui, const PixelBox& box, const SurveyView& survey, DayCardState& state) {
  const Ui::Part part = ui.part("day");
  if (!survey.figures) return;
  const Figures& figures = *survey.figures;
  const SurveyModel& model = *survey.model;
  const Frame& frame = model.survey().ground().frame;
  const double pits = frame.size();
  const double area_m2 = pits * frame.lattice().cell_area_m2();
  paged_text(ui, "text", box, &state.scroll, [&](const PixelBox& start) {
    Column column{ui, start};
    progress_sentences(column, figures.progress);
    column.gap(2);
    const SharedReasons shared = shared_reasons(figures);
    open_reasons(column, figures, shared);
    column.gap(1);
    std::size_t closed = 0;
    for (const Cluster& cluster : figures.clusters)
      closed += cluster.closed() ? 1u : 0u;
    column.put(figures.clusters.empty() ? "No cluster was met."
                                        : counted(figures.clusters.size(), "cluster", "clusters") + " met, " +
                                              (closed == 0 ? "none" : std::to_string(closed)) + " of them dug out.");
    std::vector<const Estimate*> rows;
    for (const Estimate& estimate : figures.estimates) {
      if (!rows.empty() && rows.front()->of != estimate.of) {
        figures_of(column, rows, pits, area_m2, shared, title_of(*rows.front(), model));
        rows.clear();
      }
      rows.push_back(&estimate);
    }
    if (!rows.empty()) figures_of(column, rows, pits, area_m2, shared, title_of(*rows.front(), model));
    missed(column, figures, model.plan().confidence);
    method(column, model.plan().confidence);
    return column.left.top;
  });
}

}  // namespace nearpit::ui
