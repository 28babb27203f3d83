#include "store/survey_samples.h"

#include <gtest/gtest.h>
#include <stdlib.h>
#include <sys/wait.h>

#include <algorithm>
#include <array>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <sstream>

namespace nearpit::samples {
namespace {

constexpr WallTime kMadeAt{1777891230123, -240};  // 2026-05-04T06:40:30.123-04:00

// EPSG:32617 as PROJ 9.1.1 writes it (EPSG data set v10).
constexpr const char* kUtm17 =
    R"(PROJCS["WGS 84 / UTM zone 17N",GEOGCS["WGS 84",DATUM["WGS_1984",SPHEROID["WGS 84",6378137,298.257223563,AUTHORITY["EPSG","7030"]],AUTHORITY["EPSG","6326"]],PRIMEM["Greenwich",0,AUTHORITY["EPSG","8901"]],UNIT["degree",0.0174532925199433,AUTHORITY["EPSG","9122"]],AUTHORITY["EPSG","4326"]],PROJECTION["Transverse_Mercator"],PARAMETER["latitude_of_origin",0],PARAMETER["central_meridian",-81],PARAMETER["scale_factor",0.9996],PARAMETER["false_easting",500000],PARAMETER["false_northing",0],UNIT["metre",1,AUTHORITY["EPSG","9001"]],AXIS["Easting",EAST],AXIS["Northing",NORTH],AUTHORITY["EPSG","32617"]])";

}  // namespace

const char* const kWriter = "018f4d2a-0000-7000-8000-000000000001";
const char* const kOtherWriter = "018f4d2a-0000-7000-8000-000000000002";

ScratchFolder::ScratchFolder() {
  std::string folder = ::testing::TempDir() + "nearpit-store-XXXXXX";
  if (::mkdtemp(folder.data()) == nullptr) ADD_FAILURE() << "no scratch folder " << folder;
  folder_ = folder;
}
ScratchFolder::~ScratchFolder() {
  std::error_code ignored;
  std::filesystem::remove_all(folder_, ignored);
}
std::vector<std::string> ScratchFolder::names() const {
  std::vector<std::string> names;
  for (const auto& entry : std::filesystem::directory_iterator(folder_))
    names.push_back(entry.path().filename());
  std::sort(names.begin(), names.end());
  return names;
}

std::string bytes_of(const std::string& path) {
  std::ifstream in(path, std::ios::binary);
  std::ostringstream bytes;
  bytes << in.rdbuf();
  return bytes.str();
}
void put_bytes(const std::string& path, const std::string& bytes) {
  std::ofstream(path, std::ios::binary | std::ios::trunc) << bytes;
}

FileStart utm_start() {
  FileStart start;
  start.survey_id = "018f4d2a-0000-7000-8000-0000000000aa";
  start.plan = R"({"survey": "Invented ground", "note": "ünïcode"})";
  start.drawn = {{4, 0, 7}, {}, {2}};
  start.epsg = 32617;
  start.crs_name = "WGS 84 / UTM zone 17N";
  start.crs_wkt = kUtm17;
  start.made_at = kMadeAt;
  start.finds = {"flaked stone", "pottery", R"(x"y'); DROP TABLE pits;--)", "черепок"};
  return start;
}

FileStart local_start() {
  FileStart start = utm_start();
  start.epsg = 0;
  start.crs_name.clear();
  start.crs_wkt.clear();
  return start;
}

MultiPolygon square(double x, double y, double side) {
  return {{{{x, y}, {x + side, y}, {x + side, y + side}, {x, y + side}}, {}}};
}

PitRow pit_row(const std::string& label, double x, double y) {
  PitRow row;
  row.label = label;
  row.outcome = "due";
  row.place = {x, y};
  row.area = "terrace";
  row.first_sample = true;
  row.ring = 0;
  row.finds = {std::nullopt, std::nullopt, std::nullopt, std::nullopt};
  return row;
}

LayerRows sample_layers(const FileStart& start) {
  LayerRows rows;
  rows.finds = start.finds;
  rows.survey = "Invented ground";
  rows.pits = {pit_row("T1-1", 500000, 4400000), pit_row("T1-2", 500010, 4400000), pit_row("J1", 500003.25, 4400007.5)};
  PitRow& dug = rows.pits[1];
  dug.outcome = "positive";
  dug.crew = "A";
  dug.dug_at = "2026-05-04T10:20:00-04:00";
  dug.depth_cm = 42.5;
  dug.stop = "sterile_subsoil";
  dug.bag = "17";
  dug.note = "line one\nline two, \"quoted\"";
  dug.finds = {3, 0, 1, 0};
  PitRow& judgement = rows.pits[2];
  judgement.outcome = "not dug";
  judgement.area.clear();
  judgement.first_sample = false;
  judgement.ring.reset();
  judgement.chosen_by = "judgement";
  judgement.reason = "slope";
  rows.clusters = {{"T1-2", 1, 1, 100, false, {3, 0, 1, 0}, square(500005, 4399995, 10)}};
  rows.boundary = square(499990, 4399990, 100);
  rows.boundary[0].holes = {{{500040, 4400040}, {500050, 4400040}, {500050, 4400050}, {500040, 4400050}}};
  rows.strata = {{"terrace", 60, 60, 3, rows.boundary}, {"slope", 40, 40, 1, square(500090, 4399990, 50)}};
  rows.closed_areas = {{"area/018f4d2a-0000-7000-8000-0000000000bb", "wet corner", "standing_water", "Crew A", false,
                        square(500060, 4400060, 20)}};
  return rows;
}

std::vector<Revision> chain_of(const std::string& writer, int count) {
  const FileStart start = utm_start();  // a local grid's chains begin alike
  std::vector<Revision> chain;
  std::string last = start_hash(start.survey_id, start.plan, start.drawn);
  for (int i = 1; i <= count; ++i) {
    Revision revision;
    std::ostringstream id;
    id << "018f4d2a-1111-7000-8000-" << writer.substr(writer.size() - 4) << std::hex << (0x10000000 + i);
    revision.id = id.str();
    revision.writer = writer;
    revision.seq = i;
    revision.clock = kMadeAt.utc_ms * 65536 + i;
    revision.by = "Crew A";
    revision.at = {kMadeAt.utc_ms + 1000 * i, i % 2 == 0 ? -240 : 330};
    revision.object = "pit/T1-" + std::to_string(i);
    revision.body = R"({"status": "dug", "note": "né )" + std::to_string(i) + "\"}";
    revision.why = i == 1 ? "" : "counted again";
    if (i == 2) revision.parents = {chain[0].id};
    if (i == 3) revision.parents = {chain[0].id, chain[1].id};
    revision.hash = chain_hash(last, revision);
    last = revision.hash;
    chain.push_back(revision);
  }
  return chain;
}

Status append_all(SurveyFile& file, const std::string& writer, const std::vector<Revision>& revisions) {
  NEARPIT_ASSIGN(save, file.begin());
  NEARPIT_TRY(save.add_writer(writer, "tablet one", kMadeAt));
  for (const Revision& revision : revisions)
    NEARPIT_TRY(save.append(revision));
  return save.commit();
}

void make_survey(const std::string& path, const FileStart& start, int count) {
  const Status made = SurveyFile::create(path, start, sample_layers(start));
  ASSERT_TRUE(made.ok()) << made.error().one_line();
  if (count == 0) return;
  Result<SurveyFile> file = SurveyFile::open(path, false);
  ASSERT_TRUE(file.ok()) << file.error().one_line();
  const Status appended = append_all(*file, kWriter, chain_of(kWriter, count));
  ASSERT_TRUE(appended.ok()) << appended.error().one_line();
}

ForeignProgram::ForeignProgram(const std::string& path) {
  EXPECT_EQ(sqlite3_open_v2(path.c_str(), &db_, SQLITE_OPEN_READWRITE, nullptr), SQLITE_OK);
}
ForeignProgram::~ForeignProgram() { sqlite3_close(db_); }

std::string ForeignProgram::run(const std::string& sql) {
  if (sqlite3_exec(db_, sql.c_str(), nullptr, nullptr, nullptr) == SQLITE_OK) return "";
  return sqlite3_errmsg(db_);
}

std::string ForeignProgram::ask(const std::string& sql) {
  sqlite3_stmt* statement = nullptr;
  std::string answer = "no row";
  if (sqlite3_prepare_v2(db_, sql.c_str(), -1, &statement, nullptr) != SQLITE_OK) return sqlite3_errmsg(db_);
  if (sqlite3_step(statement) == SQLITE_ROW) {
    const auto* text = reinterpret_cast<const char*>(sqlite3_column_text(statement, 0));
    answer = text != nullptr ? text : "NULL";
  }
  sqlite3_finalize(statement);
  return answer;
}

Output shell(const std::string& command) {
  Output output;
  std::FILE* pipe = ::popen((command + " 2>&1").c_str(), "r");
  if (pipe == nullptr) return output;
  std::array<char, 4096> part{};
  std::size_t count = 0;
  while ((count = std::fread(part.data(), 1, part.size(), pipe)) > 0)
    output.text.append(part.data(), count);
  const int status = ::pclose(pipe);
  output.status = WIFEXITED(status) ? WEXITSTATUS(status) : -1;
  return output;
}

bool one_line_naming(const Error& error, const std::string& path) {
  const std::string line = error.one_line();
  return line.starts_with(path + ": ") && line.find('\n') == std::string::npos;
}

std::string in_text(const std::vector<FileProblem>& problems) {
  std::string text;
  for (const FileProblem& problem : problems) {
    text += problem.kind + " | " + problem.where + " | " + problem.what + " | " + problem.action + "\n";
  }
  return text;
}

}  // namespace nearpit::samples
