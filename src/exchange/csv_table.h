// Comma-separated tables, RFC 4180 and UTF-8, through libcsv. A byte-order mark and bare line feeds are accepted; semicolons between
// fields are refused with a hint.
#ifndef NEARPIT_EXCHANGE_CSV_TABLE_H_
#define NEARPIT_EXCHANGE_CSV_TABLE_H_

#include <string>
#include <string_view>
#include <vector>

#include "base/status.h"

namespace nearpit {

struct CsvRow {
  int line = 0;                     // of the file, counted from 1, where the row begins
  std::vector<std::string> fields;  // as many as the header has
};

struct CsvTable {
  int header_line = 1;
  std::vector<std::string> header;
  std::vector<CsvRow> rows;
};

// A row that has too few or too many fields.
struct CsvFault {
  int line = 0;
  std::string what;
};

// Limits: 64 MiB, 1,000 columns, 1,000,000 rows, 10,000 bytes a field. Errors: "FILE:LINE: …"; blank lines are passed over.
Result<CsvTable> read_csv(std::string_view text, const std::string& file);

// The same for a reader that has more to find: rows with too few or too many fields are left out and stand in `faults` (the
// first 10,000 of them), in order of line.
Result<CsvTable> read_csv(std::string_view text, const std::string& file, std::vector<CsvFault>* faults);

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_CSV_TABLE_H_
