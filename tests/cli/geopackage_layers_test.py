"""The survey file as other programs see it after each command: GDAL's validator finds nothing, ogr2ogr reads each layer with
the right rows, and a plan with an EPSG code lies at the right place on the globe. Needs gdal-bin and python3-gdal."""

import json
import shutil
import subprocess
import unittest

from survey_runner import Bench, rectangle, skip, small_plan

try:
    from osgeo_utils.samples import validate_gpkg
except ImportError:
    skip("python3-gdal is not installed")
if shutil.which("ogr2ogr") is None:
    skip("ogr2ogr (gdal-bin) is not installed")

RING = ["T1-2", "T1-3", "T1-4", "T2-2", "T2-4", "T3-2", "T3-3", "T3-4"]
LAYERS = ("pits", "clusters", "boundary", "strata", "closed_areas", "column_notes")


def area_of(rings):
    """Of a polygon's outer ring, by the shoelace formula."""
    ring = rings[0]
    return abs(sum(a[0] * b[1] - b[0] * a[1] for a, b in zip(ring, ring[1:]))) / 2


class GeoPackageLayers(unittest.TestCase):
    maxDiff = None

    def setUp(self):
        self.bench = Bench()
        self.addCleanup(self.bench.close)

    def read(self, layer, *options, file="survey.gpkg"):
        """The layer's rows through ogr2ogr, as GeoJSON features."""
        command = ["ogr2ogr", "-f", "GeoJSON", "-lco", "COORDINATE_PRECISION=12", *options, "/vsistdout/", file, layer]
        done = subprocess.run(command, cwd=self.bench.folder, capture_output=True, check=True)
        self.assertNotIn(b"ERROR", done.stderr, done.stderr)
        return json.loads(done.stdout)["features"]

    def rows(self, layer, key, **options):
        return {feature["properties"][key]: feature["properties"] for feature in self.read(layer, **options)}

    def valid(self, pits, clusters=0, closed=0, strata=1, file="survey.gpkg"):
        """The validator finds nothing, and each layer has as many rows as the step should leave."""
        self.assertEqual(validate_gpkg.check(str(self.bench.path(file)), abort_at_first_error=False, extra_checks=True,
                                             warning_as_error=True), [])
        counts = {layer: len(self.read(layer, file=file)) for layer in LAYERS[:-1]}
        self.assertEqual(counts, {"pits": pits, "clusters": clusters, "boundary": 1, "strata": strata, "closed_areas": closed})
        self.assertTrue(self.bench.check(file).json()["whole"])

    def outcomes(self):
        outcomes = {}
        for label, pit in self.rows("pits", "label").items():
            outcomes.setdefault(pit["outcome"], []).append(label)
        return {outcome: sorted(labels) for outcome, labels in outcomes.items()}

    def test_each_command_leaves_a_geopackage(self):
        bench = self.bench
        bench.new()
        self.valid(pits=4)
        self.assertEqual(self.outcomes(), {"due": ["T1-1", "T2-3", "T4-5", "T5-1"]})

        bench.log([{"pit": "T1-1", "depth_cm": 32.5, "crew": "A", "bag": "", "note": "wet, deep\nclay"},
                   {"pit": "T2-3", "find:flint": 2, "find:modern": 1, "dug_at": "2026-05-04T10:20"}])
        self.valid(pits=12, clusters=1)
        self.assertEqual(self.outcomes(), {"due": sorted([*RING, "T4-5", "T5-1"]), "negative": ["T1-1"], "positive": ["T2-3"]})
        pits = self.rows("pits", "label")
        self.assertEqual((pits["T2-3"]["find_flint"], pits["T2-3"]["find_pottery"], pits["T2-3"]["find_modern"]), (2, 0, 1))
        self.assertEqual((pits["T1-1"]["depth_cm"], pits["T1-1"]["note"], pits["T1-1"]["bag"]), (32.5, "wet, deep\nclay", None))
        self.assertEqual((pits["T2-3"]["dug_at"][:16], pits["T1-2"]["ring"], pits["T1-2"]["first_sample"], pits["T1-2"]["find_flint"]),
                         ("2026-05-04T10:20", 1, False, None))

        bench.log([{"pit": "T5-5", "chosen_by": "judgement", "x": "", "y": ""}, {"pit": "J1", "chosen_by": "judgement", "x": 51, "y": 47}])
        self.valid(pits=14, clusters=1)

        bench.act({"action": "close_area", "by": "M. Invented", "area": "carr", "reason": "standing_water",
                   "polygon": rectangle(31, 0, 60, 30)})
        self.valid(pits=14, clusters=1, closed=1)
        self.assertEqual(self.outcomes()["not dug"], ["T1-4", "T2-4", "T3-4"])
        bench.act({"action": "close_area", "by": "M. Invented", "reason": "no_permission", "rows": [4]})
        self.valid(pits=14, clusters=1, closed=2)
        bench.act({"action": "reopen_area", "by": "M. Invented", "why": "dry", "area": "carr"})
        self.valid(pits=14, clusters=1, closed=2)
        self.assertEqual({name: area["open_again"] for name, area in self.rows("closed_areas", "name").items()},
                         {"carr": True, "closed area 1": False})

        bench.act({"action": "withdraw", "by": "M. Invented", "why": "another pit", "pit": "T2-3"})
        self.valid(pits=6, clusters=0, closed=2)
        bench.act({"action": "belongs_to", "by": "M. Invented", "why": "wrong label", "pit": "T1-1", "other": "T5-1"})
        self.valid(pits=6, clusters=0, closed=2)
        bench.log([{"pit": "T2-3", "find:pottery": 1}])
        self.valid(pits=14, clusters=1, closed=2)
        bench.log([{"pit": "T2-3", "find:pottery": 0}])
        self.valid(pits=6, clusters=0, closed=2)
        self.assertEqual(self.outcomes(), {"due": ["T1-1"], "negative": ["J1", "T2-3", "T5-1", "T5-5"], "not dug": ["T4-5"]})

    def test_places_are_those_of_the_digging(self):
        self.bench.new()
        self.bench.log([{"pit": "T2-3", "find:flint": 1, "x": 26.25, "y": 14.5, "moved": "root"},
                        {"pit": "J1", "chosen_by": "judgement", "x": 51, "y": 47}])
        places = {feature["properties"]["label"]: feature["geometry"]["coordinates"] for feature in self.read("pits")}
        self.assertEqual((places["T2-3"], places["J1"], places["T3-4"], places["T5-1"]), ([26.25, 14.5], [51, 47], [35, 25], [5, 45]))
        boundary, = self.read("boundary")
        self.assertEqual(boundary["properties"]["survey"], "Heron Carr (invented)")
        self.assertEqual([area_of(part) for part in boundary["geometry"]["coordinates"]], [3000])
        cluster, = self.read("clusters")
        self.assertEqual([area_of(part) for part in cluster["geometry"]["coordinates"]], [100])
        self.assertEqual((cluster["properties"]["area_m2"], cluster["properties"]["closed"]), (100, False))

    def test_areas_and_what_was_drawn_of_them(self):
        self.bench.new(small_plan(
            strata=[{"name": "bank", "boundary": rectangle(0, 0, 60, 20)}, {"name": "field", "boundary": rectangle(0, 20, 60, 50)}],
            initial={"draw": "transects", "count": {"bank": 1, "field": 2}, "seed": 5}))
        self.valid(pits=18, strata=2)
        self.assertEqual({name: (area["nodes"], area["primary_units"], area["drawn"])
                          for name, area in self.rows("strata", "name").items()}, {"bank": (12, 2, 1), "field": (18, 3, 2)})

    def test_every_column_is_explained(self):
        self.bench.new()
        self.bench.log([{"pit": "T2-3", "find:flint": 1}])
        self.bench.act({"action": "close_area", "by": "M. Invented", "reason": "slope", "rows": [5]})
        notes = {}
        for note in self.read("column_notes"):
            self.assertTrue(note["properties"]["meaning"])
            notes.setdefault(note["properties"]["layer_name"], set()).add(note["properties"]["column_name"])
        for layer in LAYERS[:-1]:
            self.assertEqual(notes.pop(layer), {*self.read(layer)[0]["properties"], "geom"}, layer)
        self.assertEqual(notes, {})

    def test_find_names_become_columns_of_their_own(self):
        finds = ["flint", "Grès", "two words", "a-b.c", "select"]
        self.bench.new(small_plan(finds=finds, positive={"finds": ["flint"], "at_least": 1}))
        self.bench.log([{"pit": "T2-3", **{f"find:{find}": number for number, find in enumerate(finds, 1)}}])
        self.valid(pits=12, clusters=1)
        for layer in ("pits", "clusters"):
            row = self.rows(layer, "label")["T2-3"]
            self.assertEqual([row[f"find_{find}"] for find in finds], [1, 2, 3, 4, 5])

    def test_an_epsg_plan_lies_at_its_place_on_the_globe(self):
        """500000, 4400000 of EPSG:32617 is 81 west, 39.749907519 north: PROJ's cs2cs and GeographicLib's GeoConvert agree."""
        self.bench.new(small_plan(crs="EPSG:32617", boundary=rectangle(500000, 4400000, 500060, 4400050),
                                  lattice={"kind": "square", "spacing_m": 10, "origin": [500000, 4400000]}))
        self.valid(pits=4)
        places = {feature["properties"]["label"]: feature["geometry"]["coordinates"]
                  for feature in self.read("pits", "-t_srs", "EPSG:4326")}
        longitude, latitude = places["T1-1"]
        self.assertAlmostEqual(longitude, -81, places=9)
        self.assertAlmostEqual(latitude, 39.749907519, places=9)
        boundary, = self.read("boundary", "-t_srs", "EPSG:4326")
        corners = [tuple(corner) for corner in boundary["geometry"]["coordinates"][0][0]]
        self.assertIn((longitude, latitude), [(round(east, 12), round(north, 12)) for east, north in corners])

    def test_a_geojson_boundary_comes_back_where_it_was(self):
        """The plan's boundary given in longitude and latitude, transformed, stored, and transformed back by GDAL."""
        corners = [[-81, 39.75], [-80.9993, 39.75], [-80.9993, 39.7505], [-81, 39.7505], [-81, 39.75]]
        self.bench.write("boundary.geojson", json.dumps({"type": "Feature", "properties": {}, "geometry": {
            "type": "Polygon", "coordinates": [corners]}}))
        self.bench.new(small_plan(crs="EPSG:32617", boundary={"file": "boundary.geojson"}, lattice={"kind": "square", "spacing_m": 10},
                                  initial={"draw": "pits", "count": {"all": 5}, "seed": 3}))
        self.valid(pits=5)
        boundary, = self.read("boundary", "-t_srs", "EPSG:4326")
        back = boundary["geometry"]["coordinates"][0][0]
        for corner in corners:
            self.assertLess(min(max(abs(corner[0] - point[0]), abs(corner[1] - point[1])) for point in back), 1e-9)


if __name__ == "__main__":
    unittest.main()
