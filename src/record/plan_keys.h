// Every key that a plan file may hold, in one place: the reader refuses all others, and schema/plan.schema.json lists the same (a test compares).
#ifndef NEARPIT_RECORD_PLAN_KEYS_H_
#define NEARPIT_RECORD_PLAN_KEYS_H_

#include <span>
#include <string_view>

namespace nearpit {

using KeyList = std::span<const std::string_view>;

struct KeysOfObject {
  std::string_view where;  // "" the plan, "lattice", "strata[]" an element of the list, "strata[].boundary"
  KeyList keys;
};

// Objects whose keys the plan itself names (initial.count, contacts, permits) are not among them.
std::span<const KeysOfObject> all_plan_keys();
// Empty for an object that is not among them.
KeyList plan_keys(std::string_view where);

// Fields of a pit record that a plan may ask for or require.
KeyList record_field_names();

}  // namespace nearpit

#endif  // NEARPIT_RECORD_PLAN_KEYS_H_
