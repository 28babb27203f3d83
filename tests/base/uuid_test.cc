#include "base/uuid.h"

#include <gtest/gtest.h>

#include <set>
#include <string>
#include <vector>

#include "support/test_random.h"

namespace nearpit {
namespace {

// RFC 9562 appendix A.6: 2022-02-22T14:22:22-05:00 is 0x017F22E279B0 ms.
constexpr std::int64_t kExampleMs = 1645557742000;

TEST(Uuid, LayoutOfVersion7) {
  UuidSource source;
  for (int i = 0; i < 1000; ++i) {
    const std::string text = source.next(kExampleMs + i * 1000);
    ASSERT_TRUE(is_uuid(text)) << text;
    EXPECT_EQ(std::stoll(text.substr(0, 8) + text.substr(9, 4), nullptr, 16), kExampleMs + i * 1000);
    EXPECT_EQ(text[14], '7') << text;
    EXPECT_NE(std::string("89ab").find(text[19]), std::string::npos) << text;
  }
  EXPECT_EQ(UuidSource().next(kExampleMs).substr(0, 15), "017f22e2-79b0-7");
}

TEST(Uuid, TimesOutside48BitsAreCut) {
  EXPECT_EQ(UuidSource().next(-5).substr(0, 13), "00000000-0000");
  EXPECT_EQ(UuidSource().next(std::int64_t{1} << 60).substr(0, 13), "ffffffff-ffff");
}

TEST(Uuid, OnlyRisesInOneMillisecond) {
  UuidSource source;
  std::string last = source.next(kExampleMs);
  for (int i = 0; i < 20'000; ++i) {  // far more than the counter holds
    const std::string next = source.next(kExampleMs);
    ASSERT_LT(last, next) << "number " << i;
    last = next;
  }
}

TEST(Uuid, OnlyRisesWhateverTheClockDoes) {
  TestRandom random = TestRandom::of_this_run();
  UuidSource source;
  std::string last = source.next(kExampleMs);
  for (int i = 0; i < rounds(5000); ++i) {
    const std::string next = source.next(kExampleMs + random.between(-100'000, 100'000));
    ASSERT_LT(last, next) << "number " << i;
    last = next;
  }
}

TEST(Uuid, SourcesDoNotRepeatEachOther) {
  std::set<std::string> seen;
  for (int i = 0; i < 1000; ++i)
    seen.insert(UuidSource().next(kExampleMs));
  EXPECT_EQ(seen.size(), 1000U);
}

// Each of the 73 bits that are random in a first value comes up near half of the time: 10,000 values, six standard
// deviations of 50.
TEST(Uuid, RandomBitsAreRandom) {
  constexpr int kValues = 10'000;
  std::vector<int> set(128, 0);
  for (int i = 0; i < kValues; ++i) {
    std::string digits;
    for (const char c : UuidSource().next(kExampleMs)) {
      if (c != '-') digits += c;
    }
    for (std::size_t bit = 0; bit < 128; ++bit) {
      const unsigned long digit = std::stoul(digits.substr(bit / 4, 1), nullptr, 16);
      set[bit] += static_cast<int>(digit >> (3 - bit % 4) & 1U);
    }
  }
  for (std::size_t bit = 53; bit < 128; ++bit) {
    if (bit == 64 || bit == 65) continue;  // the variant
    EXPECT_NEAR(set[bit], kValues / 2, 300) << "bit " << bit;
  }
}

TEST(Uuid, TellsItsTextFromOthers) {
  EXPECT_TRUE(is_uuid("017f22e2-79b0-7cc3-98c4-dc0c0c07398f"));  // RFC 9562 appendix A.6
  EXPECT_FALSE(is_uuid("017F22E2-79B0-7CC3-98C4-DC0C0C07398F"));
  EXPECT_FALSE(is_uuid("017f22e279b07cc398c4dc0c0c07398f"));
  EXPECT_FALSE(is_uuid("017f22e2-79b0-7cc3-98c4-dc0c0c07398"));
  EXPECT_FALSE(is_uuid("017f22e2-79b0-7cc3-98c4-dc0c0c07398g"));
  EXPECT_FALSE(is_uuid("017f22e2-79b0-7cc3-98c4-dc0c0c07398f "));
  EXPECT_FALSE(is_uuid("017f22e2079b0-7cc3-98c4-dc0c0c07398f"));
  EXPECT_FALSE(is_uuid("017f22e--79b0-7cc3-98c4-dc0c0c07398f"));
  EXPECT_FALSE(is_uuid(""));
}

}  // namespace
}  // namespace nearpit
