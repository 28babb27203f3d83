// What cards see of the survey, the device and what was said last. Everything here was worked out when something changed, nothing while a frame is
// drawn.
#ifndef NEARPIT_UI_DESK_DESK_VIEW_H_
#define NEARPIT_UI_DESK_DESK_VIEW_H_

#include <cstdint>
#include <map>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "desk/request.h"
#include "estimate/figures.h"
#include "field_map/map_marks.h"
#include "session/dig_order.h"
#include "session/folder_list.h"
#include "session/survey_model.h"

namespace nearpit::ui {

enum class NoticeKind { kNone, kSaved, kNotSaved, kSays };
struct Notice {
  NoticeKind kind = NoticeKind::kNone;
  std::string text;               // "T7-12 at 14:32", or what is wrong and what to do
  std::vector<std::string> more;  // what the person must hear at once: cautions, a new writer
  // It stands over the card until somebody has read it; a plain 'Saved' only shows on the strip.
  bool to_be_read() const { return kind == NoticeKind::kNotSaved || kind == NoticeKind::kSays || !more.empty(); }
};

// One line of a pit's history, newest first.
struct HistoryLine {
  std::string when;  // local, "4 May 14:32"
  std::string by;
  std::string what;  // "dug: flaked stone 2", "withdrawn"
  std::string why;
};

// The pit that is chosen on the map.
struct ChosenPit {
  PitName name;
  PitMark mark;
  std::string state;             // "due", "positive"
  std::vector<std::string> why;  // why it is due, one thought a line
  std::vector<HistoryLine> history;
};

// A line of the dig list, in words.
struct DueRow {
  DigStop stop;
  std::string label;
  std::string because;  // "grid pit", "next to T3-4"
  std::string walk;     // "20 m, 045°" from the stop before
  std::string ring;     // "", "one step out"
  bool half_written = false;
  // "next to T3-4, one step out"
  std::string why() const { return ring.empty() ? because : because + ", " + ring; }
};

// A survey that is open.
struct SurveyView {
  std::string file;
  std::string name;
  const SurveyModel* model = nullptr;
  std::int64_t revision = 0;  // of everything here
  std::string crew;
  DigOrder order;
  std::vector<DueRow> due;    // all of them, or grid pits alone while these come first
  std::vector<DueRow> asked;  // pits that judgement positives opened on request
  bool grid_pits_first = false;
  std::optional<DueRow> proposed;
  std::string walk_from;  // the pit that the proposed one's distance is from
  std::optional<Point> walk_from_place;
  std::vector<Cluster> clusters;
  std::vector<MultiPolygon> cluster_outlines;
  std::vector<MultiPolygon> closed_outlines;  // of areas that are closed
  std::unique_ptr<const MapMarks> marks;
  std::optional<Figures> figures;  // while the day or the clusters are shown
  std::size_t pits_today = 0;
  std::string last_save;                  // "14:32", "4 May 14:32", "" while nothing is saved
  std::vector<DueRow> left_half_written;  // pits with drafts that stand on neither list
  std::string refused;                    // the pit whose last save was refused, until it is saved or forgotten
  std::optional<ChosenPit> chosen;
  std::optional<RecordDraft> draft;       // of the open record
  std::optional<ChosenPit> recorded_pit;  // what the open record is of
  bool typed = false;                     // it says something that stands in no record, a reason aside
  int opened = 0;                         // how many records were opened; another number is another record
  std::vector<std::string> missing;       // what must be said before it can be saved
  std::vector<std::string> blanks;        // what the plan asks for beside that
};

struct DeskView {
  CardKind card = CardKind::kStart;
  bool dusk = false;
  std::optional<double> px_per_mm;  // as calibrated
  std::vector<std::string> recent;
  std::vector<Place> places;
  std::optional<FolderList> folder;  // that the start card lists
  Notice notice;
  std::optional<SurveyView> survey;
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_DESK_DESK_VIEW_H_
