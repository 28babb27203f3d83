// Files that appear whole or not at all, and stay after a power cut: written beside their place, synced, moved there, the folder synced.
#ifndef NEARPIT_STORE_DURABLE_FILE_H_
#define NEARPIT_STORE_DURABLE_FILE_H_

#include <string>

#include "base/status.h"

namespace nearpit::store {

// The folder of a path ("." when it names none) and the name in it.
struct PathParts {
  std::string folder;
  std::string name;
};
PathParts parts_of(const std::string& path);

// "PATH: what (the system's words); what to do", by errno. kIo, or kExists for EEXIST.
Error system_error(const std::string& path, const std::string& what, int number);

class NewFile {
 public:
  // An empty file of mode 0600 in the folder of `path`, under a name of its own. Removed with the object unless put in place.
  static Result<NewFile> beside(const std::string& path);

  NewFile(NewFile&& other) noexcept;
  NewFile& operator=(NewFile&&) = delete;
  ~NewFile();

  // Absolute, with no symbolic link in it.
  const std::string& written() const { return written_; }
  Status write(const std::string& text);

  // Nobody may have the file open through SQLite any more: its locks end when this closes the file.
  // Never over an existing file (kExists).
  Status place_new();
  // In place of what is there.
  Status replace();

 private:
  NewFile(std::string path, std::string folder, std::string written, int descriptor);
  Status sync();
  Status settle();
  void discard();

  std::string path_;
  std::string folder_;   // real
  std::string target_;   // real folder and name
  std::string written_;  // empty once placed
  int descriptor_ = -1;
};

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_DURABLE_FILE_H_
