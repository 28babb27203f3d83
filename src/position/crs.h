// Coordinate systems through PROJ: what a plan's `crs` is, and longitude and latitude -> ground metres.
#ifndef NEARPIT_POSITION_CRS_H_
#define NEARPIT_POSITION_CRS_H_

#include <string>

#include "base/status.h"
#include "lattice/polygon.h"

namespace nearpit {

struct CrsFacts {
  int epsg = 0;             // 0 for "local"
  std::string name;         // "WGS 84 / UTM zone 17N"; "local grid"
  std::string wkt;          // WKT 1 in the form that GeoPackage 1.3 wants (WKT1:GDAL); "undefined" for local
};

// "EPSG:<code>" or "local". Errors: unknown code; not projected; not in metres.
Result<CrsFacts> crs_facts(const std::string& crs);

// Every point of the polygons from WGS 84 (longitude, latitude) into the system (x east, y north whatever its axis order).
// Errors: "local"; a point that the system can't hold.
Result<MultiPolygon> lonlat_to_ground(const MultiPolygon& lonlat, const std::string& crs);
// The other way; for checks and exports.
Result<Point> ground_to_lonlat(const Point& ground, const std::string& crs);

}  // namespace nearpit

#endif  // NEARPIT_POSITION_CRS_H_
