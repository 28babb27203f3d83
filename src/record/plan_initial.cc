#include "record/plan_initial.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

#include "base/text.h"
#include "record/plan_keys.h"

namespace nearpit {
namespace {

constexpr std::array<std::string_view, 3> kDrawn{"pits", "transects", "systematic"};
constexpr std::array<std::string_view, 4> kDraws{"pits", "transects", "systematic", "listed"};

DrawKind draw_kind(const std::string& word) {
  return word == "pits" ? DrawKind::kPits : word == "transects" ? DrawKind::kTransects : DrawKind::kSystematic;
}

void read_area_counts(const Fields& initial, const Json& count, Plan* out) {
  std::vector<std::string_view> names;
  for (const PlanArea& area : out->areas)
    names.push_back(area.name);
  if (names.empty()) names.push_back("all");
  const Fields fields(initial.findings(), count, initial.at("count"), names);
  for (const std::string_view name : names) {
    const auto number = fields.whole(name, Need::kRequired, 1, kMostNodes);
    if (number) out->initial.count[std::string(name)] = static_cast<std::uint32_t>(*number);
  }
}

void read_drawn(const Fields& initial, bool areas_known, Plan* out) {
  const Json* count = initial.take("count", Need::kRequired, "{\"all\": number}, or a number for every area");
  if (count != nullptr && areas_known) read_area_counts(initial, *count, out);
  const auto seed = initial.whole("seed", Need::kRequired, 0, std::numeric_limits<std::int64_t>::max());
  out->initial.seed = static_cast<std::uint64_t>(seed.value_or(0));
  const std::string why = "has no place with a drawn first sample; take it out, or write \"draw\": \"listed\"";
  for (const std::string_view key : {"as", "pits", "how"})
    initial.refuse(key, why);
}

void read_listed_pits(const Fields& initial, Plan* out) {
  const std::string legal = "a list of at least one pit's label";
  const Json* pits = initial.take("pits", Need::kRequired, legal);
  if (pits == nullptr) return;
  if (!pits->is_array() || pits->empty()) {
    const std::string wrong = pits->is_array() ? " is empty; legal: " : " is not a list; legal: ";
    return initial.findings()->add(initial.at("pits"), shown(*pits) + wrong + legal);
  }
  for (std::size_t i = 0; i < pits->size(); ++i) {
    const auto label = name_of(initial.findings(), (*pits)[i], child_pointer(initial.at("pits"), i), 60);
    if (label) out->initial.pits.push_back(*label);
  }
}

void read_every(const Fields& initial, Plan* out) {
  const auto every = initial.whole("every", Need::kRequired, 2, kMostEvery);
  if (every) out->initial.every = static_cast<std::int32_t>(*every);
}

void read_listed(const Fields& initial, Plan* out) {
  out->initial.listed = true;
  const auto as = initial.choice("as", Need::kRequired, kDrawn);
  if (as) out->initial.draw = draw_kind(*as);
  if (as == "systematic") read_every(initial, out);
  if (as && as != "systematic") {
    initial.refuse("every", "has a place only with \"systematic\"; take it out");
  }
  read_listed_pits(initial, out);
  out->initial.how = initial.note("how", Need::kRequired, 2000).value_or("");
  const std::string why = "has no place with \"draw\": \"listed\", where nothing is drawn; take it out";
  for (const std::string_view key : {"count", "seed", "interval_m", "between"})
    initial.refuse(key, why);
}

// interval_m over between is how many lattice steps lie between two pits of one start.
double read_interval(const Fields& initial, Plan* out) {
  initial.refuse("every", "is given by interval_m over between already; take one of them out");
  const auto interval = initial.number("interval_m", Need::kRequired, {0.2, 1e6});
  const auto between = initial.number("between", Need::kRequired, kSpacing_m);
  if (!interval || !between) return 0;
  const double ratio = *interval / *between;
  const double every = std::round(ratio);
  if (every < 2 || every > static_cast<double>(kMostEvery) || std::abs(ratio - every) > 1e-9 * every) {
    initial.findings()->add(initial.at("interval_m"), shown(*initial.find("interval_m")) +
                                                          " is not a whole multiple of between, " +
                                                          shown(*initial.find("between")) + "; legal: 2 to " +
                                                          std::to_string(kMostEvery) + " times between");
    return 0;
  }
  out->initial.every = static_cast<std::int32_t>(every);
  return *between;
}

}  // namespace

std::optional<double> read_initial(const Fields& plan, bool areas_known, Plan* out) {
  const Json* value = plan.take("initial", Need::kRequired, "{\"draw\": …, …}");
  if (value == nullptr) return std::nullopt;
  const Fields initial(plan.findings(), *value, plan.at("initial"), plan_keys("initial"));
  const auto draw = initial.choice("draw", Need::kRequired, kDraws);
  if (!draw) return initial.has("between") || initial.has("interval_m") ? std::optional<double>(0) : std::nullopt;
  if (*draw == "listed") {
    read_listed(initial, out);
    return std::nullopt;
  }
  out->initial.draw = draw_kind(*draw);
  read_drawn(initial, areas_known, out);
  if (*draw == "systematic") {
    if (initial.has("interval_m") || initial.has("between")) return read_interval(initial, out);
    read_every(initial, out);
    return std::nullopt;
  }
  for (const std::string_view key : {"every", "interval_m", "between"}) {
    initial.refuse(key, "has a place only with \"draw\": \"systematic\"; take it out");
  }
  return std::nullopt;
}

}  // namespace nearpit
