#include "store/file_check.h"

#include "base/text.h"
#include "store/chain_check.h"
#include "store/layer_check.h"
#include "store/schema_build.h"
#include "store/schema_check.h"
#include "store/schema_files.h"
#include "store/survey_handle.h"
#include "store/survey_open.h"

namespace nearpit {
namespace {

using store::Connection;
using store::Findings;
using store::Statement;

constexpr std::size_t kMost = 100;
constexpr const char* kUseCopy = "keep the file as it is, don't write to it, and go on with the last good copy";

// `take` gets each row of a pragma that lists what is wrong.
template <class Take>
void each_row(Connection& db, const char* sql, const char* kind, Findings& findings, Take take) {
  Statement rows(db, sql);
  while (true) {
    const Result<bool> row = rows.next();
    if (!row) {
      findings.add({kind, sql, row.error().one_line(), kUseCopy});
      return;
    }
    if (!*row) return;
    take(rows);
  }
}

void check_pages(Connection& db, Findings& findings) {
  each_row(db, "PRAGMA integrity_check(100)", "pages", findings, [&](const Statement& row) {
    if (row.text(0) != "ok") findings.add({"pages", "database", in_quotes(row.text(0)), kUseCopy});
  });
  each_row(db, "PRAGMA foreign_key_check", "pages", findings, [&](const Statement& row) {
    findings.add({"pages", "table " + in_quotes(row.text(0)) + ", row " + std::to_string(row.integer(1)),
                  "names a row of " + in_quotes(row.text(2)) + " that is not there", kUseCopy});
  });
}

void check_number(Connection& db, const char* pragma, std::int64_t should, Findings& findings) {
  each_row(db, pragma, "identity", findings, [&](const Statement& row) {
    if (row.integer(0) == should) return;
    findings.add({"identity", pragma,
                  "is " + std::to_string(row.integer(0)) + ", a GeoPackage 1.3 has " + std::to_string(should),
                  "another program changed it; go on with the last good copy"});
  });
}

}  // namespace

std::vector<FileProblem> check_file(SurveyFile& file) {
  Connection& db = file.handle().db;
  std::vector<FileProblem> problems;
  Findings findings(kMost);
  check_pages(db, findings);
  check_number(db, "PRAGMA application_id", store::kGeoPackageId, findings);
  check_number(db, "PRAGMA user_version", store::kGeoPackageVersion, findings);
  findings.move_to(problems, "pages", "database");
  if (file.handle().too_new) {
    problems.push_back({"schema", "nearpit_schema",
                        "the file was made by a later Nearpit; this one knows schema " +
                            std::to_string(store::kSchemaFileCount) + " and can't check the rest",
                        "check it with that Nearpit"});
    return problems;
  }
  check_schema(db, findings);
  findings.move_to(problems, "schema", "tables");
  const Result<std::string> start = file.chain_start();
  if (start) {
    check_chain(db, *start, findings);
  } else {
    findings.add({"chain", "nearpit_survey", start.error().one_line(), kUseCopy});
  }
  findings.move_to(problems, "chain", "nearpit_revision");
  return problems;
}

std::vector<FileProblem> check_layers(SurveyFile& file, const LayerRows& expected) {
  Connection& db = file.handle().db;
  std::vector<FileProblem> problems;
  const Result<store::LayerShape> shape = store::read_shape(db);
  if (!shape) {
    problems.push_back({"layer", "nearpit_find", shape.error().one_line(), kUseCopy});
    return problems;
  }
  if (shape->find_columns != store::find_columns(expected.finds)) {
    problems.push_back(
        {"layer", "nearpit_find", "the finds that the layers count are not those of the plan", kUseCopy});
    return problems;
  }
  Findings findings(kMost);
  for (const store::LayerContent& content : store::all_contents(expected, *shape))
    compare_layer(db, content, findings);
  findings.move_to(problems, "layer", "layers");
  return problems;
}

}  // namespace nearpit
