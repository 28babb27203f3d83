#include "design/first_sample.h"

#include <algorithm>
#include <string>

#include "base/random.h"
#include "base/text.h"

namespace nearpit {

FirstSample FirstSample::from_units(const Areas& areas, const PrimaryUnits& units,
                                    std::vector<std::vector<UnitId>> drawn) {
  FirstSample sample;
  sample.drawn = std::move(drawn);
  std::vector<std::vector<bool>> is_drawn(areas.list.size());
  for (std::size_t area = 0; area < areas.list.size(); ++area) {
    is_drawn[area].assign(units.count[area], false);
    for (const UnitId unit : sample.drawn[area])
      is_drawn[area][unit] = true;
  }
  sample.holds.assign(areas.of_node.size(), false);
  for (std::size_t i = 0; i < areas.of_node.size(); ++i) {
    if (!is_drawn[areas.of_node[i]][units.of_node[i]]) continue;
    sample.holds[i] = true;
    ++sample.nodes;
  }
  return sample;
}

Result<FirstSample> draw_first_sample(const Areas& areas, const PrimaryUnits& units,
                                      const std::vector<std::uint32_t>& count, std::uint64_t seed) {
  std::vector<std::string> problems;
  for (std::size_t area = 0; area < areas.list.size(); ++area) {
    if (count[area] >= 1 && count[area] <= units.count[area]) continue;
    problems.push_back("initial.count." + areas.list[area].name + ": " + std::to_string(count[area]) + " of " +
                       std::to_string(units.count[area]) + " " + std::string(unit_word(units.kind, true)) +
                       " can't be drawn; legal: 1 to " + std::to_string(units.count[area]));
  }
  if (!problems.empty()) return Error(ErrorKind::kBadInput, std::move(problems));
  SeededRandom random(seed, RandomStream::kFirstSample);
  std::vector<std::vector<UnitId>> drawn;
  for (std::size_t area = 0; area < areas.list.size(); ++area) {
    drawn.push_back(random.sample(units.count[area], count[area]));
  }
  return FirstSample::from_units(areas, units, std::move(drawn));
}

Result<FirstSample> listed_first_sample(const Areas& areas, const PrimaryUnits& units,
                                        const std::vector<NodeId>& listed) {
  std::vector<std::vector<UnitId>> drawn(areas.list.size());
  for (const NodeId id : listed) {
    const auto at = static_cast<std::size_t>(id);
    drawn[areas.of_node[at]].push_back(units.of_node[at]);
  }
  for (std::size_t area = 0; area < drawn.size(); ++area) {
    std::vector<UnitId>& list = drawn[area];
    if (list.empty()) {
      return Error(ErrorKind::kBadInput, "initial.pits: no listed pit lies in area " +
                                             in_quotes(areas.list[area].name) +
                                             "; list at least one pit in every area");
    }
    std::sort(list.begin(), list.end());
    list.erase(std::unique(list.begin(), list.end()), list.end());
  }
  return FirstSample::from_units(areas, units, std::move(drawn));
}

std::vector<std::string> first_sample_warnings(const Areas& areas, const PrimaryUnits& units,
                                               const FirstSample& sample) {
  std::vector<std::string> warnings;
  for (std::size_t area = 0; area < areas.list.size(); ++area) {
    const std::size_t drawn = sample.drawn[area].size();
    const std::size_t all = units.count[area];
    const std::string where = areas.list.size() > 1 ? "area " + in_quotes(areas.list[area].name) + ": " : "";
    const std::string of_all =
        std::to_string(drawn) + " of " + std::to_string(all) + " " + std::string(unit_word(units.kind, true));
    if (drawn == 1 && all > 1) {
      warnings.push_back(where + "only 1 of " + std::to_string(all) + " " + std::string(unit_word(units.kind, true)) +
                         " drawn: no likely range can be given; draw 2 or more");
    } else if (drawn < all && drawn < (units.kind == DrawKind::kTransects ? 5u : 4u)) {
      warnings.push_back(where + "only " + of_all + " drawn: likely ranges will be wide and rough; " +
                         (units.kind == DrawKind::kTransects ? "5" : "4") + " or more are advised");
    }
  }
  return warnings;
}

}  // namespace nearpit
