#include "store/writer_memory.h"

#include <fcntl.h>
#include <pwd.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <cstdlib>
#include <sstream>
#include <string_view>
#include <vector>

#include "base/sha256.h"
#include "base/text.h"
#include "base/uuid.h"
#include "store/durable_file.h"

namespace nearpit {
namespace {

constexpr std::string_view kFirstLine = "nearpit writer 1";
constexpr std::size_t kMostBytes = 4096;

// A survey's id comes out of a file from anywhere: it must never become a path.
std::string file_of(const std::string& folder, const std::string& survey_id) {
  return folder + "/writer-" + (is_uuid(survey_id) ? survey_id : sha256_hex(survey_id));
}

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

Status make_folders(const std::string& folder) {
  for (std::size_t slash = folder.find('/', 1); true; slash = folder.find('/', slash + 1)) {
    const std::string part = folder.substr(0, slash);
    if (::mkdir(part.c_str(), S_IRWXU) != 0 && errno != EEXIST)
      return store::system_error(part, "can't be made", errno);
    if (slash == std::string::npos) return ok_status();
  }
}

std::string home_folder() {
  const char* home = std::getenv("HOME");
  if (home != nullptr && *home == '/') return home;
  const passwd* user = ::getpwuid(::geteuid());
  return user != nullptr && user->pw_dir != nullptr ? user->pw_dir : "";
}

}  // namespace

WriterMemory WriterMemory::of_user() {
  // A relative XDG_CONFIG_HOME is to be ignored (XDG Base Directory Specification 0.8).
  const char* config = std::getenv("XDG_CONFIG_HOME");
  if (config != nullptr && *config == '/') return WriterMemory(std::string(config) + "/nearpit");
  return WriterMemory(home_folder() + "/.config/nearpit");
}

std::optional<RememberedWriter> WriterMemory::recall(const std::string& survey_id) const {
  const std::optional<std::string> text = read_small(file_of(folder_, survey_id));
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
  NEARPIT_TRY(make_folders(folder_));
  NEARPIT_ASSIGN(file, store::NewFile::beside(file_of(folder_, survey_id)));
  NEARPIT_TRY(file.write(std::string(kFirstLine) + "\n" + writer.id + "\n" + writer.last_hash + "\n" +
                         writer.pending_hash + "\n"));
  return file.replace();
}

std::string device_name() {
  char name[256] = {};
  if (::gethostname(name, sizeof name - 1) != 0 || !is_name(name, 255)) return "unknown device";
  return name;
}

}  // namespace nearpit
