// GeoJSON geometry objects <-> polygons in ground metres (or whatever the caller's numbers are).
#ifndef NEARPIT_RECORD_GEOMETRY_JSON_H_
#define NEARPIT_RECORD_GEOMETRY_JSON_H_

#include <string>
#include <vector>

#include "lattice/polygon.h"
#include "record/json_text.h"

namespace nearpit {

// A fault in a value: `field` is the JSON pointer from the value given, `what` the rest of the sentence.
struct JsonFault {
  std::string field;
  std::string what;
};

// Polygon or MultiPolygon; rings closed, at least four positions, all numbers finite and at most 1e8 in size. Appends faults; the
// polygons are also put through polygon_problem.
MultiPolygon polygons_of(const Json& geometry, std::vector<JsonFault>* faults);
// Always a MultiPolygon when there are several, else a Polygon.
Json geometry_json(const MultiPolygon& polygons);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_GEOMETRY_JSON_H_
