// Thompson SK 2012, Sampling, 3rd ed., ch. 24 (input from memory, figures derived): N = 400, n = 10; networks of 6 nodes (total 36) and 11
// nodes (total 107), each met by one drawn node, and eight empty ones.
#ifndef NEARPIT_TESTS_ESTIMATE_TEXTBOOK_PAIR_H_
#define NEARPIT_TESTS_ESTIMATE_TEXTBOOK_PAIR_H_

#include <vector>

#include "estimate/sample_design.h"

namespace nearpit {

struct TextbookPair {
  SampleDesign design{.strata = {{400, 10}}, .drawn = {}, .nodes = 400, .one_node_units = true};
  std::vector<MetNetwork> networks;
  std::vector<double> y{36, 107, 0, 0, 0, 0, 0, 0, 0, 0};

  TextbookPair() {
    std::uint32_t next = 0;
    for (const std::uint32_t size : {6u, 11u, 1u, 1u, 1u, 1u, 1u, 1u, 1u, 1u}) {
      design.drawn.push_back({0, next});
      networks.emplace_back();
      for (std::uint32_t i = 0; i < size; ++i)
        networks.back().units.push_back({0, next++});
    }
  }
};

}  // namespace nearpit

#endif  // NEARPIT_TESTS_ESTIMATE_TEXTBOOK_PAIR_H_
