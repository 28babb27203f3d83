// The one place for ground <-> screen: which ground the map's box shows, and how panning, zooming and fitting change it. North is up; a view has
// no turn.
//
// Laws:
//   inverse   to_ground(to_screen(p)) is p to within a thousandth of a pixel, for points that the box shows
//   zoom      the ground under `about` is still there after zoomed()
//   pan       panned by (dx, dy) and then by (-dx, -dy) is the same view
//   near      kept_near() of a view that is near already is that view; in any other the survey's box still reaches into the map's
#ifndef NEARPIT_UI_FIELD_MAP_MAP_VIEW_H_
#define NEARPIT_UI_FIELD_MAP_MAP_VIEW_H_

#include "lattice/coordinates.h"
#include "lattice/polygon.h"
#include "pixel_box.h"

namespace nearpit::ui {

struct MapView {
  Point centre;         // the ground at the middle of the map's box
  double px_per_m = 1;  // > 0
};

Pixel to_screen(const MapView& view, const PixelBox& box, const Point& ground);
Point to_ground(const MapView& view, const PixelBox& box, const Pixel& at);
// What the whole of the box shows.
Box visible_ground(const MapView& view, const PixelBox& box);

// The whole of `ground` in the box, `margin_px` left free on each side; a margin that leaves no room is ignored. Ground without width and height is
// shown at 1 px a metre.
MapView fitted(const Box& ground, const PixelBox& box, float margin_px);
// The ground follows the finger: what was at (x, y) is at (x + dx, y + dy).
MapView panned(const MapView& view, float dx_px, float dy_px);

struct ZoomLimits {
  double least_px_per_m = 0;
  double most_px_per_m = 0;  // >= least
};

// Out: the whole of `ground` in a quarter of the box's width or height. In: one spacing as wide as 60 mm of glass. Where a small survey fits at
// more than that, fitting it whole is the limit.
ZoomLimits zoom_limits(const Box& ground, double spacing_m, const PixelBox& box, float px_per_mm);
// `factor` > 1 goes in. A view that is beyond a limit comes back to it.
MapView zoomed(const MapView& view, const PixelBox& box, const Pixel& about, double factor, const ZoomLimits& limits);
// The centre moved, if it must, into `ground`'s box grown on each side by three eighths of what the map shows: however far somebody pans, the
// survey's box reaches at least an eighth of the map's width and height into the map, or is there whole.
MapView kept_near(const MapView& view, const PixelBox& box, const Box& ground);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_FIELD_MAP_MAP_VIEW_H_
