#include "store/durable_file.h"

#include <fcntl.h>
#include <stdio.h>
#include <stdlib.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <cstring>
#include <memory>
#include <utility>

#include "store/sqlite_handle.h"

namespace nearpit::store {
namespace {

std::string advice(int number) {
  switch (number) {
    case ENOSPC:
    case EDQUOT:
      return "make room on the disk";
    case EROFS:
      return "is the card locked? choose a place that can be written";
    case EACCES:
    case EPERM:
      return "check the permissions of the folder, or choose another";
    case ENOENT:
    case ENOTDIR:
      return "make the folder first";
    case EEXIST:
      return "choose another name; an existing file is never overwritten";
    case ENAMETOOLONG:
      return "choose a shorter name";
    default:
      return "check the disk and try again";
  }
}

// An old kernel or file system that has no rename without replacing has hard links, which never replace either.
int move_without_replacing(const std::string& from, const std::string& to) {
  if (::renameat2(AT_FDCWD, from.c_str(), AT_FDCWD, to.c_str(), RENAME_NOREPLACE) == 0) return 0;
  if (errno != EINVAL && errno != ENOSYS) return errno;
  if (::link(from.c_str(), to.c_str()) != 0) return errno;
  ::unlink(from.c_str());
  return 0;
}

int sync_folder(const std::string& folder) {
  const int descriptor = ::open(folder.c_str(), O_RDONLY | O_DIRECTORY | O_CLOEXEC);
  if (descriptor < 0) return errno;
  // A file system that can't sync a folder says EINVAL; it has nothing to sync then.
  const int number = ::fsync(descriptor) == 0 || errno == EINVAL ? 0 : errno;
  ::close(descriptor);
  return number;
}

}  // namespace

PathParts parts_of(const std::string& path) {
  const std::size_t slash = path.rfind('/');
  if (slash == std::string::npos) return {".", path};
  return {slash == 0 ? "/" : path.substr(0, slash), path.substr(slash + 1)};
}

Error system_error(const std::string& path, const std::string& what, int number) {
  const ErrorKind kind = number == EEXIST ? ErrorKind::kExists : ErrorKind::kIo;
  return {kind, shown_path(path) + ": " + what + " (" + std::strerror(number) + "); " + advice(number)};
}

Result<NewFile> NewFile::beside(const std::string& path) {
  const PathParts parts = parts_of(path);
  if (parts.name.empty() || parts.name == "." || parts.name == "..") {
    return Error(ErrorKind::kBadInput, shown_path(path) + ": names no file; give a file name");
  }
  const std::unique_ptr<char, decltype(&::free)> folder(::realpath(parts.folder.c_str(), nullptr), &::free);
  if (!folder) return system_error(path, "can't be made", errno);
  std::string written = std::string(folder.get()) + "/.nearpit-XXXXXX";
  const int descriptor = ::mkostemp(written.data(), O_CLOEXEC);
  if (descriptor < 0) return system_error(path, "can't be made", errno);
  NewFile file(path, folder.get(), written, descriptor);
  if (::fchmod(descriptor, S_IRUSR | S_IWUSR) != 0 && errno != EPERM) {
    return system_error(path, "can't be made private", errno);
  }
  return file;
}

NewFile::NewFile(std::string path, std::string folder, std::string written, int descriptor)
    : path_(std::move(path)),
      folder_(std::move(folder)),
      target_(folder_ + "/" + parts_of(path_).name),
      written_(std::move(written)),
      descriptor_(descriptor) {}

NewFile::NewFile(NewFile&& other) noexcept
    : path_(std::move(other.path_)),
      folder_(std::move(other.folder_)),
      target_(std::move(other.target_)),
      written_(std::exchange(other.written_, {})),
      descriptor_(std::exchange(other.descriptor_, -1)) {}

NewFile::~NewFile() { discard(); }

void NewFile::discard() {
  if (descriptor_ >= 0) ::close(std::exchange(descriptor_, -1));
  if (written_.empty()) return;
  ::unlink(written_.c_str());
  ::unlink((written_ + "-journal").c_str());
  written_.clear();
}

Status NewFile::write(const std::string& text) {
  std::size_t done = 0;
  while (done < text.size()) {
    const ssize_t count = ::write(descriptor_, text.data() + done, text.size() - done);
    if (count < 0 && errno == EINTR) continue;
    if (count < 0) return system_error(path_, "can't be written", errno);
    done += static_cast<std::size_t>(count);
  }
  return ok_status();
}

Status NewFile::sync() {
  if (::fsync(descriptor_) != 0) return system_error(path_, "can't be written", errno);
  if (::close(std::exchange(descriptor_, -1)) != 0) return system_error(path_, "can't be written", errno);
  return ok_status();
}

Status NewFile::settle() {
  written_.clear();
  const int number = sync_folder(folder_);
  if (number != 0) return system_error(path_, "its folder can't be synced", number);
  return ok_status();
}

Status NewFile::place_new() {
  NEARPIT_TRY(sync());
  const int number = move_without_replacing(written_, target_);
  if (number == EEXIST) {
    return Error(ErrorKind::kExists, shown_path(path_) + ": exists already; choose another name");
  }
  if (number != 0) return system_error(path_, "can't be made", number);
  Status settled = settle();
  if (!settled) ::unlink(target_.c_str());
  return settled;
}

Status NewFile::replace() {
  NEARPIT_TRY(sync());
  if (::rename(written_.c_str(), target_.c_str()) != 0) return system_error(path_, "can't be written", errno);
  return settle();
}

}  // namespace nearpit::store
