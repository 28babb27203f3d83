// Geometry as GeoPackage keeps it: GeoPackageBinary, OGC 12-128r17 clause 2.1.3: 'G' 'P', version 0, flags, srs_id, envelope, then WKB (OGC 06-103r4), all
// little-endian. A point has no envelope (flags 0x01), polygons have minx, maxx, miny, maxy (flags 0x03).
//
// Law: the same ground gives the same bytes, whatever the winding, the first point of a ring or the order of holes and parts: outer rings run
// counter-clockwise, holes clockwise, a ring begins at its lowest x (then y), holes and parts are sorted. Coordinates are kept to the bit.
#ifndef NEARPIT_STORE_GEOPACKAGE_BLOB_H_
#define NEARPIT_STORE_GEOPACKAGE_BLOB_H_

#include <string>

#include "lattice/polygon.h"

namespace nearpit::store {

std::string point_blob(const Point& point, int srs_id);

// Always a MULTIPOLYGON. Not for an empty one: that is NULL in a layer.
std::string multipolygon_blob(const MultiPolygon& polygons, int srs_id);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_GEOPACKAGE_BLOB_H_
