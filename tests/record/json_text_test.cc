#include "record/json_text.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <string>

namespace nearpit {
namespace {

std::string refusal(std::string_view text, const JsonLimits& limits = {}) {
  const auto document = read_json(text, "x.json", limits);
  if (document) return "";
  EXPECT_EQ(document.error().lines.size(), 1u);
  return document.error().one_line();
}

JsonDocument read(std::string_view text) {
  auto document = read_json(text, "x.json");
  EXPECT_TRUE(document.ok()) << document.error().one_line();
  return document ? std::move(document).value() : JsonDocument{};
}

TEST(JsonText, KeepsEveryKindOfValueInOrder) {
  const JsonDocument document = read(R"({"z": [1, -2, 2.5, true, false, null, "ü\n"], "a": {}})");
  EXPECT_EQ(document.value.dump(), R"({"z":[1,-2,2.5,true,false,null,"ü\n"],"a":{}})");
}

TEST(JsonText, SaysTheLineOfEveryValue) {
  const JsonDocument document = read(
      "{\n"                     // 1
      "  \"a\": 1,\n"           // 2
      "  \"b\": {\n"            // 3
      "    \"c\": [10,\n"       // 4
      "          20,\n"         // 5
      "          {\"d\":\n"     // 6
      "           \"e\"}],\n"   // 7
      "    \"f\": true\n"       // 8
      "  }, \"g\":\n\n [\n]\n"  // 9 to 12
      "}\n");
  EXPECT_EQ(document.line(""), 1);
  EXPECT_EQ(document.line("/a"), 2);
  EXPECT_EQ(document.line("/b"), 3);
  EXPECT_EQ(document.line("/b/c"), 4);
  EXPECT_EQ(document.line("/b/c/0"), 4);
  EXPECT_EQ(document.line("/b/c/1"), 5);
  EXPECT_EQ(document.line("/b/c/2"), 6);
  EXPECT_EQ(document.line("/b/c/2/d"), 7);
  EXPECT_EQ(document.key_line("/b/c/2/d"), 6);
  EXPECT_EQ(document.line("/b/f"), 8);
  EXPECT_EQ(document.line("/g"), 11);
  EXPECT_EQ(document.key_line("/g"), 9);
  EXPECT_EQ(document.line("/b/nothing"), 3);
  EXPECT_EQ(document.line("/b/c/2/d/deeper"), 7);
}

// A number is known to end only when the next character is seen, which may be on another line.
TEST(JsonText, NumberBeforeALineFeedStandsOnItsOwnLine) {
  const JsonDocument document = read("[1\n,2.5e3\n\n,\n-3\r\n,0\n]");
  EXPECT_EQ(document.line("/0"), 1);
  EXPECT_EQ(document.line("/1"), 2);
  EXPECT_EQ(document.line("/2"), 5);
  EXPECT_EQ(document.line("/3"), 6);
  EXPECT_EQ(read("17").line(""), 1);
  EXPECT_EQ(read("\n\n17\n\n").line(""), 3);
}

TEST(JsonText, PointersEscapeTildeAndSlash) {
  const JsonDocument document = read("{\n\"a/b~c\":\n1}");
  EXPECT_EQ(document.line("/a~1b~0c"), 3);
  EXPECT_EQ(document.key_line("/a~1b~0c"), 2);
}

TEST(JsonText, BelowDepthSixTheLineIsThatOfTheValueAround) {
  const JsonDocument document = read("[[[[[[[\n7]]]]]]]");
  EXPECT_EQ(document.line("/0/0/0/0/0/0/0"), 1);
  EXPECT_EQ(read("[[[[[[\n[\n7]]]]]]]").line("/0/0/0/0/0/0/0"), 2);
}

TEST(JsonText, TakesAByteOrderMark) { EXPECT_EQ(read("\xEF\xBB\xBF[1]").value.dump(), "[1]"); }

TEST(JsonText, RefusesAKeyGivenTwice) {
  EXPECT_EQ(refusal("{\"a\": 1,\n \"b\": 2,\n \"a\": 3}"),
            "x.json:3: the key \"a\" stands twice in one object, first on line 1; take one out");
  EXPECT_EQ(refusal("{\"a\": {\"a\": 1}, \"b\": [{\"a\": 1}, {\"a\": 2}]}"), "");
  EXPECT_EQ(refusal("{\"caf\\u00e9\": 1, \"café\": 2}"),
            "x.json:1: the key \"café\" stands twice in one object, first on line 1; take one out");
}

TEST(JsonText, RefusesMillionfoldNestingWithoutFollowingIt) {
  const std::string lists(1'000'000, '[');
  EXPECT_EQ(refusal(lists), "x.json:1: values stand more than 64 deep in one another; make it flatter");
  std::string objects;
  for (int i = 0; i < 1'000'000; ++i)
    objects += "{\"a\":";
  EXPECT_EQ(refusal(objects), "x.json:1: values stand more than 64 deep in one another; make it flatter");
  const auto nested = [](int depth) {
    return std::string(static_cast<std::size_t>(depth), '[') + std::string(static_cast<std::size_t>(depth), ']');
  };
  EXPECT_EQ(refusal(nested(64)), "");
  EXPECT_NE(refusal(nested(65)), "");
}

TEST(JsonText, RefusesTooMuch) {
  JsonLimits limits;
  limits.elements = 3;
  EXPECT_EQ(refusal("[1,\n2]", limits), "");
  EXPECT_EQ(refusal("[1,\n2,\n3]", limits), "x.json:3: more than 3 values; make the file smaller");
  limits.bytes = 5;
  EXPECT_EQ(refusal("[1,2]", limits), "");
  EXPECT_EQ(refusal("[1,2] ", limits), "x.json:1: 6 bytes are more than the 5 that are read; make the file smaller");
}

// Objects are filled without a search, or this would take hours.
TEST(JsonText, ReadsAnObjectOfManyKeys) {
  std::string text = "{";
  for (int i = 0; i < 300'000; ++i)
    text += (i > 0 ? ",\"k" : "\"k") + std::to_string(i) + "\":1";
  EXPECT_EQ(read(text + "}").value.size(), 300'000u);
}

TEST(JsonText, RefusesWhatIsNotUtf8) {
  EXPECT_EQ(refusal("[1,\n\"\xE9\"]"), "x.json:2: not UTF-8; save the file as UTF-8");
  EXPECT_EQ(refusal("\n\n\xFF\xFE"), "x.json:3: not UTF-8; save the file as UTF-8");
  EXPECT_EQ(refusal("[\"\xC3"), "x.json:1: not UTF-8; save the file as UTF-8");
}

struct BadText {
  const char* text;
  const char* line;
};

TEST(JsonText, SaysWhatIsNotJson) {
  const BadText cases[] = {
      {"", "1: not JSON: the file is empty"},
      {"\n \n", "3: not JSON: the file is empty"},
      {"survey", "1: not JSON: expected '{' or '[', found \"survey\""},
      {"{\n\"a\": 1\n\"b\": 2}", "3: not JSON: expected ',' or '}', found a text in quotes"},
      {"{\"a\": 1", "1: not JSON: expected ',' or '}', found the end of the file"},
      {"{\"a\": 1,\n}", "1: not JSON: a ',' stands before '}'; take it out"},
      {"{\"a\": [1,2\n,]}", "2: not JSON: a ',' stands before ']'; take it out"},
      {"[1 2]", "1: not JSON: expected ',' or ']', found \"2\""},
      {"{a: 1}", "1: not JSON: expected a key in quotes or '}', found \"a\""},
      {"{\"a\": 1, b: 2}", "1: not JSON: expected a key in quotes, found \"b\""},
      {"{\"a\" 1}", "1: not JSON: expected ':' after a key, found \"1\""},
      {"{\"a\":\n}", "2: not JSON: expected a value, found \"}\""},
      {"{\"a\": nul}", "1: not JSON: expected a value, found \"nul\""},
      {"{\"a\": True}", "1: not JSON: expected a value, found \"True\""},
      {"{\"a\": NaN}", "1: not JSON: expected a value, found \"NaN\""},
      {"{'a': 1}", "1: not JSON: expected a key in quotes or '}', found \"'\""},
      {"[1,\n // two\n 2]", "2: not JSON: comments have no place in JSON; take it out"},
      {"{\n/* a */ \"a\": 1}", "2: not JSON: comments have no place in JSON; take it out"},
      {"{\"a\": .5}", "1: not JSON: expected a value, found \".\""},
      {"{\"a\": 1.}", "1: not JSON: a number is not written as JSON has it (such as 7, -0.5 or 1e3)"},
      {"{\"a\": -}", "1: not JSON: a number is not written as JSON has it (such as 7, -0.5 or 1e3)"},
      {"{\"a\": 01}", "1: not JSON: expected ',' or '}', found \"1\""},
      {"[1,\n1e999]", "2: not JSON: a number is too large to be kept"},
      {"[\"a\nb\"]", "1: not JSON: a text in quotes is not closed on its line; close it with '\"'"},
      {"[\"a", "1: not JSON: a text in quotes is not closed; close it with '\"'"},
      {"[\"a\tb\"]", "1: not JSON: a text in quotes holds a control character or tab; write it as \\t or \\u00XX"},
      {"[\"C:\\dig\\new\"]",
       "1: not JSON: a '\\' in a text in quotes begins no escape that JSON has; write \\\\ for a '\\'"},
      {"[\"\\u12\"]", "1: not JSON: \\u wants four hexadecimal digits"},
      {"[\"\\ud800\"]", "1: not JSON: a \\u escape is one half of a pair without the other"},
      {"{\"a\\q\": 1}",
       "1: not JSON: a '\\' in a text in quotes begins no escape that JSON has; write \\\\ for a '\\'"},
      {"[1]\n]", "2: not JSON: text stands behind the end of the document, found \"]\"; take it out"},
      {"{}\n\n{}", "3: not JSON: text stands behind the end of the document, found \"{\"; take it out"},
      {"[“a”]", "1: not JSON: expected a value or ']', found \"“\""},
  };
  for (const BadText& bad : cases)
    EXPECT_EQ(refusal(bad.text), std::string("x.json:") + bad.line) << bad.text;
}

// Whatever is cut off or changed, the answer is a document or one line that begins with the file and a line of it.
TEST(JsonText, EveryCutAndEveryChangedByteIsReadOrRefusedInOneLine) {
  const std::string good = "{\"a\": [1, -2.5e3, \"\\u00e9\\ud83d\\ude00\"],\n \"b\": {\"c\": null, \"d\": true}}";
  ASSERT_EQ(refusal(good), "");
  int refused = 0;
  const auto check = [&](const std::string& text) {
    const std::string line = refusal(text);
    if (line.empty()) return;
    ++refused;
    EXPECT_THAT(line, testing::ContainsRegex("^x\\.json:[123]: ."));
    EXPECT_THAT(line, testing::Not(testing::HasSubstr("\n")));
  };
  for (std::size_t i = 0; i < good.size(); ++i) {
    check(good.substr(0, i));
    for (const char c : std::string("\0\x01\n\"\\{}[],:0-e./x\xC3\xFF ", 20)) {
      std::string changed = good;
      changed[i] = c;
      check(changed);
    }
  }
  EXPECT_GT(refused, 500);
}

}  // namespace
}  // namespace nearpit
