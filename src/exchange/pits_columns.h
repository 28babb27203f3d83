// The columns of a table of pits: which field of a row is what. The names are frozen; spaces around them don't count. A find is named
// as in the plan, in either case.
#ifndef NEARPIT_EXCHANGE_PITS_COLUMNS_H_
#define NEARPIT_EXCHANGE_PITS_COLUMNS_H_

#include <array>
#include <cstddef>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "exchange/csv_table.h"
#include "exchange/table_findings.h"

namespace nearpit {

enum class PitColumn {
  kPit,
  kStatus,
  kReason,
  kCrew,
  kStartedAt,
  kDugAt,
  kDepth,
  kStop,
  kChosenBy,
  kX,
  kY,
  kMoved,
  kMesh,
  kBackfilled,
  kBag,
  kNote,
  kBy,
  kWhy,
};
constexpr std::size_t kPitColumns = 18;
std::string_view word(PitColumn column);

// Without spaces and tabs at its ends.
std::string_view trimmed(std::string_view text);

struct PitsColumns {
  std::array<std::optional<std::size_t>, kPitColumns> fields;  // index of the field in a row
  std::map<std::size_t, std::size_t> counts;                   // index of the plan's find -> index of the field
  std::map<std::size_t, std::size_t> weights;

  std::optional<std::size_t> field(PitColumn column) const { return fields[static_cast<std::size_t>(column)]; }

  // Findings: a column that is unknown, has no name or stands twice; a find that the plan doesn't have; no column `pit`; x without y.
  static PitsColumns of(const CsvTable& table, const std::vector<std::string>& finds, TableFindings* findings);
};

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_PITS_COLUMNS_H_
