#include "exchange/csv_table.h"

#include <csv.h>

#include <algorithm>
#include <optional>
#include <utility>

#include "base/text.h"

namespace nearpit {
namespace {

constexpr std::size_t kMostBytes = 64u << 20;
constexpr std::size_t kMostColumns = 1'000;
constexpr std::size_t kMostRows = 1'000'000;
constexpr std::size_t kMostFieldBytes = 10'000;
constexpr std::size_t kMostFaults = 10'000;
constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";
constexpr std::string_view kUseCommas = "save the table with commas between the cells";

std::string counted(std::size_t count, const std::string& one) {
  return std::to_string(count) + " " + one + (count == 1 ? "" : "s");
}

// What libcsv reports, put together. The text is fed byte by byte, so `at` is the place of each report.
class TableBuilder {
 public:
  TableBuilder(std::string_view text, std::vector<CsvFault>* faults) : text_(text), faults_(faults) {}

  void begin_byte(std::size_t at) { at_ = at; }
  void end_byte() {
    if (at_ < text_.size() && text_[at_] == '\n') ++line_;
  }

  void field(std::string_view value) {
    if (fields_.empty()) row_line_ = field_line_;
    if (value.size() > kMostFieldBytes) refuse_long();
    if (fields_.size() < kMostColumns + 1) fields_.emplace_back(value);
    ++field_count_;
    begin_field();
  }

  // `end`: the byte that ended the row; -1 at the end of the text. Called for blank lines and the LF of CR LF, too.
  void row(int end) {
    if (end == '\r' && (at_ + 1 >= text_.size() || text_[at_ + 1] != '\n')) {
      refuse(line_, "a carriage return without a line feed; save the table with CR LF or LF at the end of each line");
    }
    if (field_count_ > 0) take_row();
    fields_.clear();
    field_count_ = 0;
    begin_field();
  }

  // libcsv stops at a quote inside a cell that does not begin with one, and at anything but a comma or the end of the line behind
  // a closing quote.
  void stopped_at(char found) {
    const bool semicolons = text_.substr(field_start_, at_ - field_start_).find(';') != std::string_view::npos;
    if (!quoted() && !has_header_ && semicolons) {
      refuse_separator(line_, ';');
    } else if (!quoted()) {
      refuse(line_,
             "a quote inside a cell that doesn't begin with one; put quotes around the whole cell and write \"\" for "
             "each quote in it");
    } else if (found == ';' || found == '\t') {
      refuse_separator(line_, found);
    } else {
      refuse(field_line_, "the quoted cell that begins here ends on line " + std::to_string(line_) + " with " +
                              in_quotes({&found, 1}) +
                              " behind its quote; legal: a comma or the end of the line; write "
                              "\"\" for a quote inside the cell");
    }
  }

  void not_closed() { refuse(field_line_, "the quoted cell that begins here is not closed; write a quote at its end"); }

  // A cell that is still open has grown past the limit, even if every quote in it is doubled.
  void watch_length() {
    if (at_ >= field_start_ && at_ - field_start_ > 2 * kMostFieldBytes + 2) refuse_long();
  }

  bool refused() const { return refused_.has_value(); }
  const CsvFault& refusal() const { return *refused_; }
  bool has_header() const { return has_header_; }
  CsvTable& table() { return table_; }

 private:
  void refuse(int line, std::string what) {
    if (!refused_) refused_ = CsvFault{line, std::move(what)};
  }
  void refuse_long() {
    refuse(field_line_, "the cell that begins here is longer than " + std::to_string(kMostFieldBytes) + " bytes; " +
                            (quoted() ? "see whether its closing quote is missing" : "shorten it"));
  }
  void refuse_separator(int line, char found) {
    refuse(line, std::string(found == ';' ? "semicolons" : "tabs") + " between the cells; legal: commas (RFC 4180); " +
                     std::string(kUseCommas));
  }

  bool quoted() const { return field_start_ < text_.size() && text_[field_start_] == '"'; }
  void begin_field() {
    field_start_ = at_ + 1;
    const bool after_line = at_ < text_.size() && text_[at_] == '\n';
    field_line_ = after_line ? line_ + 1 : line_;
  }

  void take_row() {
    if (!has_header_) return take_header();
    if (field_count_ != table_.header.size()) return wrong_width();
    if (table_.rows.size() >= kMostRows) {
      return refuse(row_line_, "more than " + std::to_string(kMostRows) + " rows; split the table");
    }
    table_.rows.push_back({row_line_, std::move(fields_)});
  }

  void take_header() {
    has_header_ = true;
    table_.header_line = row_line_;
    if (field_count_ > kMostColumns) {
      return refuse(row_line_, std::to_string(field_count_) + " columns; legal: up to " + std::to_string(kMostColumns));
    }
    const std::string& first = fields_.front();
    if (fields_.size() == 1 && text_[header_start()] != '"') {
      for (const char separator : {';', '\t'}) {
        if (first.find(separator) != std::string::npos) return refuse_separator(row_line_, separator);
      }
    }
    table_.header = std::move(fields_);
  }
  std::size_t header_start() const { return text_.find_first_not_of("\r\n"); }

  void wrong_width() {
    if (faults_->size() >= kMostFaults) return;
    std::string what =
        counted(field_count_, "cell") + ", but the header has " + counted(table_.header.size(), "column");
    if (field_count_ > table_.header.size()) {
      what += "; put quotes around a cell that holds a comma";
    } else if (field_count_ == 1 && fields_.front().find(';') != std::string::npos) {
      what += "; " + std::string(kUseCommas) + ", not semicolons";
    } else {
      what += "; write a comma for each empty cell, too";
    }
    faults_->push_back({row_line_, std::move(what)});
  }

  std::string_view text_;
  std::vector<CsvFault>* faults_;
  CsvTable table_;
  bool has_header_ = false;
  std::vector<std::string> fields_;
  std::size_t field_count_ = 0;
  std::size_t at_ = 0;
  int line_ = 1;
  std::size_t field_start_ = 0;
  int field_line_ = 1;
  int row_line_ = 1;
  std::optional<CsvFault> refused_;
};

extern "C" {
// RFC 4180 section 2, rule 4: spaces are part of a field.
static int no_byte_is_space(unsigned char) { return 0; }
static void take_field(void* bytes, std::size_t size, void* builder) {
  static_cast<TableBuilder*>(builder)->field({static_cast<const char*>(bytes), size});
}
static void take_row_end(int end, void* builder) { static_cast<TableBuilder*>(builder)->row(end); }
}

class Parser {
 public:
  Parser() : ready_(csv_init(&parser_, CSV_STRICT | CSV_STRICT_FINI | CSV_REPALL_NL) == 0) {
    if (ready_) csv_set_space_func(&parser_, no_byte_is_space);
  }
  ~Parser() {
    if (ready_) csv_free(&parser_);
  }
  Parser(const Parser&) = delete;
  Parser& operator=(const Parser&) = delete;

  bool ready() const { return ready_; }
  bool feed(char byte, TableBuilder* to) { return csv_parse(&parser_, &byte, 1, take_field, take_row_end, to) == 1; }
  bool finish(TableBuilder* to) { return csv_fini(&parser_, take_field, take_row_end, to) == 0; }
  bool lacks_memory() { return csv_error(&parser_) == CSV_ENOMEM || csv_error(&parser_) == CSV_ETOOBIG; }

 private:
  csv_parser parser_{};
  bool ready_;
};

Error at_line(const std::string& file, int line, const std::string& what) {
  return {ErrorKind::kBadInput, file + ":" + std::to_string(line) + ": " + what};
}

// The first part between commas that is not UTF-8.
std::string_view ill_formed_cell(std::string_view line) {
  for (;;) {
    const std::size_t end = std::min(line.find(','), line.size());
    if (end == line.size() || !is_utf8(line.substr(0, end))) return line.substr(0, end);
    line.remove_prefix(end + 1);
  }
}

// NUL bytes and text that is not UTF-8, line by line.
std::optional<CsvFault> byte_fault(std::string_view text) {
  int line = 1;
  while (!text.empty()) {
    const std::size_t end = std::min(text.find('\n'), text.size());
    const std::string_view here = text.substr(0, end);
    if (here.find('\0') != std::string_view::npos) {
      return CsvFault{line, "a NUL byte; is this a CSV file? Save the table as CSV, UTF-8"};
    }
    if (!is_utf8(here))
      return CsvFault{line, in_quotes(ill_formed_cell(here)) + " is not UTF-8; save the table as CSV, UTF-8"};
    text.remove_prefix(std::min(end + 1, text.size()));
    ++line;
  }
  return std::nullopt;
}

Status parse(std::string_view text, const std::string& file, TableBuilder* builder) {
  const Error no_memory(ErrorKind::kIo, file + ": not enough memory to read it; close other programs");
  Parser parser;
  if (!parser.ready()) return no_memory;
  for (std::size_t at = 0; at < text.size() && !builder->refused(); ++at) {
    builder->begin_byte(at);
    if (!parser.feed(text[at], builder)) {
      if (parser.lacks_memory()) return no_memory;
      builder->stopped_at(text[at]);
      break;
    }
    builder->watch_length();
    builder->end_byte();
  }
  builder->begin_byte(text.size());
  if (!builder->refused() && !parser.finish(builder)) {
    if (parser.lacks_memory()) return no_memory;
    builder->not_closed();
  }
  if (builder->refused()) return at_line(file, builder->refusal().line, builder->refusal().what);
  return ok_status();
}

}  // namespace

Result<CsvTable> read_csv(std::string_view text, const std::string& file, std::vector<CsvFault>* faults) {
  if (text.size() > kMostBytes) {
    return at_line(file, 1,
                   std::to_string(text.size()) + " bytes, more than the " + std::to_string(kMostBytes) +
                       " that are read; split the table");
  }
  if (text.starts_with(kByteOrderMark)) text.remove_prefix(kByteOrderMark.size());
  if (const auto fault = byte_fault(text)) return at_line(file, fault->line, fault->what);
  TableBuilder builder(text, faults);
  NEARPIT_TRY(parse(text, file, &builder));
  if (!builder.has_header()) {
    return at_line(file, 1,
                   "the table is empty; legal: a line with the names of the columns, then a line for each row");
  }
  return std::move(builder.table());
}

Result<CsvTable> read_csv(std::string_view text, const std::string& file) {
  std::vector<CsvFault> faults;
  NEARPIT_ASSIGN(table, read_csv(text, file, &faults));
  if (faults.empty()) return table;
  std::vector<std::string> lines;
  for (const CsvFault& fault : faults)
    lines.push_back(file + ":" + std::to_string(fault.line) + ": " + fault.what);
  return Error(ErrorKind::kBadInput, std::move(lines));
}

}  // namespace nearpit
