#include "record/json_text.h"

#include <cstddef>
#include <iterator>
#include <unordered_map>
#include <utility>
#include <vector>

#include "base/text.h"
#include "record/json_complaint.h"

namespace nearpit {
namespace {

constexpr std::size_t kDeepestLine = 6;

// Reads characters and leaves behind how many were taken, so that every event of the parser has its place in the text.
class CountingIterator {
 public:
  using iterator_category = std::input_iterator_tag;
  using value_type = char;
  using difference_type = std::ptrdiff_t;
  using pointer = const char*;
  using reference = const char&;

  CountingIterator(const char* at, std::size_t* taken) : at_(at), taken_(taken) {}
  reference operator*() const { return *at_; }
  CountingIterator& operator++() {
    ++at_;
    ++*taken_;
    return *this;
  }
  CountingIterator operator++(int) {
    CountingIterator before = *this;
    ++*this;
    return before;
  }
  friend bool operator==(const CountingIterator& a, const CountingIterator& b) { return a.at_ == b.at_; }
  friend bool operator!=(const CountingIterator& a, const CountingIterator& b) { return a.at_ != b.at_; }

 private:
  const char* at_;
  std::size_t* taken_;
};

// The line of an offset, counted from 1; a line feed belongs to the line that it ends. Offsets must not fall.
class LineCounter {
 public:
  explicit LineCounter(std::string_view text) : text_(text) {}
  int line_at(std::size_t offset) {
    for (; at_ < offset && at_ < text_.size(); ++at_) {
      if (text_[at_] == '\n') ++line_;
    }
    return line_;
  }

 private:
  std::string_view text_;
  std::size_t at_ = 0;
  int line_ = 1;
};

int line_of_offset(std::string_view text, std::size_t offset) { return LineCounter(text).line_at(offset); }

// An object or array that is not closed yet.
struct OpenValue {
  Json* value = nullptr;
  std::string pointer;
  int line = 0;                               // of the value, as JsonDocument::line will say it
  std::unordered_map<std::string, int> keys;  // lines of an object's keys
  std::string key;                            // the key whose value is next
};

// Builds the document from the parser's events. Objects are filled through their vector, because ordered_map searches all keys at
// each insertion; `keys` finds a key given twice.
class DocumentBuilder {
 public:
  DocumentBuilder(std::string_view text, const std::size_t* taken, const JsonLimits& limits, JsonDocument* document)
      : text_(text), taken_(taken), limits_(limits), document_(document), lines_(text) {}

  bool null() { return add(nullptr); }
  bool boolean(bool value) { return add(value); }
  bool number_integer(std::int64_t value) { return add_number(value); }
  bool number_unsigned(std::uint64_t value) { return add_number(value); }
  bool number_float(double value, const std::string&) { return add_number(value); }
  bool string(std::string& value) { return add(std::move(value)); }
  bool binary(Json::binary_t&) { return false; }
  bool start_object(std::size_t) { return open(Json::object()); }
  bool start_array(std::size_t) { return open(Json::array()); }
  bool end_object() { return close(); }
  bool end_array() { return close(); }
  bool key(std::string& name) {
    after_ = *taken_;
    OpenValue& in = open_.back();
    const int line = lines_.line_at(after_ - 1);
    const auto [place, fresh] = in.keys.emplace(name, line);
    if (!fresh) {
      return refuse(line, "the key " + in_quotes(name) + " stands twice in one object, first on line " +
                              std::to_string(place->second) + "; take one out");
    }
    in.key = name;
    expects_ = JsonExpects::kValue;
    return true;
  }
  template <class Exception>
  bool parse_error(std::size_t, const std::string&, const Exception&) {
    const JsonComplaint complaint = complain_of_json(text_, after_, expects_);
    return refuse(line_of_offset(text_, complaint.offset), "not JSON: " + complaint.what);
  }

  int refused_line() const { return refused_line_; }
  const std::string& refusal() const { return refusal_; }

 private:
  bool refuse(int line, std::string what) {
    refused_line_ = line;
    refusal_ = std::move(what);
    return false;
  }

  template <class Number>
  bool add_number(Number value) {
    // A number ends where another character is seen: that one is taken already, unless the text ends with the number.
    const char last = text_[*taken_ - 1];
    const bool at_end = *taken_ == text_.size() && last >= '0' && last <= '9';
    return add_at(value, at_end ? *taken_ : *taken_ - 1);
  }
  template <class Value>
  bool add(Value&& value) {
    return add_at(Json(std::forward<Value>(value)), *taken_);
  }
  bool add_at(Json value, std::size_t end) { return place(std::move(value), end) != nullptr; }

  // Puts a value that ends (or, for an object or array, opens) just before `end` where it belongs.
  Json* place(Json value, std::size_t end) {
    after_ = end;
    const int line = lines_.line_at(end - 1);
    if (++elements_ > limits_.elements) {
      refuse(line, "more than " + std::to_string(limits_.elements) + " values; make the file smaller");
      return nullptr;
    }
    if (open_.empty()) {
      document_->value = std::move(value);
      document_->line_of[""] = line;
      expects_ = JsonExpects::kEnd;
      last_pointer_.clear();
      last_line_ = line;
      return &document_->value;
    }
    OpenValue& in = open_.back();
    const bool object = in.value->is_object();
    Json* placed = nullptr;
    if (object) {
      Json::object_t::Container& members = in.value->get_ref<Json::object_t&>();
      members.emplace_back(in.key, std::move(value));
      placed = &members.back().second;
    } else {
      placed = &in.value->get_ref<Json::array_t&>().emplace_back(std::move(value));
    }
    expects_ = object ? JsonExpects::kInObject : JsonExpects::kInArray;
    keep_line(in, line);
    return placed;
  }

  // A line is kept only where it differs from that of the value around, which is what JsonDocument::line falls back to.
  void keep_line(const OpenValue& in, int line) {
    last_line_ = in.line;
    if (open_.size() > kDeepestLine) return;
    last_pointer_ = in.value->is_object()
                        ? child_pointer(in.pointer, in.key)
                        : child_pointer(in.pointer, in.value->get_ref<const Json::array_t&>().size() - 1);
    last_line_ = line;
    if (line != in.line) document_->line_of.emplace(last_pointer_, line);
    if (in.value->is_object()) {
      const int key_line = in.keys.at(in.key);
      if (key_line != line) document_->key_line_of.emplace(last_pointer_, key_line);
    }
  }

  bool open(Json empty) {
    const bool object = empty.is_object();
    Json* value = place(std::move(empty), *taken_);
    if (value == nullptr) return false;
    if (open_.size() >= limits_.depth) {
      return refuse(lines_.line_at(after_ - 1), "values stand more than " + std::to_string(limits_.depth) +
                                                    " deep in one another; make it flatter");
    }
    open_.push_back({value, last_pointer_, last_line_, {}, {}});
    expects_ = object ? JsonExpects::kKeyOrClose : JsonExpects::kElementOrClose;
    return true;
  }

  bool close() {
    after_ = *taken_;
    open_.pop_back();
    if (open_.empty()) {
      expects_ = JsonExpects::kEnd;
    } else {
      expects_ = open_.back().value->is_object() ? JsonExpects::kInObject : JsonExpects::kInArray;
    }
    return true;
  }

  std::string_view text_;
  const std::size_t* taken_;
  const JsonLimits& limits_;
  JsonDocument* document_;
  LineCounter lines_;
  std::vector<OpenValue> open_;
  std::size_t elements_ = 0;
  std::size_t after_ = 0;
  JsonExpects expects_ = JsonExpects::kDocument;
  std::string last_pointer_;
  int last_line_ = 1;
  int refused_line_ = 1;
  std::string refusal_;
};

// The offset of the first byte that belongs to no well-formed sequence; the text is known to hold one.
std::size_t first_bad_byte(std::string_view text) {
  std::size_t good = 0;
  while (good < text.size()) {
    const auto lead = static_cast<unsigned char>(text[good]);
    const std::size_t size = lead < 0x80 ? 1 : lead < 0xE0 ? 2 : lead < 0xF0 ? 3 : 4;
    if (!is_utf8(text.substr(good, size))) break;
    good += size;
  }
  return good;
}

Error refused(const std::string& file, int line, const std::string& what) {
  return {ErrorKind::kBadInput, file + ":" + std::to_string(line) + ": " + what};
}

}  // namespace

std::string child_pointer(const std::string& pointer, std::string_view key) {
  std::string out = pointer + "/";
  for (const char c : key) {
    if (c == '~' || c == '/') {
      out += c == '~' ? "~0" : "~1";
    } else {
      out += c;
    }
  }
  return out;
}

std::string child_pointer(const std::string& pointer, std::size_t index) {
  return pointer + "/" + std::to_string(index);
}

int JsonDocument::line(const std::string& pointer) const {
  for (std::string at = pointer;; at.resize(at.rfind('/'))) {
    if (const auto found = line_of.find(at); found != line_of.end()) return found->second;
    if (at.empty() || at.rfind('/') == std::string::npos) return 1;
  }
}

int JsonDocument::key_line(const std::string& pointer) const {
  const auto found = key_line_of.find(pointer);
  return found != key_line_of.end() ? found->second : line(pointer);
}

Result<JsonDocument> read_json(std::string_view text, const std::string& file, const JsonLimits& limits) {
  if (text.starts_with("\xEF\xBB\xBF")) text.remove_prefix(3);
  if (text.size() > limits.bytes) {
    return refused(file, 1,
                   std::to_string(text.size()) + " bytes are more than the " + std::to_string(limits.bytes) +
                       " that are read; make the file smaller");
  }
  if (!is_utf8(text)) {
    return refused(file, line_of_offset(text, first_bad_byte(text)), "not UTF-8; save the file as UTF-8");
  }
  JsonDocument document;
  std::size_t taken = 0;
  DocumentBuilder builder(text, &taken, limits, &document);
  const char* end = text.data() + text.size();
  if (!Json::sax_parse(CountingIterator(text.data(), &taken), CountingIterator(end, &taken), &builder)) {
    return refused(file, builder.refused_line(), builder.refusal());
  }
  return document;
}

}  // namespace nearpit
