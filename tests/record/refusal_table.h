// A table of inputs that must be refused: one good text, and changes of it that each make it bad, with the exact lines of the refusal.
#ifndef NEARPIT_TESTS_RECORD_REFUSAL_TABLE_H_
#define NEARPIT_TESTS_RECORD_REFUSAL_TABLE_H_

#include <string>
#include <vector>

namespace nearpit {

struct Refusal {
  std::string text;
  std::vector<std::string> lines;
  bool schema_accepts = false;  // wrong in a way that a schema can't say
};

class RefusalTable {
 public:
  explicit RefusalTable(const std::string& path_in_tree);
  const std::string& base() const { return base_; }
  const std::vector<Refusal>& cases() const { return cases_; }

 private:
  std::string base_;
  std::vector<Refusal> cases_;
};

}  // namespace nearpit

#endif  // NEARPIT_TESTS_RECORD_REFUSAL_TABLE_H_
