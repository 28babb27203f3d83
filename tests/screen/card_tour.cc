#include "screen/card_tour.h"

#include <algorithm>
#include <filesystem>

namespace nearpit::ui {
namespace {

const std::vector<std::string> kLongFinds = {"flaked stone, heat-treated or burnt",
                                             "pottery with shell temper",
                                             "fire-cracked rock over 5 cm",
                                             "bone, calcined, under 1 cm",
                                             "daub",
                                             "iron, hand-wrought",
                                             "window glass, aqua",
                                             "brick"};
const std::vector<std::string> kLongCrews = {"A", "B (Monday to Wednesday, with the second tablet)",
                                             "north field party",
                                             "Volunteers of the local society who come on Saturdays"};
const char kLongSurvey[] = "Terrace above the brook, second season, fields 12 to 17 and the orchard (invented)";
const char kLongFile[] = "terrace above the brook second season fields 12 to 17 and the orchard";

PlanSays large_plan(const std::vector<std::string>& finds) {
  PlanSays says;
  says.survey = kLongSurvey;
  says.side = 12;
  says.finds = finds;
  says.crews = kLongCrews;
  says.first_sample.clear();
  for (int row = 1; row <= says.side; row += 2) {
    for (int column = 1; column <= says.side; column += 2)
      says.first_sample.push_back("T" + std::to_string(row) + "-" + std::to_string(column));
  }
  return says;
}

Action dug(const std::string& pit, std::vector<std::uint32_t> counts, const std::string& why = "") {
  RecordPit record;
  record.pit = pit;
  record.status.emplace(PitStatus::kDug);
  record.depth_cm.emplace(45.5);
  record.stop.emplace(StopReason::kSterileSubsoil);
  record.note.emplace("dark fill below 30 cm, then clay; roots of the old hedge along the whole north side");
  for (std::size_t i = 0; i < counts.size(); ++i)
    record.counts[i] = counts[i];
  return {record, kLongCrews[1], why, {}};
}

Action not_dug(const std::string& pit, NotDugReason reason) {
  RecordPit record;
  record.pit = pit;
  record.status.emplace(PitStatus::kNotDug);
  record.reason.emplace(reason);
  return {record, "A", "", {}};
}

// Some of everything that a map and a list can show.
void record_a_day(const ScreenWorld& world, const std::string& file) {
  Action judgement = dug("T2-12", {3});
  std::get<RecordPit>(judgement.what).chosen_by.emplace(ChosenBy::kJudgement);
  world.apply_elsewhere(file, {dug("T1-1", {0}),
                               dug("T1-3", {0}),
                               dug("T5-5", {124, 3}),
                               dug("T9-9", {1}),
                               not_dug("T1-5", NotDugReason::kStandingWater),
                               not_dug("T3-1", NotDugReason::kUtility),
                               judgement,
                               {AskNeighbours{"T2-12"}, "A", "to see how far it goes", {}},
                               {CloseArea{"pond", {}, {11}, NotDugReason::kStandingWater}, "A", "water", {}}});
  world.apply_elsewhere(file, {dug("T5-6", {2}), dug("T5-5", {125, 3},
                                                     "seen again in the lab: one more below the"
                                                     " label that nobody had turned over")});
}

class Tour {
 public:
  Tour(const TestGlass& glass, bool dusk, TourGuest& guest) : glass_(glass), dusk_(dusk), guest_(guest) {}

  void all() {
    start_cards();
    survey_cards();
    records();
    little_things();
  }

 private:
  template <class Work>
  void with(ScreenWorld& world, const std::string& file, Work work) {
    ScreenDriver screen(world, glass_, file);
    guest_.begins(screen);
    work(screen);
    guest_.ends(screen);
  }
  void measure(const ScreenWorld& world) const { world.measured(glass_.px_per_mm(), dusk_); }
  void see(ScreenDriver& screen, const std::string& card) { guest_.sees(screen, card); }
  void start_cards() {
    ScreenWorld world;
    world.measured(0, dusk_);
    world.put(std::string(kLongFile) + ".json", plan_text({}));
    for (int i = 0; i < 15; ++i) {
      std::filesystem::create_directory(world.path("field " + std::to_string(i)));
      world.put("plan-" + std::to_string(i) + ".json", plan_text({}));
    }
    with(world, "", [&](ScreenDriver& screen) {
      see(screen, "sizes");
      screen.tap("sizes/much-larger");
      screen.tap("sizes/much-smaller");
      measure(world);
    });
    with(world, "", [&](ScreenDriver& screen) {
      see(screen, "start, nothing opened yet");
      screen.tap("start/keys");
      see(screen, "keys, no survey open");
      screen.tap_all({"keys/back", "start/place-0"});
      see(screen, "start, a folder");
      screen.tap("start/file-field 0");
      see(screen, "start, an empty folder");
      screen.tap_all({"start/up", std::string("start/file-") + kLongFile + ".json"});
      see(screen, "start, from a plan");
      screen.tap("start/name");
      see(screen, "typing a file name");
      screen.tap_all({"typing/done", "start/make"});
      see(screen, "notice, the survey is made");
    });
    world.put("bad.json",
              "{\"survey\": 3, \"crs\": \"mars\", \"lattice\": {\"kind\": \"cube\"}, \"pit\": 4, "
              "\"finds\": [], \"positive\": {}, \"initial\": {\"draw\": \"none\"}, \"a\": 1, \"b\": 2}");
    for (int i = 0; i < 9; ++i) {
      const std::string file = world.make({}, "survey " + std::to_string(i));
      ScreenDriver opened(world, glass_, file);
    }
    with(world, "", [&](ScreenDriver& screen) {
      see(screen, "start, opened lately");
      screen.tap_all({"start/place-0", "start/file-bad.json", "start/make"});
      see(screen, "notice, long, no survey open");
    });
  }

  void survey_cards() {
    ScreenWorld world;
    measure(world);
    const std::string file = world.make(large_plan({"flake", "sherd", "brick"}), kLongFile);
    with(world, file, [&](ScreenDriver& screen) {
      see(screen, "dig list, long, nothing recorded");
      screen.tap("strip/clusters");
      see(screen, "clusters, none");
      screen.tap("strip/day");
      see(screen, "day, nothing recorded");
    });
    record_a_day(world, file);
    with(world, file, [&](ScreenDriver& screen) {
      see(screen, "dig list, long");
      screen.tap("dig-list/grid-pits-first");
      see(screen, "dig list, grid pits first");
      screen.tap("dig-list/grid-pits-first");
      screen.tap_pit("T7-7");
      see(screen, "dig list, a pit chosen on the map");
      screen.tap("strip/clusters");
      see(screen, "clusters");
      screen.tap("strip/day");
      see(screen, "day");
      screen.tap("strip/office");
      see(screen, "office, four crews");
      screen.tap("office/crew-3");
      see(screen, "office, a long crew at work");
      screen.tap("office/crew-name");
      see(screen, "typing a crew");
      screen.tap_all({"typing/leave", "office/keys"});
      see(screen, "keys");
      screen.tap("keys/back");
      screen.tap_pit("T5-5");
      see(screen, "map, a positive pit chosen");
      if (screen.shows("map/history")) {
        screen.tap("map/history");
        see(screen, "map, its history");
        screen.tap("map/history");
      }
      screen.tap("map/record-chosen");
      see(screen, "record, recorded");
      screen.tap_all({"record/find-0/more", "record/why"});
      see(screen, "typing why, with phrases");
      screen.type(
          "the bag was mixed up with that of the pit to the east, and the count taken from the label of that "
          "one; see the book, page 12");
      see(screen, "typing why, a long line");
      screen.tap("typing/done");
      see(screen, "record, changed");
      screen.tap("record/more");
      see(screen, "record, more, changed");
      screen.tap("record/more/drop");
      see(screen, "record, more, about to forget");
      screen.tap("record/more/drop");
      screen.tap_pit("T5-5");
      screen.tap_all({"map/record-chosen", "record/more"});
      see(screen, "record, more, recorded");
      screen.tap("record/more/move");
      see(screen, "record, move");
      screen.tap_all({"record/move/other"});
      screen.type("T7-7");
      screen.tap_all({"typing/done", "record/move/why"});
      see(screen, "typing why moved");
      screen.tap_all({"typing/phrase/0", "typing/done"});
      see(screen, "record, move, said");
      screen.tap("record/back");
      if (!screen.shows("record/more/history")) screen.tap("record/more");
      screen.tap("record/more/history");
      see(screen, "record, history");
    });
  }

  void records() {
    for (const std::size_t finds : {std::size_t{1}, std::size_t{3}, std::size_t{8}}) {
      const std::string many = std::to_string(finds) + " finds";
      ScreenWorld world;
      measure(world);
      PlanSays says;
      says.finds.assign(kLongFinds.begin(), kLongFinds.begin() + static_cast<long>(finds));
      if (finds == 8) says.require = {"depth_cm", "stop", "note", "crew"};
      const std::string file = world.make(says, "survey");
      with(world, file, [&](ScreenDriver& screen) {
        see(screen, "dig list, short");
        screen.tap("dig-list/record");
        see(screen, "record, " + many);
        screen.tap_all({"record/digits/9", "record/digits/9", "record/digits/9", "record/digits/9", "record/digits/9",
                        "record/digits/9", "record/depth", "record/digits/4", "record/digits/5", "record/digits/point",
                        "record/digits/5"});
        see(screen, "record, " + many + ", counted");
        if (finds != 3) return;
        panels(screen, file, world);
      });
    }
  }

  void panels(ScreenDriver& screen, const std::string& file, ScreenWorld& world) {
    screen.tap("record/stop");
    see(screen, "record, stopped at");
    screen.tap("record/stops/human_remains_stop");
    see(screen, "record, with a stop");
    screen.tap("record/note");
    see(screen, "typing a note");
    screen.tap("typing/letters/capitals");
    see(screen, "typing a note, capitals");
    screen.tap("typing/letters/signs");
    see(screen, "typing a note, signs");
    screen.type("dark fill below 30 cm, then clay; roots of the old hedge along the whole north side");
    screen.tap("typing/done");
    see(screen, "record, with a note");
    screen.tap("record/more");
    see(screen, "record, more");
    screen.tap("record/more/judgement");
    screen.tap("record/back");
    see(screen, "record, judgement");
    screen.tap("record/not-dug");
    see(screen, "record, not dug, reasons");
    if (screen.shows("record/reasons/no_permission")) screen.tap("record/reasons/no_permission");
    see(screen, "record, not dug");
    screen.tap("record/not-dug");
    see(screen, "record, not dug, reasons again");
    screen.tap("record/reasons/was-dug");
    screen.tap("record/nothing-found");
    see(screen, "record, nothing found");
    // Counts and 'nothing found' don't go together; the counts stay.
    if (!screen.view().survey->missing.empty()) screen.tap("record/nothing-found");
    world.write_elsewhere(file, "T1-1", 7);
    screen.tap("record/save");
    see(screen, "notice, not saved");
    screen.tap("notice/understood");
    see(screen, "record, not saved");
    screen.tap_all({"record/back", "strip/dig-list"});
    see(screen, "dig list, half written");
  }

  void little_things() {
    ScreenWorld world;
    measure(world);
    PlanSays says;
    says.first_sample = {"T1-1"};
    const std::string file = world.make(says, "little");
    with(world, file, [&](ScreenDriver& screen) {
      screen.tap("strip/office");
      see(screen, "office, no crew in the plan");
      screen.tap_all({"strip/dig-list", "dig-list/record", "record/nothing-found", "record/save"});
      see(screen, "dig list, empty");
      screen.tap("strip/day");
      see(screen, "day, all done");
    });
  }

  TestGlass glass_;
  bool dusk_;
  TourGuest& guest_;
};

}  // namespace

void tour_of_cards(const TestGlass& glass, bool dusk, TourGuest& guest) { Tour(glass, dusk, guest).all(); }

bool holds_outside_name(const std::string& text) {
  std::vector<std::string> names = kLongFinds;
  names.insert(names.end(), kLongCrews.begin() + 1, kLongCrews.end());
  for (const std::string name : {kLongSurvey, kLongFile, "nearpit-screen-"})
    names.push_back(name);
  // What a person typed counts as theirs too.
  names.push_back("dark fill below 30 cm");
  names.push_back("the bag was mixed up");
  return std::any_of(names.begin(), names.end(),
                     [&](const std::string& name) { return text.find(name) != std::string::npos; });
}

}  // namespace nearpit::ui
