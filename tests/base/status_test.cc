#include "base/status.h"

#include <gtest/gtest.h>

#include <memory>

namespace nearpit {
namespace {

Result<int> half(int number) {
  if (number % 2 != 0) return Error(ErrorKind::kBadInput, std::to_string(number) + " is odd");
  return number / 2;
}

Status check_twice_even(int number) {
  NEARPIT_ASSIGN(once, half(number));
  NEARPIT_TRY(half(once));
  return ok_status();
}

TEST(Status, OneLineSaysHowManyFollow) {
  EXPECT_EQ(Error(ErrorKind::kIo, "disk full").one_line(), "disk full");
  EXPECT_EQ(Error(ErrorKind::kBadInput, std::vector<std::string>{"a", "b"}).one_line(), "a (and 1 more)");
  EXPECT_EQ(Error(ErrorKind::kBadInput, std::vector<std::string>{"a", "b", "c"}).one_line(), "a (and 2 more)");
  EXPECT_FALSE(Error(ErrorKind::kInternal, std::vector<std::string>{}).one_line().empty());
}

TEST(Status, HoldsAValueOrAnError) {
  ASSERT_TRUE(half(8).ok());
  EXPECT_EQ(*half(8), 4);
  ASSERT_FALSE(half(7).ok());
  EXPECT_EQ(half(7).error().kind, ErrorKind::kBadInput);
  EXPECT_EQ(half(7).error().one_line(), "7 is odd");
}

TEST(Status, MacrosHandTheErrorOn) {
  EXPECT_TRUE(check_twice_even(8).ok());
  EXPECT_EQ(check_twice_even(6).error().one_line(), "3 is odd");
  EXPECT_EQ(check_twice_even(5).error().one_line(), "5 is odd");
}

TEST(Status, HandsOverWhatCanOnlyBeMoved) {
  Result<std::unique_ptr<int>> held(std::make_unique<int>(5));
  const std::unique_ptr<int> taken = std::move(held).value();
  EXPECT_EQ(*taken, 5);
}

TEST(Status, TheWrongSideThrows) {
  EXPECT_THROW((void)half(7).value(), std::bad_variant_access);
  EXPECT_THROW((void)half(8).error(), std::bad_variant_access);
}

}  // namespace
}  // namespace nearpit
