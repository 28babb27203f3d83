// Who this device is in a survey file: a writer is a device and a random id, remembered with its last hash in the user's configuration folder
// ($XDG_CONFIG_HOME/nearpit, else ~/.config/nearpit), never in the survey file, because files are copied. If the file's last hash of that writer is not
// the remembered one (an old copy, a cloned disk), a new writer begins.
#ifndef NEARPIT_STORE_WRITER_MEMORY_H_
#define NEARPIT_STORE_WRITER_MEMORY_H_

#include <optional>
#include <string>

#include "base/status.h"

namespace nearpit {

struct RememberedWriter {
  std::string id;
  std::string last_hash;     // as last known to be committed
  std::string pending_hash;  // about to be committed when this was written: either of the two is ours
};

class WriterMemory {
 public:
  // The folder from the environment. Nothing is made yet.
  static WriterMemory of_user();
  explicit WriterMemory(std::string folder) : folder_(std::move(folder)) {}

  // Nothing when this device never wrote to the survey, or when what is kept can't be read.
  std::optional<RememberedWriter> recall(const std::string& survey_id) const;
  // Replaces atomically, synced, mode 0600; makes the folder (0700). Errors: can't be written.
  Status remember(const std::string& survey_id, const RememberedWriter& writer) const;

 private:
  std::string folder_;
};

// The machine's name, for people; never an identity.
std::string device_name();

}  // namespace nearpit

#endif  // NEARPIT_STORE_WRITER_MEMORY_H_
