// What the window remembers of a person from one start to the next; nothing of a survey. Kept as "window.json" in the user's folder (store/user_folder.h).
#ifndef NEARPIT_SESSION_PREFERENCES_H_
#define NEARPIT_SESSION_PREFERENCES_H_

#include <map>
#include <optional>
#include <string>
#include <vector>

#include "base/status.h"

namespace nearpit {

constexpr std::size_t kMostRecent = 12;
constexpr std::size_t kMostCrew = 200;  // code points of a crew's name
constexpr double kLeastPxPerMm = 1;
constexpr double kMostPxPerMm = 40;

struct Preferences {
  bool dusk = false;                           // the dark theme
  std::optional<double> px_per_mm;             // as calibrated on the glass, 1 .. 40
  std::vector<std::string> recent;             // absolute paths of survey files, newest first, at most 12, distinct
  std::map<std::string, std::string> crew_of;  // who was at work last, by survey id; a name of 1 .. 200 code points
  friend bool operator==(const Preferences&, const Preferences&) = default;
};

// Puts the path first, once, and lets the oldest beyond 12 go. A path that is not absolute, not UTF-8, holds control characters or has more than 4,096
// code points is not kept.
void opened(Preferences* preferences, const std::string& absolute_path);

class PreferenceFile {
 public:
  explicit PreferenceFile(std::string folder) : folder_(std::move(folder)) {}

  // Each value that is missing, wrong or out of range is left at its default, and so is everything when the file can't be read, is longer than 1 MiB or is
  // no JSON: a broken file must not keep a crew from work.
  Preferences read() const;
  // Replaces the file durably, mode 0600; makes the folder. What read() would leave out is not written; of more than 500 surveys, the last by id are
  // (ids rise with time). Errors: can't be written.
  Status write(const Preferences& preferences) const;

 private:
  std::string folder_;
};

}  // namespace nearpit

#endif  // NEARPIT_SESSION_PREFERENCES_H_
