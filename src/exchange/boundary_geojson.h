// A boundary from a GeoJSON file (RFC 7946: WGS 84, longitude then latitude): a Polygon or MultiPolygon, bare, in a Feature, or in a FeatureCollection of
// such features (their union as one MultiPolygon). Heights are ignored.
#ifndef NEARPIT_EXCHANGE_BOUNDARY_GEOJSON_H_
#define NEARPIT_EXCHANGE_BOUNDARY_GEOJSON_H_

#include <string>
#include <string_view>

#include "base/status.h"
#include "lattice/polygon.h"

namespace nearpit {

// Points are (longitude, latitude). Errors: "FILE:LINE: …".
Result<MultiPolygon> read_boundary_geojson(std::string_view text, const std::string& file);

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_BOUNDARY_GEOJSON_H_
