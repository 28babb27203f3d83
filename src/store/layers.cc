#include "store/layers.h"

#include <algorithm>

namespace nearpit {
namespace {

bool same(const Polygon& a, const Polygon& b) { return a.outer == b.outer && a.holes == b.holes; }

}  // namespace

bool operator==(const ClusterRow& a, const ClusterRow& b) {
  return a.label == b.label && a.pits == b.pits && a.in_first_sample == b.in_first_sample && a.area_m2 == b.area_m2 &&
         a.closed == b.closed && a.finds == b.finds &&
         std::equal(a.outline.begin(), a.outline.end(), b.outline.begin(), b.outline.end(), same);
}

}  // namespace nearpit
