#include "record/revision.h"

#include <gtest/gtest.h>

#include <functional>
#include <limits>
#include <set>
#include <string>
#include <vector>

#include "base/sha256.h"

namespace nearpit {
namespace {

Revision example() {
  Revision revision;
  revision.id = "0190a1b2-0000-7000-8000-000000000001";
  revision.writer = "0190a1b2-0000-7000-8000-0000000000aa";
  revision.seq = 2;
  revision.clock = 65536;
  revision.by = "A. Reyes";
  revision.at = {1000, -240};
  revision.object = "pit/T7-12";
  revision.body = R"({"pit":"T7-12"})";
  revision.why = "";
  revision.parents = {"p1", "p22"};
  return revision;
}

// Derived: each field led by its length in bytes. The form is frozen, for files hold these hashes.
TEST(Revision, ChainHashIsThatOfAllFieldsWithTheirLengths) {
  const std::string input =
      "4:last"
      "36:0190a1b2-0000-7000-8000-000000000001"
      "36:0190a1b2-0000-7000-8000-0000000000aa"
      "1:25:655368:A. Reyes4:10004:-2409:pit/T7-1215:{\"pit\":\"T7-12\"}0:1:22:p13:p22";
  EXPECT_EQ(chain_hash("last", example()), sha256_hex(input));
}

TEST(Revision, ChainHashChangesWithEveryField) {
  const std::vector<std::function<void(Revision*)>> changes{
      [](Revision* r) { r->id.back() = '2'; },
      [](Revision* r) { r->writer.back() = 'b'; },
      [](Revision* r) { r->seq = 3; },
      [](Revision* r) { r->clock += 1; },
      [](Revision* r) { r->by = "A. Reye"; },
      [](Revision* r) { r->at.utc_ms += 1; },
      [](Revision* r) { r->at.offset_min = -180; },
      [](Revision* r) { r->object = "pit/T7-13"; },
      [](Revision* r) { r->body += " "; },
      [](Revision* r) { r->why = "slip"; },
      [](Revision* r) { r->parents.pop_back(); },
      [](Revision* r) { r->parents[0] = "p2"; },
      [](Revision* r) { r->parents = {"p1p22"}; },
      [](Revision* r) {
        r->parents = {"p1", "p2", "2"};
      },
      // The same bytes in other fields.
      [](Revision* r) { r->by = "A. Reyesp", r->object = "it/T7-12"; },
      [](Revision* r) { r->why = r->body, r->body = ""; },
  };
  std::set<std::string> hashes{chain_hash("last", example()), chain_hash("", example()), chain_hash("las", example())};
  ASSERT_EQ(hashes.size(), 3u);
  for (std::size_t i = 0; i < changes.size(); ++i) {
    Revision changed = example();
    changes[i](&changed);
    EXPECT_TRUE(hashes.insert(chain_hash("last", changed)).second) << "change " << i;
  }
}

TEST(Revision, ChainHashDoesNotDependOnTheHashItself) {
  Revision hashed = example();
  hashed.hash = chain_hash("last", hashed);
  EXPECT_EQ(chain_hash("last", hashed), hashed.hash);
}

// Kulkarni et al. 2014: follows the wall clock, never falls, and rises when the wall clock stands or goes back.
TEST(Revision, ClockFollowsTheWallAndAlwaysRises) {
  EXPECT_EQ(next_clock(0, 5), 5 * 65536);
  EXPECT_EQ(next_clock(5 * 65536, 5), 5 * 65536 + 1);
  EXPECT_EQ(next_clock(9 * 65536 + 7, 5), 9 * 65536 + 8);
  EXPECT_EQ(next_clock(5 * 65536 + 65535, 5), 6 * 65536);
  EXPECT_EQ(next_clock(5 * 65536 + 7, 6), 6 * 65536);
  std::int64_t last = 0;
  for (const std::int64_t wall : {100, 100, 90, 0, -50, 101, 101}) {
    const std::int64_t next = next_clock(last, wall);
    EXPECT_GT(next, last);
    EXPECT_GE(next, wall * 65536);
    last = next;
  }
}

TEST(Revision, ClockStopsAtItsEndInsteadOfTurningOver) {
  constexpr std::int64_t kMost = std::numeric_limits<std::int64_t>::max();
  EXPECT_EQ(next_clock(kMost, 0), kMost);
  EXPECT_EQ(next_clock(kMost - 1, 0), kMost);
  EXPECT_GT(next_clock(0, kMost), 0);
}

TEST(Revision, ObjectsSayWhatTheyAre) {
  EXPECT_EQ(pit_object("T7-12"), "pit/T7-12");
  EXPECT_TRUE(is_pit_object("pit/J1"));
  EXPECT_FALSE(is_pit_object("pits/J1"));
  EXPECT_TRUE(is_area_object("area/x"));
  EXPECT_FALSE(is_area_object("pit/area/x"));
  EXPECT_TRUE(is_stop_object("stop/x"));
  EXPECT_FALSE(is_stop_object("stop"));
  EXPECT_EQ(object_name("pit/T7-12"), "T7-12");
  EXPECT_EQ(object_name("pit/J1/a"), "J1/a");
  EXPECT_EQ(object_name("pit"), "");
}

}  // namespace
}  // namespace nearpit
