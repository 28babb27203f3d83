#include "session/folder_list.h"

#include <dirent.h>
#include <fcntl.h>
#include <pwd.h>
#include <sys/stat.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <cstdlib>
#include <filesystem>
#include <memory>
#include <optional>
#include <system_error>

#include "base/text.h"
#include "exchange/text_file.h"
#include "store/user_folder.h"

namespace nearpit {
namespace {

constexpr std::size_t kMostPath = 4096;
constexpr std::size_t kMostTyped = 100;
constexpr std::size_t kMostNameBytes = 255;  // of Linux's file systems
constexpr std::string_view kEnding = ".gpkg";

std::string shown(const std::string& path) { return is_name(path, kMostPath) ? path : in_quotes(path); }

std::string words_of(int number) { return std::generic_category().message(number); }

Error folder_error(const std::string& path, int number) {
  if (path.empty()) return {ErrorKind::kBadInput, "no folder is named; choose one"};
  if (number == ENOENT) return {ErrorKind::kNotFound, shown(path) + ": there is no such folder; choose another"};
  if (number == ENOTDIR) return {ErrorKind::kBadInput, shown(path) + ": is not a folder; choose one"};
  if (number == EACCES || number == EPERM) {
    return {ErrorKind::kIo, shown(path) + ": may not be read by this user; choose another folder"};
  }
  return {ErrorKind::kIo, shown(path) + ": can't be read (" + words_of(number) + "); choose another folder"};
}

Result<std::string> canonical_folder(const std::string& path) {
  if (path.find('\0') != std::string::npos) return folder_error(path, ENOENT);
  const std::unique_ptr<char, decltype(&::free)> real(::realpath(path.c_str(), nullptr), &::free);
  if (!real) return folder_error(path, errno);
  struct stat facts {};
  if (::stat(real.get(), &facts) != 0) return folder_error(path, errno);
  if (!S_ISDIR(facts.st_mode)) return folder_error(path, ENOTDIR);
  return std::string(real.get());
}

char small(char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

bool ends_in(std::string_view name, std::string_view suffix) {
  if (name.size() < suffix.size()) return false;
  const std::string_view end = name.substr(name.size() - suffix.size());
  return std::equal(end.begin(), end.end(), suffix.begin(), [](char a, char b) { return small(a) == small(b); });
}

bool ends_in_one(std::string_view name, const std::vector<std::string>& suffixes) {
  return std::any_of(suffixes.begin(), suffixes.end(), [&](const auto& suffix) { return ends_in(name, suffix); });
}

// What a name in a folder leads to.
struct Facts {
  bool known = false;  // else it is not there (a link that leads nowhere) or may not be looked at
  bool absent = false;
  struct stat stat {};
  bool folder() const { return known && S_ISDIR(stat.st_mode); }
  bool file() const { return known && S_ISREG(stat.st_mode); }
};

Facts facts_of(int folder, const char* name) {
  Facts facts;
  facts.known = ::fstatat(folder, name, &facts.stat, 0) == 0;
  facts.absent = !facts.known && (errno == ENOENT || errno == ELOOP);
  return facts;
}

// Cheap: the folder itself says what most names are, so a folder of a million other files costs no look at each.
bool may_be_listed(const dirent& found, const std::vector<std::string>& suffixes) {
  const std::string_view name = found.d_name;
  if (name.starts_with('.')) return false;
  if (found.d_type == DT_DIR) return true;
  if (found.d_type == DT_REG) return ends_in_one(name, suffixes);
  return found.d_type == DT_LNK || found.d_type == DT_UNKNOWN;
}

WallTime modified(const struct stat& facts, const TimeZone& zone) {
  const std::int64_t ms = std::int64_t{facts.st_mtim.tv_sec} * 1000 + facts.st_mtim.tv_nsec / 1'000'000;
  return in_zone({ms, 0}, zone);
}

void take_name(int folder, const dirent& found, const std::vector<std::string>& suffixes, const TimeZone& zone,
               FolderList* list) {
  const std::string name = found.d_name;
  const Facts facts = facts_of(folder, found.d_name);
  if (facts.absent) return;
  if (facts.known && !facts.folder() && !(facts.file() && ends_in_one(name, suffixes))) return;
  if (!facts.known || !is_name(name, kMostNameBytes)) {
    ++list->left_out;
    return;
  }
  list->entries.push_back(
      {name, facts.folder(), facts.folder() ? 0 : std::int64_t{facts.stat.st_size}, modified(facts.stat, zone)});
}

void put_in_order(std::vector<FolderEntry>* entries) {
  struct Keyed {
    std::string folded;
    FolderEntry entry;
  };
  std::vector<Keyed> keyed;
  for (FolderEntry& entry : *entries)
    keyed.push_back({fold_case(entry.name), std::move(entry)});
  std::sort(keyed.begin(), keyed.end(), [](const Keyed& a, const Keyed& b) {
    if (a.entry.folder != b.entry.folder) return a.entry.folder;
    return a.folded != b.folded ? a.folded < b.folded : a.entry.name < b.entry.name;
  });
  for (std::size_t i = 0; i < keyed.size(); ++i)
    (*entries)[i] = std::move(keyed[i].entry);
}

// "\040" for a space and so on (proc(5)).
std::string without_escapes(std::string_view field) {
  const auto is_octal = [](char c) { return c >= '0' && c <= '7'; };
  std::string out;
  for (std::size_t i = 0; i < field.size(); ++i) {
    if (field[i] == '\\' && i + 3 < field.size() && std::all_of(&field[i + 1], &field[i + 4], is_octal)) {
      out += static_cast<char>((field[i + 1] - '0') * 64 + (field[i + 2] - '0') * 8 + (field[i + 3] - '0'));
      i += 3;
    } else {
      out += field[i];
    }
  }
  return out;
}

// The field of a line, counted from 0; fields are parted by single spaces.
std::string_view field_of(std::string_view line, int number) {
  for (; number > 0; --number) {
    const std::size_t space = line.find(' ');
    if (space == std::string_view::npos) return {};
    line.remove_prefix(space + 1);
  }
  return line.substr(0, line.find(' '));
}

std::string user_name() {
  const passwd* user = ::getpwuid(::geteuid());
  return user != nullptr && user->pw_name != nullptr ? user->pw_name : "";
}

void add_place(const std::string& name, const std::string& path, std::vector<Place>* places) {
  const auto folder = canonical_folder(path);
  if (!folder) return;
  const bool known =
      std::any_of(places->begin(), places->end(), [&](const Place& place) { return place.path == *folder; });
  if (!known) places->push_back({name, *folder});
}

}  // namespace

Result<FolderList> list_folder(const std::string& path, const std::vector<std::string>& suffixes,
                               const TimeZone& zone) {
  FolderList list;
  NEARPIT_ASSIGN(real, canonical_folder(path));
  list.path = real;
  if (real != "/") list.parent = real.substr(0, std::max<std::size_t>(real.rfind('/'), 1));
  const std::unique_ptr<DIR, int (*)(DIR*)> folder(::opendir(real.c_str()), &::closedir);
  if (!folder) return folder_error(path, errno);
  errno = 0;
  while (const dirent* found = ::readdir(folder.get())) {
    if (may_be_listed(*found, suffixes)) take_name(::dirfd(folder.get()), *found, suffixes, zone, &list);
    errno = 0;
  }
  if (errno != 0) return folder_error(path, errno);
  put_in_order(&list.entries);
  if (list.entries.size() > kMostEntries) {
    list.left_out += list.entries.size() - kMostEntries;
    list.entries.resize(kMostEntries);
  }
  return list;
}

std::vector<Place> mounted_places(std::string_view mountinfo, const std::string& user) {
  const std::string parents[] = {"/media/" + user, "/run/media/" + user, "/media", "/mnt"};
  std::vector<Place> places;
  while (!mountinfo.empty()) {
    const std::string_view line = mountinfo.substr(0, mountinfo.find('\n'));
    mountinfo.remove_prefix(std::min(mountinfo.size(), line.size() + 1));
    const std::filesystem::path path = without_escapes(field_of(line, 4));
    const std::string name = path.filename().string();
    const auto is = [&](const std::string& parent) {
      return std::count(std::begin(parents), std::end(parents), parent) > 0;
    };
    if (!is(path.parent_path().string()) || is(path.string()) || !is_name(name, kMostNameBytes)) continue;
    places.push_back({"Card or stick: " + name, path.string()});
  }
  const auto key = [](const Place& place) { return std::pair(fold_case(place.name), place.path); };
  std::sort(places.begin(), places.end(), [&](const Place& a, const Place& b) { return key(a) < key(b); });
  places.erase(std::unique(places.begin(), places.end()), places.end());
  return places;
}

std::vector<Place> usual_places() {
  std::vector<Place> places;
  add_place("Home", home_folder(), &places);
  std::error_code failed;
  add_place("This folder", std::filesystem::current_path(failed).string(), &places);
  const auto mounts = read_text_file("/proc/self/mountinfo");
  if (!mounts) return places;
  for (const Place& mounted : mounted_places(*mounts, user_name()))
    add_place(mounted.name, mounted.path, &places);
  return places;
}

Result<std::string> new_file_path(const std::string& folder, const std::string& typed_name) {
  const auto bad = [&](const std::string& what) { return Error(ErrorKind::kBadInput, in_quotes(typed_name) + what); };
  NEARPIT_ASSIGN(real, canonical_folder(folder));
  const std::size_t first = typed_name.find_first_not_of(' ');
  if (first == std::string::npos) return Error(ErrorKind::kBadInput, "the file has no name; type one");
  std::string name = typed_name.substr(first, typed_name.find_last_not_of(' ') - first + 1);
  if (name.starts_with('.')) return bad(" begins with '.', which hides a file; begin with a letter or a digit");
  if (name.find('/') != std::string::npos) return bad(" holds '/'; choose the folder first, then type a name");
  if (is_utf8(name) && utf8_length(name) > kMostTyped) return bad(" is too long; legal: up to 100 characters");
  if (!is_name(name, kMostTyped)) return bad(" can't name a file; legal: letters, digits, spaces and signs");
  if (ends_in(name, kEnding)) name.resize(name.size() - kEnding.size());
  name += kEnding;
  if (name.size() > kMostNameBytes) return bad(" is too long for a file's name; choose a shorter one");
  const std::string path = (real == "/" ? "" : real) + "/" + name;
  struct stat facts {};
  if (::lstat(path.c_str(), &facts) == 0) {
    return Error(ErrorKind::kExists, shown(path) + ": exists already; choose another name");
  }
  if (errno != ENOENT) return folder_error(folder, errno);
  return path;
}

}  // namespace nearpit
