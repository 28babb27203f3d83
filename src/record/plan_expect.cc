#include "record/plan_expect.h"

#include "record/plan_keys.h"

namespace nearpit {
namespace {

constexpr NumberRange above_zero_to(double most) { return {0, most, true}; }

void check_site(const Fields& expect) {
  const Json* value = expect.find("site");
  if (value == nullptr) return;
  const Fields site(expect.findings(), *value, expect.at("site"), plan_keys("expect.site"));
  constexpr std::string_view kShapes[] = {"ellipse"};
  site.choice("shape", Need::kRequired, kShapes);
  const auto length = site.number("length_m", Need::kRequired, above_zero_to(100'000));
  const auto width = site.number("width_m", Need::kRequired, above_zero_to(100'000));
  if (length && width && *width > *length) {
    expect.findings()->add(site.at("width_m"), shown(*site.find("width_m")) + " is more than the length, " +
                                                   shown(*site.find("length_m")) + "; legal: at most the length");
  }
  const Json* bearing = site.find("bearing_deg");
  if (bearing != nullptr && !bearing->is_null()) site.number("bearing_deg", Need::kOptional, {0, 360, false, true});
}

void check_clustering(const Fields& expect) {
  const Json* value = expect.find("clustering");
  if (value == nullptr) return;
  const Fields clustering(expect.findings(), *value, expect.at("clustering"), plan_keys("expect.clustering"));
  constexpr std::string_view kModels[] = {"poisson", "negative_binomial"};
  const auto model = clustering.choice("model", Need::kRequired, kModels);
  if (model == "poisson") clustering.refuse("k", "has a place only with \"negative_binomial\"; take it out");
  if (model == "negative_binomial") clustering.number("k", Need::kRequired, above_zero_to(1e6));
}

}  // namespace

void check_expect(const Fields& plan) {
  const Json* value = plan.find("expect");
  if (value == nullptr) return;
  const Fields expect(plan.findings(), *value, plan.at("expect"), plan_keys("expect"));
  check_site(expect);
  check_clustering(expect);
  expect.number("finds_per_m2", Need::kOptional, above_zero_to(1e6));
  expect.number("sites_per_km2", Need::kOptional, above_zero_to(1e6));
  expect.number("recovery", Need::kOptional, above_zero_to(1));
  expect.number("minutes_per_pit", Need::kOptional, above_zero_to(10'000));
  expect.number("walk_m_per_min", Need::kOptional, above_zero_to(1000));
  expect.whole("diggers", Need::kOptional, 1, 1000);
  expect.number("days", Need::kOptional, above_zero_to(10'000));
  expect.number("hours_per_day", Need::kOptional, above_zero_to(24));
}

}  // namespace nearpit
