// What cards ask for: values that they hand to the sink while a frame is drawn, and that the desk carries out after it. A card changes nothing itself.
#ifndef NEARPIT_UI_DESK_REQUEST_H_
#define NEARPIT_UI_DESK_REQUEST_H_

#include <string>
#include <variant>
#include <vector>

#include "session/record_draft.h"

namespace nearpit::ui {

enum class CardKind { kStart, kSizes, kDigList, kRecord, kClusters, kDay, kOffice, kKeys };

struct ShowCard {
  CardKind card = CardKind::kDigList;
};
// Lists a folder's surveys and plans on the start card; an empty path shows the usual places again, with cards and sticks put in since.
struct BrowseFolder {
  std::string path;
};
struct OpenSurvey {
  std::string path;
};
// Makes `name`.gpkg in `folder` from a plan file, and opens it.
struct MakeSurvey {
  std::string plan_path;
  std::string folder;
  std::string name;
};
// Back to the start card; the survey is closed.
struct CloseSurvey {};
// Chooses a pit on the map or in a list; an empty label chooses none.
struct ChoosePit {
  std::string label;
};
// The pit to walk to next, instead of the one proposed.
struct WalkTo {
  NodeId node = kNoNode;
};
struct GridPitsFirst {
  bool on = false;
};
struct OpenRecord {
  std::string label;
};
// What is typed so far; kept on the disk at once.
struct KeepDraft {
  RecordDraft draft;
};
// Forgets what is typed of the open record.
struct DropDraft {};
struct SaveRecord {};
struct WithdrawRecord {
  std::string why;
};
struct MoveRecord {
  std::string other;
  std::string why;
};
// A judgement positive opens its neighbours, as judgement pits.
struct OpenNeighbours {
  std::string why;
};
struct SetCrew {
  std::string name;
};
struct SetDusk {
  bool on = false;
};
struct SetMillimetre {
  double px_per_mm = 0;
};
// The person has read the notice.
struct DismissNotice {};

using Request = std::variant<ShowCard, BrowseFolder, OpenSurvey, MakeSurvey, CloseSurvey, ChoosePit, WalkTo,
                             GridPitsFirst, OpenRecord, KeepDraft, DropDraft, SaveRecord, WithdrawRecord, MoveRecord,
                             OpenNeighbours, SetCrew, SetDusk, SetMillimetre, DismissNotice>;

// Where cards put them.
class Sink {
 public:
  void send(Request request) { requests_.push_back(std::move(request)); }
  std::vector<Request> take() { return std::exchange(requests_, {}); }

 private:
  std::vector<Request> requests_;
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_DESK_REQUEST_H_
