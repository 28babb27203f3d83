#include "session/two_devices.h"

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <memory>
#include <set>
#include <vector>

#include "session/make_survey.h"

namespace nearpit {
namespace {

// Five pits by five; the first sample is T1-1, T3-3 and T5-5.
constexpr char kPlan[] = R"plan({
  "survey": "five by five (invented)", "crs": "local",
  "boundary": {"type": "Polygon", "coordinates": [[[0, 0], [50, 0], [50, 50], [0, 50], [0, 0]]]},
  "lattice": {"kind": "square", "spacing_m": 10, "origin": [5, 5]},
  "pit": {"shape": "square", "size_m": 0.5}, "finds": ["flake", "brick"],
  "positive": {"finds": ["flake"], "at_least": 1},
  "initial": {"draw": "listed", "as": "pits", "pits": ["T1-1", "T3-3", "T5-5"], "how": "drawn for this test"}})plan";

std::string new_folder() {
  std::string name = (std::filesystem::temp_directory_path() / "nearpit-two-XXXXXX").string();
  if (mkdtemp(name.data()) == nullptr) std::abort();
  return name;
}

}  // namespace

Device::Device(const std::string& folder, const std::string& name) : file(folder + "/" + name + ".gpkg") {
  environment.clock = std::make_unique<SetClock>(&minute);
  environment.memory = WriterMemory(folder + "/config-" + name);
  environment.device = name;
}

Session Device::open() { return Session::open(file, environment, false).value(); }

TwoDevices::TwoDevices() : folder_(new_folder()), a(folder_, "a"), b(folder_, "b") {
  std::ofstream(folder_ + "/plan.json") << kPlan;
  make_survey(folder_ + "/plan.json", a.file, a.environment).value();
  std::filesystem::copy_file(a.file, b.file);
}

TwoDevices::~TwoDevices() { std::filesystem::remove_all(folder_); }

void take_in(const std::string& from, const std::string& into) {
  SurveyFile source = SurveyFile::open(from, true).value();
  SurveyFile target = SurveyFile::open(into, false).value();
  std::set<std::string> known;
  target.each_revision(0, [&](std::int64_t, Revision&& revision) { return known.insert(revision.id), ok_status(); })
      .value();
  std::vector<Revision> lacking;
  source
      .each_revision(0,
                     [&](std::int64_t, Revision&& revision) {
                       if (!known.contains(revision.id)) lacking.push_back(revision);
                       return ok_status();
                     })
      .value();
  SurveyFile::Transaction transaction = target.begin().value();
  std::set<std::string> writers;
  for (const Revision& revision : lacking) {
    if (writers.insert(revision.writer).second) transaction.add_writer(revision.writer, "other", revision.at).value();
    transaction.append(revision).value();
  }
  transaction.commit().value();
}

void add_foreign_revision(const std::string& file, const std::string& object, const std::string& body) {
  SurveyFile target = SurveyFile::open(file, false).value();
  UuidSource uuids;
  Revision revision;
  revision.id = uuids.next(1);
  revision.writer = uuids.next(2);
  revision.seq = 1;
  revision.clock = 1;
  revision.by = "B";
  revision.object = object;
  revision.body = body;
  revision.hash = chain_hash(target.chain_start().value(), revision);
  SurveyFile::Transaction transaction = target.begin().value();
  transaction.add_writer(revision.writer, "other", revision.at).value();
  transaction.append(revision).value();
  transaction.commit().value();
}

Action dug(const std::string& pit, std::uint32_t flakes) {
  RecordPit record;
  record.pit = pit;
  record.counts[0] = flakes;
  return {record, "A", "", {"rows.csv", 2}};
}

}  // namespace nearpit
