#include "store/writer_memory.h"

#include <fcntl.h>
#include <unistd.h>

#include <sstream>
#include <string_view>

#include "base/text.h"
#include "base/uuid.h"
#include "store/user_folder.h"

namespace nearpit {
namespace {

constexpr std::string_view kPrefix = "writer";
constexpr std::string_view kFirstLine = "nearpit writer 1";
constexpr std::size_t kMostBytes = 4096;

std::optional<std::string> read_small(const std::string& path) {
  const int descriptor = ::open(path.c_str(), O_RDONLY | O_CLOEXEC | O_NOFOLLOW | O_NONBLOCK);
  if (descriptor < 0) return std::nullopt;
  std::string text(kMostBytes, '\0');
  std::size_t size = 0;
  ssize_t count = 0;
  while (size < text.size() && (count = ::read(descriptor, text.data() + size, text.size() - size)) > 0) {
    size += static_cast<std::size_t>(count);
  }
  ::close(descriptor);
  if (count < 0) return std::nullopt;
  text.resize(size);
  return text;
}

bool is_hash(std::string_view text) {
  return text.empty() || (text.size() == 64 && text.find_first_not_of("0123456789abcdef") == std::string_view::npos);
}

}  // namespace

WriterMemory WriterMemory::of_user() { return WriterMemory(user_folder()); }

std::optional<RememberedWriter> WriterMemory::recall(const std::string& survey_id) const {
  const std::optional<std::string> text = read_small(folder_ + "/" + name_for_survey(kPrefix, survey_id));
  if (!text) return std::nullopt;
  std::istringstream lines(*text);
  std::string first;
  RememberedWriter writer;
  if (!std::getline(lines, first) || !std::getline(lines, writer.id) || !std::getline(lines, writer.last_hash) ||
      !std::getline(lines, writer.pending_hash)) {
    return std::nullopt;
  }
  if (first != kFirstLine || !is_uuid(writer.id) || !is_hash(writer.last_hash) || !is_hash(writer.pending_hash))
    return std::nullopt;
  return writer;
}

Status WriterMemory::remember(const std::string& survey_id, const RememberedWriter& writer) const {
  return replace_user_file(
      folder_, name_for_survey(kPrefix, survey_id),
      std::string(kFirstLine) + "\n" + writer.id + "\n" + writer.last_hash + "\n" + writer.pending_hash + "\n");
}

std::string device_name() {
  char name[256] = {};
  if (::gethostname(name, sizeof name - 1) != 0 || !is_name(name, 255)) return "unknown device";
  return name;
}

}  // namespace nearpit
