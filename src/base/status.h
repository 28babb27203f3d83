// Errors as values between layers. A function that can fail returns Result<T>, or Status when it has nothing to
// hand back. The text is for the person at the screen: one line that says what is wrong, where (file, line, field),
// the offending value, what is legal and what to do.
#ifndef NEARPIT_BASE_STATUS_H_
#define NEARPIT_BASE_STATUS_H_

#include <string>
#include <utility>
#include <variant>
#include <vector>

namespace nearpit {

// A small closed set; a caller decides by kind, a person reads the lines.
enum class ErrorKind {
  kBadInput,  // a plan, table or action that cannot be taken as it is
  kNotFound,  // a named file or thing that is not there
  kExists,    // a file that would be overwritten
  kConflict,  // the survey's present state refuses the change
  kIo,        // the disk or the operating system refused
  kDamaged,   // a survey file that is not whole
  kTooNew,    // a survey file of a later program
  kInternal,  // our own mistake
};

// At least one line; further lines are further findings of the same input.
struct Error {
  ErrorKind kind = ErrorKind::kInternal;
  std::vector<std::string> lines;

  Error(ErrorKind error_kind, std::string line) : kind(error_kind), lines{std::move(line)} {}
  Error(ErrorKind error_kind, std::vector<std::string> all) : kind(error_kind), lines(std::move(all)) {}

  // The first line, with 'and n more' when there are others.
  std::string one_line() const;
};

// Either a value or an Error. Reading the wrong side is our own mistake and ends the program.
template <class T>
class [[nodiscard]] Result {
 public:
  Result(T value) : held_(std::in_place_index<0>, std::move(value)) {}
  Result(Error error) : held_(std::in_place_index<1>, std::move(error)) {}

  bool ok() const { return held_.index() == 0; }
  explicit operator bool() const { return ok(); }

  T& value() & { return std::get<0>(held_); }
  const T& value() const& { return std::get<0>(held_); }
  T&& value() && { return std::get<0>(std::move(held_)); }
  T& operator*() & { return value(); }
  const T& operator*() const& { return value(); }
  T&& operator*() && { return std::move(*this).value(); }
  T* operator->() { return &value(); }
  const T* operator->() const { return &value(); }

  const Error& error() const { return std::get<1>(held_); }

 private:
  std::variant<T, Error> held_;
};

struct Done {};
using Status = Result<Done>;
inline Status ok_status() { return Status(Done{}); }

}  // namespace nearpit

// Hands an error on to the caller; otherwise goes on. `expr` is a Result or Status.
#define NEARPIT_TRY(expr)                                       \
  do {                                                          \
    auto nearpit_try_result = (expr);                           \
    if (!nearpit_try_result) return nearpit_try_result.error(); \
  } while (false)

// Hands an error on; otherwise declares `name` with the value.
#define NEARPIT_ASSIGN(name, expr)                  \
  auto name##_result = (expr);                      \
  if (!name##_result) return name##_result.error(); \
  auto name = std::move(name##_result).value()

#endif  // NEARPIT_BASE_STATUS_H_
