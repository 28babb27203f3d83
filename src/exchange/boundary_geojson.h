// A boundary from a GeoJSON file (RFC 7946: WGS 84, longitude then latitude): a Polygon or MultiPolygon, bare, in a Feature, or in a FeatureCollection of
// such features (their union as one MultiPolygon; features may touch or overlap). Heights are ignored. A `crs` member, which RFC 7946 took out, is refused
// unless it names CRS84, which says the same.
#ifndef NEARPIT_EXCHANGE_BOUNDARY_GEOJSON_H_
#define NEARPIT_EXCHANGE_BOUNDARY_GEOJSON_H_

#include <string>
#include <string_view>

#include "base/status.h"
#include "lattice/polygon.h"

namespace nearpit {

// Points are (longitude, latitude), -180 .. 180 and -90 .. 90. At most 1,000 features. Errors: "FILE:LINE: …".
Result<MultiPolygon> read_boundary_geojson(std::string_view text, const std::string& file);

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_BOUNDARY_GEOJSON_H_
