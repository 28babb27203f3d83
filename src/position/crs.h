// Coordinate systems through PROJ: what a plan's `crs` is, and longitude and latitude -> ground metres. Nothing is fetched from the network, and
// nothing is shared: every function may be called from any thread.
#ifndef NEARPIT_POSITION_CRS_H_
#define NEARPIT_POSITION_CRS_H_

#include <string>

#include "base/status.h"
#include "lattice/polygon.h"

namespace nearpit {

struct CrsFacts {
  int epsg = 0;      // 0 for "local"
  std::string name;  // "WGS 84 / UTM zone 17N"; "local grid"
  std::string wkt;   // WKT 1 in the form that GeoPackage 1.3 wants (WKT1:GDAL); "undefined" for local
};

// "EPSG:<code>" or "local". Errors: unknown code; not projected; not in metres; axes that don't run east and north.
Result<CrsFacts> crs_facts(const std::string& crs);

// Every point of the polygons from WGS 84 (longitude, latitude) into the system (x east, y north whatever its axis order).
// Errors: "local"; a point that the system can't hold: more than 3 degrees outside its area of use (half a UTM zone), or one that does not
// come back to within 1e-7 degrees (about 1 cm).
Result<MultiPolygon> lonlat_to_ground(const MultiPolygon& lonlat, const std::string& crs);
// The other way; for checks and exports. The same errors.
Result<Point> ground_to_lonlat(const Point& ground, const std::string& crs);

}  // namespace nearpit

#endif  // NEARPIT_POSITION_CRS_H_
