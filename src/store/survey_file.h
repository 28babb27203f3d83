// The survey file: one SQLite database that is itself an OGC GeoPackage 1.3 (OGC 12-128r17). It holds the plan, the drawn first sample and the
// append-only log, and beside them layers for other programs, kept in the same transaction. sqlite3 is known here and nowhere else.
//
// When is a record safe? When commit() of the transaction that appended it has returned ok: journal_mode DELETE, synchronous EXTRA, set again on
// every open. Whenever no write is under way the one file is whole.
#ifndef NEARPIT_STORE_SURVEY_FILE_H_
#define NEARPIT_STORE_SURVEY_FILE_H_

#include <cstdint>
#include <functional>
#include <map>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "base/clock.h"
#include "base/status.h"
#include "design/primary_units.h"
#include "record/revision.h"
#include "store/layers.h"

namespace nearpit {

// What a survey file is made of at first, besides its layers.
struct FileStart {
  std::string survey_id;                   // UUID of the survey: the same in every copy
  std::string plan;                        // the plan's JSON, boundary in place
  std::vector<std::vector<UnitId>> drawn;  // by area
  int epsg = 0;                            // 0: a local grid (srs_id -1)
  std::string crs_name;
  std::string crs_wkt;
  WallTime made_at;
  std::vector<std::string> finds;  // one column each in the layers
};

struct WriterRow {
  std::string id;
  std::string device;  // name of the machine
  std::int64_t last_seq = 0;
  std::string last_hash;  // of its last revision; the chain's start before its first
};

class SurveyFile {
 public:
  // Makes `path` (never an existing file): all or nothing, mode 0600. The layers are written as given. Errors: exists; the folder can't be written.
  static Status create(const std::string& path, const FileStart& start, const LayerRows& layers);
  // Opens hardened (no load of extensions, trusted_schema off, links not followed). Errors: no such file; not a survey file; damaged; too new.
  static Result<SurveyFile> open(const std::string& path, bool read_only);

  SurveyFile(SurveyFile&&) noexcept;
  SurveyFile& operator=(SurveyFile&&) noexcept;
  ~SurveyFile();

  Result<std::string> survey_id();
  Result<std::string> plan();
  Result<std::vector<std::vector<UnitId>>> drawn(std::size_t areas);
  // What every writer's chain begins with (record/revision.h).
  Result<std::string> chain_start();

  // All revisions in the order in which this file took them (rowid). From rowid `after` on; 0 for all.
  Status each_revision(std::int64_t after, const std::function<Status(std::int64_t rowid, Revision&&)>& take);
  // Those of one object. Cost: the file.
  Status each_revision_of(const std::string& object, const std::function<Status(std::int64_t rowid, Revision&&)>& take);
  Result<std::int64_t> last_rowid();
  Result<std::optional<WriterRow>> writer(const std::string& id);

  // Runs `reads` on one state of the file, whatever other processes write meanwhile.
  Status read_as_one(const std::function<Status()>& reads);

  // One write transaction (BEGIN IMMEDIATE; waits up to 5 s for another process). Rolls back unless committed.
  class Transaction {
   public:
    Transaction(Transaction&&) noexcept;
    Transaction& operator=(Transaction&&) = delete;
    ~Transaction();

    Status add_writer(const std::string& id, const std::string& device, const WallTime& first_seen);
    // The revision's hash and seq are already set.
    Status append(const Revision& revision);
    // Brings the layers to what `changes` says, and last_change with it.
    Status update_layers(const LayerChanges& changes, const WallTime& now);
    Status commit();

   private:
    friend class SurveyFile;
    explicit Transaction(SurveyFile& file);
    SurveyFile* file_;
  };
  Result<Transaction> begin();

  const std::string& path() const;

  struct Handle;  // the database connection
  Handle& handle() { return *handle_; }

 private:
  explicit SurveyFile(std::unique_ptr<Handle> handle);
  std::unique_ptr<Handle> handle_;
};

}  // namespace nearpit

#endif  // NEARPIT_STORE_SURVEY_FILE_H_
