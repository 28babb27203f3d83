#include "exchange/text_file.h"

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <cstdint>
#include <system_error>

#include "base/numbers.h"

namespace nearpit {
namespace {

class OpenFile {
 public:
  // Without waiting: a pipe that nobody writes to opens at once and is then refused.
  explicit OpenFile(const std::string& path) : handle_(open(path.c_str(), O_RDONLY | O_CLOEXEC | O_NONBLOCK)) {}
  ~OpenFile() {
    if (handle_ >= 0) close(handle_);
  }
  OpenFile(const OpenFile&) = delete;
  OpenFile& operator=(const OpenFile&) = delete;
  int handle() const { return handle_; }

 private:
  int handle_;
};

std::string words_of(int number) { return std::generic_category().message(number); }

Error not_opened(const std::string& path, int number) {
  if (number == ENOENT || number == ENOTDIR) return {ErrorKind::kNotFound, path + ": there is no such file"};
  if (number == ENXIO) return {ErrorKind::kBadInput, path + ": is not a file; name a file"};
  return {ErrorKind::kIo, path + ": can't be opened: " + words_of(number)};
}

// In MiB where that tells the two apart, else in bytes.
Error too_long(const std::string& path, std::uint64_t size, std::size_t most) {
  constexpr double kMiB = 1 << 20;
  std::string is = format_trimmed(static_cast<double>(size) / kMiB, 1);
  std::string limit = format_trimmed(static_cast<double>(most) / kMiB, 1);
  std::string unit = " MiB";
  if (is == limit || most < (1u << 20)) {
    is = std::to_string(size);
    limit = std::to_string(most);
    unit = " bytes";
  }
  return {ErrorKind::kBadInput,
          path + ": " + is + unit + ", more than the " + limit + unit + " that are read; make it smaller"};
}

}  // namespace

Result<std::string> read_text_file(const std::string& path, std::size_t most) {
  // The system would read the path only up to the NUL.
  if (path.empty() || path.find('\0') != std::string::npos) {
    return Error(ErrorKind::kNotFound, "the file's name is empty or holds a NUL; name a file");
  }
  const OpenFile file(path);
  if (file.handle() < 0) return not_opened(path, errno);
  struct stat facts {};
  if (fstat(file.handle(), &facts) != 0) return Error(ErrorKind::kIo, path + ": can't be read: " + words_of(errno));
  if (S_ISDIR(facts.st_mode)) return Error(ErrorKind::kBadInput, path + ": is a folder; name a file");
  if (!S_ISREG(facts.st_mode)) return Error(ErrorKind::kBadInput, path + ": is not a regular file; name a file");
  const auto size = static_cast<std::uint64_t>(facts.st_size);
  if (size > most) return too_long(path, size, most);

  // The file may still grow, and some files say that they are empty: what is read counts.
  std::string text;
  std::string piece(1u << 16, '\0');
  for (;;) {
    const ssize_t got = read(file.handle(), piece.data(), piece.size());
    if (got < 0 && errno == EINTR) continue;
    if (got < 0) return Error(ErrorKind::kIo, path + ": can't be read: " + words_of(errno));
    if (got == 0) return text;
    text.append(piece, 0, static_cast<std::size_t>(got));
    if (text.size() > most) return too_long(path, text.size(), most);
  }
}

}  // namespace nearpit
