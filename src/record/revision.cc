#include "record/revision.h"

#include <algorithm>
#include <limits>

#include "base/sha256.h"

namespace nearpit {
namespace {

constexpr std::int64_t kTicksPerMs = 65536;

// Each field as "<bytes>:<field>", so that no two lists of fields give the same text. Frozen.
class ChainInput {
 public:
  void add(std::string_view field) {
    text_ += std::to_string(field.size());
    text_ += ':';
    text_ += field;
  }
  void add(std::int64_t number) { add(std::to_string(number)); }
  const std::string& text() const { return text_; }

 private:
  std::string text_;
};

}  // namespace

std::string start_hash(const std::string& survey_id, const std::string& plan,
                       const std::vector<std::vector<std::uint32_t>>& drawn) {
  ChainInput input;
  input.add(survey_id);
  input.add(plan);
  input.add(static_cast<std::int64_t>(drawn.size()));
  for (const std::vector<std::uint32_t>& units : drawn) {
    input.add(static_cast<std::int64_t>(units.size()));
    for (const std::uint32_t unit : units)
      input.add(std::int64_t{unit});
  }
  return sha256_hex(input.text());
}

std::string chain_hash(const std::string& previous, const Revision& revision) {
  ChainInput input;
  input.add(previous);
  input.add(revision.id);
  input.add(revision.writer);
  input.add(revision.seq);
  input.add(revision.clock);
  input.add(revision.by);
  input.add(revision.at.utc_ms);
  input.add(std::int64_t{revision.at.offset_min});
  input.add(revision.object);
  input.add(revision.body);
  input.add(revision.why);
  input.add(static_cast<std::int64_t>(revision.parents.size()));
  for (const std::string& parent : revision.parents)
    input.add(parent);
  return sha256_hex(input.text());
}

std::int64_t next_clock(std::int64_t last, std::int64_t wall_ms) {
  constexpr std::int64_t kMost = std::numeric_limits<std::int64_t>::max();
  const std::int64_t wall = std::clamp<std::int64_t>(wall_ms, 0, kMost / kTicksPerMs) * kTicksPerMs;
  return last == kMost ? kMost : std::max(wall, last + 1);
}

std::string pit_object(const std::string& label) { return "pit/" + label; }
bool is_pit_object(std::string_view object) { return object.starts_with("pit/"); }
bool is_area_object(std::string_view object) { return object.starts_with("area/"); }
bool is_stop_object(std::string_view object) { return object.starts_with("stop/"); }

std::string_view object_name(std::string_view object) {
  const std::size_t slash = object.find('/');
  return slash == std::string_view::npos ? std::string_view() : object.substr(slash + 1);
}

}  // namespace nearpit
