// Records <-> the JSON kept in the log. One shape, frozen: fields are only ever added. Finds stand by name, so that a record can be read without the plan.
#ifndef NEARPIT_RECORD_RECORD_JSON_H_
#define NEARPIT_RECORD_RECORD_JSON_H_

#include <string>
#include <string_view>
#include <vector>

#include "base/status.h"
#include "survey/survey.h"

namespace nearpit {

// Fields that say nothing are left out; counts stand when dug, zeros too. `label` is the pit's label, kept for readers without the lattice.
std::string pit_record_json(const PitRecord& record, const std::string& label, const std::vector<std::string>& finds);
// Errors: not JSON, unknown word, unknown find, out of range. The inverse of the above; unknown keys are ignored (a later program wrote them).
Result<PitRecord> pit_record_of(std::string_view json, const std::vector<std::string>& finds);

std::string closed_area_json(const ClosedArea& area);
Result<ClosedArea> closed_area_of(std::string_view json);

std::string stop_work_json(const StopWork& stop);
Result<StopWork> stop_work_of(std::string_view json);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_RECORD_JSON_H_
