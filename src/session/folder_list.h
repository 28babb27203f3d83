// Folders and files as the window lists them, places where a crew keeps surveys, and the path of a new survey file.
#ifndef NEARPIT_SESSION_FOLDER_LIST_H_
#define NEARPIT_SESSION_FOLDER_LIST_H_

#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

#include "base/clock.h"
#include "base/status.h"

namespace nearpit {

struct FolderEntry {
  std::string name;  // UTF-8 without control characters
  bool folder = false;
  std::int64_t bytes = 0;  // 0 for a folder
  WallTime modified;
};

struct FolderList {
  std::string path;                  // absolute, without links, "." and ".."
  std::string parent;                // "" at the top
  std::vector<FolderEntry> entries;  // folders first, each by name ignoring case
  std::size_t left_out = 0;          // with names that can't be shown, facts that can't be read, or beyond 2,000
};

constexpr std::size_t kMostEntries = 2000;

// Folders, and files whose names end in one of the suffixes (".gpkg"), ignoring ASCII case; links count as what they lead to. Hidden names and links that
// lead nowhere are no entries and not counted. Errors: no such folder (kNotFound), not a folder (kBadInput), may not be read (kIo).
Result<FolderList> list_folder(const std::string& path, const std::vector<std::string>& suffixes, const TimeZone& zone);

struct Place {
  std::string name;  // "Home", "This folder", "Card or stick: NAME"
  std::string path;  // absolute
  friend bool operator==(const Place&, const Place&) = default;
};

// The home folder, the working folder, and what is mounted under /media/<user>, /run/media/<user>, /media and /mnt, by name. Each path once; only
// folders that are there.
std::vector<Place> usual_places();
// Where those mounted are, from the system's table of mounts (proc(5), /proc/PID/mountinfo: field 5, octal escapes); names that can't be shown are left out.
std::vector<Place> mounted_places(std::string_view mountinfo, const std::string& user);

// The path of a new survey file: spaces at the ends of the name are dropped, ".gpkg" is added where it is missing (and written small where it is not).
// Errors: the folder is not there or none; a name that is empty, not UTF-8, has more than 100 code points or 255 bytes, begins with '.', holds '/' or control
// characters (kBadInput); something of that name is there already (kExists).
Result<std::string> new_file_path(const std::string& folder, const std::string& typed_name);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_FOLDER_LIST_H_
