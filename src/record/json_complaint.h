// What is wrong with text that is not JSON (RFC 8259), said for the person who wrote it.
#ifndef NEARPIT_RECORD_JSON_COMPLAINT_H_
#define NEARPIT_RECORD_JSON_COMPLAINT_H_

#include <cstddef>
#include <string>
#include <string_view>

namespace nearpit {

// Where a reader stood when it met the fault.
enum class JsonExpects {
  kDocument,        // nothing read yet
  kEnd,             // the document is complete
  kKeyOrClose,      // after '{'
  kValue,           // after a key
  kElementOrClose,  // after '['
  kInObject,        // after a value in an object
  kInArray,         // after a value in an array
};

struct JsonComplaint {
  std::size_t offset = 0;  // of the offending character; the text's size when it ends too early
  std::string what;        // "expected ',' or '}', found '['"
};

// `after` is the offset just behind the last piece that was well-formed. Cost: the text from there to the fault.
JsonComplaint complain_of_json(std::string_view text, std::size_t after, JsonExpects expects);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_JSON_COMPLAINT_H_
