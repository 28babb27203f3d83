#include "base/numbers.h"

#include <gtest/gtest.h>

#include <clocale>
#include <cmath>
#include <cstring>
#include <limits>
#include <locale>

#include "support/test_random.h"

namespace nearpit {
namespace {

TEST(Numbers, ParsesWholeIntegers) {
  EXPECT_EQ(parse_int("0"), 0);
  EXPECT_EQ(parse_int("-17"), -17);
  EXPECT_EQ(parse_int("007"), 7);
  EXPECT_EQ(parse_int("9223372036854775807"), std::numeric_limits<std::int64_t>::max());
  EXPECT_EQ(parse_int("-9223372036854775808"), std::numeric_limits<std::int64_t>::min());
}

TEST(Numbers, RefusesWhatIsNotAWholeInteger) {
  for (const char* text : {"", " ", " 1", "1 ", "+1", "1.0", "1e3", "0x10", "9223372036854775808", "-", "--1", "12a"}) {
    EXPECT_FALSE(parse_int(text)) << '"' << text << '"';
  }
}

TEST(Numbers, ParsesDoubles) {
  EXPECT_EQ(parse_double("0"), 0.0);
  EXPECT_EQ(parse_double("-2.5"), -2.5);
  EXPECT_EQ(parse_double("1e3"), 1000.0);
  EXPECT_EQ(parse_double("1E-3"), 0.001);
  EXPECT_EQ(parse_double("0.1"), 0.1);
  EXPECT_EQ(parse_double("4503599627370497.5"), 4503599627370497.5);
  EXPECT_EQ(parse_double("1.7976931348623157e308"), std::numeric_limits<double>::max());
}

TEST(Numbers, RefusesWhatIsNotAWholeFiniteNumber) {
  for (const char* text : {"",         " ",   " 1",  "1 ",  "+1",    "1,5", "1.5m", "0x10", "0x1p3", "inf",  "-inf",
                           "infinity", "INF", "nan", "NaN", "1e999", ".",   "-",    "e5",   "1e",    "1.2.3"}) {
    EXPECT_FALSE(parse_double(text)) << '"' << text << '"';
  }
}

TEST(Numbers, ShortestTextReadsBack) {
  EXPECT_EQ(format_double(0.1), "0.1");
  EXPECT_EQ(format_double(10), "10");
  EXPECT_EQ(format_double(-2.5), "-2.5");
  EXPECT_EQ(format_double(1.0 / 3), "0.3333333333333333");
}

TEST(Numbers, EveryDoubleReadsBackToTheBit) {
  TestRandom random = TestRandom::of_this_run();
  for (int i = 0; i < rounds(20'000); ++i) {
    std::uint64_t bits = 0;
    for (int part = 0; part < 4; ++part)
      bits = bits << 16U | static_cast<std::uint64_t>(random.between(0, 65535));
    double value = 0;
    std::memcpy(&value, &bits, sizeof value);
    if (!std::isfinite(value)) continue;
    const std::optional<double> back = parse_double(format_double(value));
    ASSERT_TRUE(back) << format_double(value);
    ASSERT_EQ(std::memcmp(&*back, &value, sizeof value), 0) << format_double(value);
  }
}

TEST(Numbers, FixedPoint) {
  EXPECT_EQ(format_fixed(12.345, 1), "12.3");
  EXPECT_EQ(format_fixed(12, 2), "12.00");
  EXPECT_EQ(format_fixed(-0.4, 0), "0");
  EXPECT_EQ(format_fixed(-0.004, 2), "0.00");
  EXPECT_EQ(format_fixed(-0.006, 2), "-0.01");
  EXPECT_EQ(format_fixed(-0.0, 3), "0.000");
  EXPECT_EQ(format_fixed(0.125, 2),
            "0.12");  // a tie of exact doubles goes to the even digit (IEEE 754-2019 section 5.12.2)
  EXPECT_EQ(format_fixed(0.375, 2), "0.38");
  EXPECT_EQ(format_fixed(std::numeric_limits<double>::max(), 2).size(), 312U);
}

TEST(Numbers, TrimmedDropsTrailingZeros) {
  EXPECT_EQ(format_trimmed(7.5, 2), "7.5");
  EXPECT_EQ(format_trimmed(7, 2), "7");
  EXPECT_EQ(format_trimmed(100, 2), "100");
  EXPECT_EQ(format_trimmed(100, 0), "100");
  EXPECT_EQ(format_trimmed(0.999, 2), "1");
  EXPECT_EQ(format_trimmed(-0.001, 2), "0");
  EXPECT_EQ(format_trimmed(10.25, 3), "10.25");
}

TEST(Numbers, SignificantFigures) {
  EXPECT_EQ(format_significant(0, 3), "0");
  EXPECT_EQ(format_significant(3.14159, 3), "3.14");
  EXPECT_EQ(format_significant(-3.14159, 3), "-3.14");
  EXPECT_EQ(format_significant(2.5, 4), "2.5");
  EXPECT_EQ(format_significant(0.012345, 2), "0.012");
  EXPECT_EQ(format_significant(123456, 3), "123000");
  EXPECT_EQ(format_significant(9.996, 3), "10");
  EXPECT_EQ(format_significant(0.00099996, 3), "0.001");
  EXPECT_EQ(format_significant(0.0001, 3), "0.0001");
  EXPECT_EQ(format_significant(999'999'999, 9), "999999999");
  EXPECT_EQ(format_significant(100, 1), "100");
}

TEST(Numbers, SignificantFiguresBeyondPlainNotation) {
  EXPECT_EQ(format_significant(1.5e9, 3), "1.5e+09");
  EXPECT_EQ(format_significant(-2.346e-7, 3), "-2.35e-07");
  EXPECT_EQ(format_significant(2e12, 3), "2e+12");
}

class CommaForPoint : public std::numpunct<char> {
  char do_decimal_point() const override { return ','; }
  char do_thousands_sep() const override { return '.'; }
  std::string do_grouping() const override { return "\3"; }
};

void expect_points() {
  EXPECT_EQ(format_fixed(12345.5, 1), "12345.5");
  EXPECT_EQ(format_double(12345.5), "12345.5");
  EXPECT_EQ(format_significant(12345.5, 6), "12345.5");
  EXPECT_EQ(parse_double("12345.5"), 12345.5);
  EXPECT_FALSE(parse_double("12345,5"));
  EXPECT_FALSE(parse_double("12.345,5"));
}

// A person's settings may write a comma: nothing here may notice.
TEST(Numbers, TheLocaleChangesNothing) {
  const std::locale before = std::locale::global(std::locale(std::locale::classic(), new CommaForPoint));
  expect_points();
  std::locale::global(before);
  for (const char* name : {"de_DE.UTF-8", "fr_FR.UTF-8", "nl_NL.UTF-8"}) {  // where the system has them
    if (std::setlocale(LC_ALL, name) != nullptr) expect_points();
  }
  std::setlocale(LC_ALL, "C");
}

}  // namespace
}  // namespace nearpit
