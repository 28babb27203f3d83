#include "session/log_fold.h"

#include <gtest/gtest.h>

#include <map>
#include <set>
#include <string>
#include <utility>
#include <vector>

#include "support/test_random.h"

namespace nearpit {
namespace {

Revision revision(const std::string& id, std::int64_t clock, const std::string& object,
                  std::vector<std::string> parents = {}) {
  Revision made;
  made.id = id;
  made.clock = clock;
  made.writer = "w";
  made.object = object;
  made.body = "body of " + id;
  made.parents = std::move(parents);
  return made;
}

std::set<std::string> head_ids(const LogFold& log, const std::string& object) {
  std::set<std::string> ids;
  for (const LogHead& head : log.heads(object))
    ids.insert(head.revision);
  return ids;
}

TEST(LogFold, ACorrectionReplacesItsParent) {
  LogFold log;
  log.add(revision("a", 1, "pit/T1-1"));
  log.add(revision("b", 2, "pit/T1-1", {"a"}));
  EXPECT_EQ(head_ids(log, "pit/T1-1"), (std::set<std::string>{"b"}));
  EXPECT_EQ(log.heads("pit/T1-1").front().body, "body of b");
  EXPECT_EQ(log.largest_clock(), 2);
  EXPECT_EQ(log.revisions(), 2);
}

TEST(LogFold, AParentThatComesLateIsNoHead) {
  LogFold log;
  log.add(revision("b", 2, "pit/T1-1", {"a"}));
  log.add(revision("a", 1, "pit/T1-1"));
  EXPECT_EQ(head_ids(log, "pit/T1-1"), (std::set<std::string>{"b"}));
}

TEST(LogFold, TwoThatDoNotKnowEachOtherAreTwoHeadsUntilOneNamesBoth) {
  LogFold log;
  log.add(revision("a", 1, "pit/T1-1"));
  log.add(revision("b", 2, "pit/T1-1", {"a"}));
  log.add(revision("c", 3, "pit/T1-1", {"a"}));
  EXPECT_EQ(head_ids(log, "pit/T1-1"), (std::set<std::string>{"b", "c"}));
  log.add(revision("d", 4, "pit/T1-1", {"b", "c"}));
  EXPECT_EQ(head_ids(log, "pit/T1-1"), (std::set<std::string>{"d"}));
}

TEST(LogFold, SaysWhichObjectsChangedOnce) {
  LogFold log;
  log.add(revision("a", 1, "pit/T1-1"));
  log.add(revision("b", 2, "area/x"));
  EXPECT_EQ(log.take_changed(), (std::set<std::string>{"area/x", "pit/T1-1"}));
  EXPECT_TRUE(log.take_changed().empty());
  EXPECT_TRUE(log.heads("pit/T9-9").empty());
}

// A random history: each revision of an object replaces some of the heads that its writer happened to know.
std::vector<Revision> random_history(TestRandom& random) {
  std::vector<Revision> history;
  std::map<std::string, std::vector<std::string>> known;
  for (int i = 0; i < 40; ++i) {
    const std::string object = "pit/T1-" + std::to_string(random.between(1, 4));
    std::vector<std::string> parents;
    for (const std::string& id : known[object]) {
      if (random.chance(0.5)) parents.push_back(id);
    }
    history.push_back(revision("r" + std::to_string(i), i, object, parents));
    known[object].push_back(history.back().id);
  }
  return history;
}

// Law: heads are those that nobody names, whatever the order of arrival.
TEST(LogFoldRandom, AnyOrderOfArrivalGivesTheSameHeads) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(300); ++round) {
    std::vector<Revision> history = random_history(random);
    std::map<std::string, std::set<std::string>> expected;
    std::set<std::string> named;
    for (const Revision& each : history)
      named.insert(each.parents.begin(), each.parents.end());
    for (const Revision& each : history) {
      if (!named.contains(each.id)) expected[each.object].insert(each.id);
    }
    for (std::size_t left = history.size(); left > 1; --left) {
      std::swap(history[left - 1], history[static_cast<std::size_t>(random.between(0, static_cast<int>(left) - 1))]);
    }
    LogFold log;
    for (const Revision& each : history)
      log.add(each);
    for (const auto& [object, heads] : expected) {
      ASSERT_EQ(head_ids(log, object), heads) << "round " << round;
    }
  }
}

}  // namespace
}  // namespace nearpit
