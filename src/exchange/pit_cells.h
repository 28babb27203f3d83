// The cells of one row of a table of pits as values. Each gives nothing for a column that the table doesn't have, an empty value
// for an empty cell (which clears the field), and a finding, and nothing, for a cell that is not what it should be.
#ifndef NEARPIT_EXCHANGE_PIT_CELLS_H_
#define NEARPIT_EXCHANGE_PIT_CELLS_H_

#include <cstdint>
#include <functional>
#include <optional>
#include <string>
#include <string_view>

#include "base/clock.h"
#include "exchange/pits_columns.h"
#include "record/action.h"
#include "record/json_fields.h"

namespace nearpit {

struct PitTime {
  ParsedTime parsed;
  std::string text;  // with its offset; a date alone stays a date
};

class PitCells {
 public:
  PitCells(const CsvRow& row, const PitsColumns& columns, const TimeZone& zone, TableFindings* findings)
      : row_(row), columns_(columns), zone_(zone), findings_(findings) {}

  int line() const { return row_.line; }
  // The cell without spaces at its ends; empty when there is no such column.
  std::string_view text(PitColumn column) const;
  // The table has the column, and this row's cell is empty.
  bool cleared(PitColumn column) const { return columns_.field(column) && text(column).empty(); }
  bool filled(PitColumn column) const { return !text(column).empty(); }

  // One of some words; `of` reads them and `legal` lists them.
  template <class T>
  Given<T> word_of(PitColumn column, std::optional<T> (*of)(std::string_view), const std::string& legal) const {
    return given<T>(column, [&](std::string_view cell) {
      const std::optional<T> value = of(cell);
      if (!value) refuse(column, in_quotes_of(cell) + " is not known here; legal: " + legal);
      return value;
    });
  }
  Given<double> number(PitColumn column, const NumberRange& range) const;
  // One line of up to 200 characters.
  Given<std::string> name(PitColumn column) const;
  // Up to 4,000 characters, lines too; kept with its spaces, CR LF becomes LF.
  Given<std::string> note(PitColumn column) const;
  Given<PitTime> time(PitColumn column) const;
  // By index of the field: a whole number from 0 to 1,000,000; grams from 0 to 1e9.
  Given<std::uint32_t> count(std::size_t field, const std::string& column) const;
  Given<double> weight(std::size_t field, const std::string& column) const;

  void refuse(PitColumn column, const std::string& what) const { refuse(std::string(word(column)), what); }
  void refuse(const std::string& column, const std::string& what) const { findings_->add(row_.line, column, what); }

 private:
  static std::string in_quotes_of(std::string_view cell);
  std::optional<double> number_in(std::string_view cell, const std::string& column, const NumberRange& range) const;

  // Without a value the cell was refused.
  template <class T, class Read>
  Given<T> given(PitColumn column, Read read) const {
    if (!columns_.field(column)) return std::nullopt;
    return given_in<T>(text(column), read);
  }
  template <class T, class Read>
  static Given<T> given_in(std::string_view cell, Read read) {
    if (cell.empty()) return Given<T>(std::in_place);
    std::optional<T> value = read(cell);
    if (!value) return std::nullopt;
    return Given<T>(std::in_place, std::move(*value));
  }

  const CsvRow& row_;
  const PitsColumns& columns_;
  const TimeZone& zone_;
  TableFindings* findings_;
};

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_PIT_CELLS_H_
