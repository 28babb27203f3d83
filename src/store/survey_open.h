// The way into a file that may come from anywhere: refuse what is no survey file, tell damage, set what makes a save safe.
#ifndef NEARPIT_STORE_SURVEY_OPEN_H_
#define NEARPIT_STORE_SURVEY_OPEN_H_

#include <cstdint>
#include <string>

#include "base/status.h"
#include "store/survey_handle.h"

namespace nearpit::store {

// What a GeoPackage 1.3 calls itself in the file's header (OGC 12-128r17, requirement 2); the schema's SQL writes them.
constexpr std::int64_t kGeoPackageId = 1196444487;
constexpr std::int64_t kGeoPackageVersion = 10300;

Result<SurveyFile::Handle> open_survey(const std::string& path, bool read_only);

// journal_mode DELETE, synchronous EXTRA; the file's journal mode may have been changed by another program.
Status make_saves_safe(Connection& db);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_SURVEY_OPEN_H_
