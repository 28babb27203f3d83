// One layer of the file against what it should hold.
#ifndef NEARPIT_STORE_LAYER_CHECK_H_
#define NEARPIT_STORE_LAYER_CHECK_H_

#include <cstddef>
#include <string>
#include <vector>

#include "store/file_check.h"
#include "store/layer_tables.h"
#include "store/sqlite_handle.h"

namespace nearpit::store {

// Collects findings, at most `most`; the rest is counted and becomes one finding of its own.
class Findings {
 public:
  explicit Findings(std::size_t most) : most_(most) {}
  void add(FileProblem problem);
  // `what` is left out of the last one: "and 12 more".
  void move_to(std::vector<FileProblem>& out, const std::string& kind, const std::string& where);

 private:
  std::size_t most_;
  std::size_t all_ = 0;
  std::vector<FileProblem> kept_;
};

void compare_layer(Connection& db, const LayerContent& expected, Findings& findings);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_LAYER_CHECK_H_
