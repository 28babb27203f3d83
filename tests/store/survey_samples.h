// An invented survey for tests of the file: its start, its layers, revisions with a right chain; a scratch folder; and a foreign SQLite connection that
// is as careless as any other program's.
#ifndef NEARPIT_TESTS_STORE_SURVEY_SAMPLES_H_
#define NEARPIT_TESTS_STORE_SURVEY_SAMPLES_H_

#include <sqlite3.h>

#include <string>
#include <vector>

#include "store/file_check.h"
#include "store/survey_file.h"

namespace nearpit::samples {

class ScratchFolder {
 public:
  ScratchFolder();
  ScratchFolder(const ScratchFolder&) = delete;
  ScratchFolder& operator=(const ScratchFolder&) = delete;
  ~ScratchFolder();
  std::string path(const std::string& name) const { return folder_ + "/" + name; }
  const std::string& folder() const { return folder_; }
  std::vector<std::string> names() const;  // what is in it, in order

 private:
  std::string folder_;
};

std::string bytes_of(const std::string& path);
void put_bytes(const std::string& path, const std::string& bytes);

// 500000, 4400000 lies on the central meridian of UTM zone 17 north: longitude -81, latitude 39.749907519.
FileStart utm_start();
FileStart local_start();
// Two pits of the first sample, one judgement pit off the grid, one cluster, two areas (one with a hole), one closed area.
LayerRows sample_layers(const FileStart& start);
PitRow pit_row(const std::string& label, double x, double y);
MultiPolygon square(double x, double y, double side);

extern const char* const kWriter;
extern const char* const kOtherWriter;
// `count` revisions of one writer, seq from 1, hashes chained from the start of the two surveys above; the second and third name parents.
std::vector<Revision> chain_of(const std::string& writer, int count);

// The survey with one writer and `count` revisions at `path`.
void make_survey(const std::string& path, const FileStart& start, int count);
Status append_all(SurveyFile& file, const std::string& writer, const std::vector<Revision>& revisions);

// Another program: no hardening, triggers on, no waiting.
class ForeignProgram {
 public:
  explicit ForeignProgram(const std::string& path);
  ForeignProgram(const ForeignProgram&) = delete;
  ForeignProgram& operator=(const ForeignProgram&) = delete;
  ~ForeignProgram();
  // "" when it worked, else SQLite's message.
  std::string run(const std::string& sql);
  // First column of the first row, as text.
  std::string ask(const std::string& sql);

 private:
  sqlite3* db_ = nullptr;
};

// Standard output and error of a shell command, and its exit status.
struct Output {
  std::string text;
  int status = -1;
};
Output shell(const std::string& command);

bool one_line_naming(const Error& error, const std::string& path);
std::string in_text(const std::vector<FileProblem>& problems);

}  // namespace nearpit::samples

#endif  // NEARPIT_TESTS_STORE_SURVEY_SAMPLES_H_
