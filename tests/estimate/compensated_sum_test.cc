#include "estimate/compensated_sum.h"

#include <gtest/gtest.h>

namespace nearpit {
namespace {

TEST(CompensatedSum, KeepsWhatALargeTermWouldSwallow) {
  CompensatedSum sum;
  for (const double term : {1.0, 1e100, 1.0, -1e100})
    sum.add(term);
  EXPECT_EQ(sum.value(), 2);
}

TEST(CompensatedSum, TenthsAddUp) {
  CompensatedSum sum;
  for (int i = 0; i < 10'000'000; ++i)
    sum.add(0.1);
  EXPECT_DOUBLE_EQ(sum.value(), 1e6);
}

}  // namespace
}  // namespace nearpit
