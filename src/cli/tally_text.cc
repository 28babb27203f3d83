#include "cli/tally_text.h"

#include <algorithm>
#include <vector>

#include "base/numbers.h"
#include "base/text.h"
#include "cli/command.h"

namespace nearpit::cli {
namespace {

constexpr int kDigits = 3;

std::string figure(double value) { return format_significant(value, kDigits); }

std::string progress_text(const Progress& progress) {
  std::string text = "Grid pits      " + std::to_string(progress.first_sample_dug) + " of " +
                     std::to_string(progress.first_sample) + " recorded\n";
  text += "Dug            " + counted(progress.dug, "pit", "pits") + ", " + std::to_string(progress.positive) +
          " positive; " + std::to_string(progress.not_dug) + " not dug\n";
  if (progress.judgement > 0) {
    text += "Apart          " + counted(progress.judgement, "judgement pit", "judgement pits") + ", in no figure below";
    if (progress.no_longer_required > 0)
      text += " (" + std::to_string(progress.no_longer_required) + " no longer required)";
    text += "\n";
  }
  if (progress.withdrawn > 0) text += "Withdrawn      " + counted(progress.withdrawn, "record", "records") + "\n";
  if (progress.conflicts > 0) {
    text += "Conflicts      " + counted(progress.conflicts, "pit has", "pits have") + " records that disagree\n";
  }
  text += "To dig         " + counted(progress.due, "pit", "pits");
  if (progress.halted > 0) text += ", and " + std::to_string(progress.halted) + " halted";
  return text + (progress.complete ? "; the ground is done\n" : "\n");
}

std::string clusters_text(const Figures& figures, const SurveyModel& model) {
  if (figures.clusters.empty()) return "";
  std::string text = "\nClusters\n";
  for (const Cluster& cluster : figures.clusters) {
    std::vector<std::string> finds;
    for (std::size_t i = 0; i < cluster.finds.size(); ++i) {
      if (cluster.finds[i] > 0) finds.push_back(model.plan().finds[i] + " " + std::to_string(cluster.finds[i]));
    }
    text += "  " + model.label(cluster.label) + ": " + counted(cluster.network.nodes.size(), "pit", "pits") +
            ", about " + figure(cluster.area_m2) + " m2; " + join(finds, ", ");
    const std::size_t open = cluster.network.open.size();
    text += cluster.closed() ? "; closed" : "; open, " + counted(open, "pit", "pits") + " to dig around it";
    if (cluster.network.cut_at_edge) text += "; cut at the block edge";
    text += "\n";
  }
  return text;
}

std::string missed_text(const Figures& figures, const SurveyModel& model) {
  if (!figures.missed_cluster_pits) return "";
  return "\nA cluster of up to " + counted(*figures.missed_cluster_pits, "pit", "pits") +
         " could have been missed by the grid pits (chance 1 in " +
         format_trimmed(1 / (1 - model.plan().confidence), 1) +
         " or more), even if each of its pits would prove positive.\n";
}

std::string estimator_words(Estimator estimator) {
  switch (estimator) {
    case Estimator::kHansenHurwitz:
      return "Hansen-Hurwitz";
    case Estimator::kHorvitzThompson:
      return "Horvitz-Thompson";
    case Estimator::kFirstSampleOnly:
      break;
  }
  return "Grid pits only";
}

std::string range_text(const std::optional<LikelyRange>& range, double factor) {
  if (!range) return "";
  return " (likely " + figure(range->lower * factor) + " to " + figure(range->upper * factor) + ")";
}

std::string row_text(const Estimate& estimate, const SurveyModel& model) {
  const SurveyGround& ground = model.survey().ground();
  std::string text = "    " + padded(estimator_words(estimate.estimator), 17, false);
  if (estimate.per_m2) {
    const double area = ground.frame.size() * ground.frame.lattice().cell_area_m2();
    text += figure(estimate.mean_per_pit) + " a pit" + range_text(estimate.range, 1) + "; " + figure(*estimate.per_m2) +
            " per m2" + range_text(estimate.ground.range, 1) + "; total " + figure(estimate.total) +
            range_text(estimate.ground.range, area);
  } else {
    text += figure(estimate.total) + " of " + std::to_string(ground.frame.size()) + " possible pits" +
            range_text(estimate.range, ground.frame.size());
  }
  return text + "; " + std::string(word(estimate.status));
}

// Each reason is said once, under the number that rows refer to.
class Footnotes {
 public:
  std::string marks(const std::vector<std::string>& reasons) {
    std::vector<std::string> numbers;
    for (const std::string& reason : reasons) {
      const auto known = std::find(notes_.begin(), notes_.end(), reason);
      numbers.push_back(std::to_string(known - notes_.begin() + 1));
      if (known == notes_.end()) notes_.push_back(reason);
    }
    return numbers.empty() ? "" : " (" + join(numbers, ", ") + ")";
  }

  std::string text() const {
    std::string text;
    for (std::size_t i = 0; i < notes_.size(); ++i)
      text += "  (" + std::to_string(i + 1) + ") " + notes_[i] + "\n";
    return notes_.empty() ? "" : "\nNotes\n" + text;
  }

 private:
  std::vector<std::string> notes_;
};

std::string estimates_text(const Figures& figures, const SurveyModel& model) {
  Footnotes notes;
  std::string text = "\nFigures\n";
  std::string of;
  for (const Estimate& estimate : figures.estimates) {
    if (estimate.of != of) {
      of = estimate.of;
      text += "  " + (of == "target" ? "target finds" : of) + "\n";
    }
    text += row_text(estimate, model) + notes.marks(estimate.why) + "\n";
  }
  return text + notes.text();
}

}  // namespace

std::string tally_text(const Figures& figures, const SurveyModel& model, const std::string& day) {
  return model.plan().survey + (day.empty() ? ": all records\n" : ": records up to " + day + "\n") + "\n" +
         progress_text(figures.progress) + clusters_text(figures, model) + missed_text(figures, model) +
         estimates_text(figures, model);
}

}  // namespace nearpit::cli
