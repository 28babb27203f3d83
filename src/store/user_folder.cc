#include "store/user_folder.h"

#include <fcntl.h>
#include <pwd.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <cstdlib>

#include "base/sha256.h"
#include "base/uuid.h"
#include "store/durable_file.h"

namespace nearpit {
namespace {

Status make_folders(const std::string& folder) {
  if (folder.empty()) return Error(ErrorKind::kIo, "this user has no folder to keep anything in; set HOME");
  for (std::size_t slash = folder.find('/', 1); true; slash = folder.find('/', slash + 1)) {
    const std::string part = folder.substr(0, slash);
    if (::mkdir(part.c_str(), S_IRWXU) != 0 && errno != EEXIST)
      return store::system_error(part, "can't be made", errno);
    if (slash == std::string::npos) return ok_status();
  }
}

}  // namespace

std::string home_folder() {
  const char* home = std::getenv("HOME");
  if (home != nullptr && *home == '/') return home;
  const passwd* user = ::getpwuid(::geteuid());
  return user != nullptr && user->pw_dir != nullptr ? user->pw_dir : "";
}

std::string user_folder() {
  const char* config = std::getenv("XDG_CONFIG_HOME");
  if (config != nullptr && *config == '/') return std::string(config) + "/nearpit";
  const std::string home = home_folder();
  return home.empty() ? "" : home + "/.config/nearpit";
}

std::string name_for_survey(std::string_view prefix, const std::string& survey_id) {
  return std::string(prefix) + "-" + (is_uuid(survey_id) ? survey_id : sha256_hex(survey_id));
}

Status replace_user_file(const std::string& folder, const std::string& name, const std::string& text) {
  NEARPIT_TRY(make_folders(folder));
  NEARPIT_ASSIGN(file, store::NewFile::beside(folder + "/" + name));
  NEARPIT_TRY(file.write(text));
  return file.replace();
}

Status remove_user_file(const std::string& folder, const std::string& name) {
  const std::string path = folder + "/" + name;
  if (::unlink(path.c_str()) != 0) {
    if (errno == ENOENT || errno == ENOTDIR) return ok_status();
    return store::system_error(path, "can't be taken away", errno);
  }
  const int descriptor = ::open(folder.c_str(), O_RDONLY | O_DIRECTORY | O_CLOEXEC);
  if (descriptor < 0) return store::system_error(path, "its folder can't be synced", errno);
  // A file system that can't sync a folder says EINVAL; it has nothing to sync then.
  const int number = ::fsync(descriptor) == 0 || errno == EINVAL ? 0 : errno;
  ::close(descriptor);
  return number == 0 ? ok_status() : store::system_error(path, "its folder can't be synced", number);
}

}  // namespace nearpit
