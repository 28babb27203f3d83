#!/usr/bin/python3
"""Proves the oracle's ground and records on cases small enough to read (derived; shapes invented)."""

import math
import unittest

from frame_oracle import Frame, PlanError, area_of, covers, metres_text
from oracle import Survey

BOX = {"type": "Polygon", "coordinates": [[[0, 0], [40, 0], [40, 30], [0, 30], [0, 0]]]}
NOW = "2026-05-04T12:00:00+00:00"


def plan(kind="square", **more):
    lattice = {"kind": kind, "spacing_m": 10, **more.pop("lattice", {})}
    return {"boundary": BOX, "lattice": lattice, "pit": {"shape": "round", "size_m": 0.5}, "finds": ["flake", "nail"],
            "positive": {"finds": ["flake"], "at_least": 2}, "initial": {"draw": "listed", "as": "pits", "pits": ["T1-1"]}, **more}


class Ground(unittest.TestCase):
    def test_holes_pieces_and_the_millimetre(self):
        hole = [[10, 10], [20, 10], [20, 20], [10, 20], [10, 10]]
        holed = {"type": "Polygon", "coordinates": BOX["coordinates"] + [hole]}
        two = {"type": "MultiPolygon", "coordinates": [holed["coordinates"], [[[50, 0], [60, 0], [60, 10], [50, 0]]]]}
        self.assertEqual((area_of(holed), area_of(two)), (1100, 1150))
        for point, inside in {(5, 5): True, (15, 15): False, (10, 15): True, (10.0009, 15): True, (10.0011, 15): False,
                              (-0.0009, 3): True, (-0.0011, 3): False, (58, 3): True, (45, 5): False}.items():
            self.assertEqual(covers(two, point), inside, point)

    def test_square_frame(self):
        frame = Frame(plan())
        self.assertEqual(len(frame.nodes), 20)
        self.assertEqual(frame.place[(4, 5)], (40, 30))
        self.assertEqual(frame.label[(3, 2)], "T3-2")
        self.assertEqual(len(frame.neighbours[(2, 2)]), 8)
        self.assertEqual(frame.neighbours[(1, 1)], [(1, 2), (2, 1), (2, 2)])
        arms = Frame(plan(neighbours="4x2"))
        self.assertEqual(arms.neighbours[(1, 1)], [(1, 2), (1, 3), (2, 1), (3, 1)])

    def test_bearing_turns_clockwise(self):
        south = Frame(plan(lattice={"transect_bearing_deg": 180}))
        self.assertEqual([round(x) for x in south.place[(1, 1)]], [0, 30])
        self.assertEqual([round(x) for x in south.place[(1, 4)]], [0, 0])
        self.assertEqual([round(x) for x in south.place[(5, 1)]], [40, 30])

    def test_nearest_six_at_any_bearing(self):
        """Neighbour distances of the staggered lattice: 1 (twice) and sqrt(5)/2 (four times) spacings; triangular: all 1."""
        far = {"staggered": [10, 10] + [5 * math.sqrt(5)] * 4, "triangular": [10] * 6}
        big = {"type": "Polygon", "coordinates": [[[0, 0], [90, 0], [90, 90], [0, 90], [0, 0]]]}
        for kind, want in far.items():
            for bearing in (90, 17.5, 301):
                frame = Frame(plan(kind, boundary=big, lattice={"transect_bearing_deg": bearing}))
                for node, around in frame.neighbours.items():
                    self.assertTrue(all(node in frame.neighbours[n] and n != node for n in around))
                    got = sorted(math.dist(frame.place[node], frame.place[n]) for n in around)
                    if len(got) == 6:
                        self.assertTrue(all(math.isclose(a, b) for a, b in zip(got, want)), got)

    def test_sub_lattices_are_of_the_same_kind(self):
        big = {"type": "Polygon", "coordinates": [[[0, 0], [150, 0], [150, 150], [0, 150], [0, 0]]]}
        for kind in ("square", "triangular"):
            for every in (2, 3):
                frame = Frame(plan(kind, boundary=big, initial={"draw": "systematic", "every": every}))
                units = frame.primary_units()[0]
                self.assertEqual(len(units), every * every)
                for unit in units.values():
                    nearest = {round(min(math.dist(frame.place[a], frame.place[b]) for b in unit if b != a), 6) for a in unit}
                    self.assertEqual(nearest, {10.0 * every})

    def test_labels(self):
        self.assertEqual([metres_text(x) for x in (120, 12.5, -0.004, 8.660254)], ["120", "12.5", "0", "8.66"])
        frame = Frame(plan("triangular", labels={"kind": "grid", "datum": [10, 20]}))
        self.assertEqual(frame.label[(2, 1)], "S11.34 W5")
        self.assertEqual(frame.pit("T2-1"), frame.pit("S11.34 W5"))
        self.assertEqual(frame.pit("J1"), "J1")
        with self.assertRaises(PlanError):
            frame.pit("T9-9")

    def test_a_column_below_one_is_refused(self):
        with self.assertRaises(PlanError):
            Frame(plan(lattice={"origin": [10, 0]}))

    def test_the_first_of_two_areas_has_the_line(self):
        west, east = ({"type": "Polygon", "coordinates": [[[a, 0], [b, 0], [b, 30], [a, 30], [a, 0]]]} for a, b in ((0, 20), (20, 40)))
        frame = Frame(plan(strata=[{"name": "west", "boundary": west}, {"name": "east", "boundary": east}], confine="stratum"))
        self.assertEqual([len(u) for u in frame.primary_units()], [12, 8])
        self.assertNotIn((1, 4), frame.neighbours[(1, 3)])

    def test_blocks(self):
        frame = Frame(plan(confine={"block": [2, 3]}))
        self.assertEqual(frame.neighbours[(3, 2)], [(2, 1), (2, 2), (3, 1)])


class Records(unittest.TestCase):
    def setUp(self):
        self.survey = Survey(plan(neighbours=4))

    def log(self, *rows):
        self.survey.log(list(rows), NOW)

    def progress(self, *keys):
        return [self.survey.progress()[key] for key in keys]

    def due(self):
        return set(self.survey.next()["due"])

    def test_a_positive_opens_its_ring_and_a_correction_closes_it(self):
        self.log({"pit": "T1-1", "find:flake": "2"})
        self.assertEqual(self.due(), {"T1-2", "T2-1"})
        self.log({"pit": "T1-2", "find:flake": "1"})
        self.assertEqual(self.due(), {"T2-1"})
        self.log({"pit": "T1-1", "find:flake": "", "why": "natural stones"})
        self.assertEqual(self.due(), set())
        self.assertEqual(self.progress("judgement", "no_longer_required", "dug", "positive"), [1, 1, 2, 0])

    def test_absent_columns_keep_their_value(self):
        self.log({"pit": "T1-1", "find:flake": "1", "find:nail": "5"})
        self.log({"pit": "T1-1", "find:flake": "2"})
        self.assertEqual(self.survey.clusters()[0]["finds"], {"flake": 2, "nail": 5})

    def test_judgement_pits_count_when_the_design_reaches_them(self):
        self.log({"pit": "T1-2", "find:flake": "9", "chosen_by": "judgement"},
                 {"pit": "J1", "find:flake": "3", "chosen_by": "judgement", "x": "7", "y": "7"})
        self.assertEqual((self.progress("judgement", "no_longer_required", "positive"), self.due()), ([2, 0, 2], {"T1-1"}))
        self.log({"pit": "T1-1", "find:flake": "2"})
        self.assertEqual((self.progress("judgement"), self.due()), ([1], {"T1-3", "T2-1", "T2-2"}))
        self.assertEqual(self.survey.clusters()[0]["pits"], ["T1-1", "T1-2"])

    def test_withdrawn_and_belongs_to(self):
        self.log({"pit": "T1-1", "find:flake": "2"})
        self.survey.act({"action": "belongs_to", "pit": "T1-1", "other": "T1-2"})
        self.assertEqual((self.due(), self.progress("withdrawn", "judgement")), ({"T1-1"}, [1, 1]))
        self.survey.act({"action": "withdraw", "pit": "T1-2"})
        self.assertEqual(self.progress("withdrawn", "dug"), [2, 0])

    def test_closed_area(self):
        self.log({"pit": "T1-1", "find:flake": "2"})
        self.survey.act({"action": "close_area", "area": "a", "rows": [2], "reason": "hazard"})
        self.log({"pit": "T1-2"})
        self.assertEqual(self.progress("due", "not_dug", "complete"), [0, 1, False])
        self.survey.act({"action": "reopen_area", "area": "a"})
        self.assertEqual((self.progress("not_dug"), self.due()), ([0], {"T2-1"}))

    def test_not_dug_classes(self):
        for reason, complete in (("slope", True), ("no_permission", False)):
            self.log({"pit": "T1-1", "status": "not_dug", "reason": reason})
            self.assertEqual(self.progress("first_sample_dug", "not_dug", "complete"), [1, 1, complete])

    def test_ring_limit(self):
        survey = Survey(plan(neighbours=4, ring_limit=1))
        survey.log([{"pit": "T1-1", "find:flake": "2"}, {"pit": "T1-2", "find:flake": "2"}, {"pit": "T2-1"}], NOW)
        self.assertEqual((survey.due(), survey.truncated()), (set(), True))


if __name__ == "__main__":
    unittest.main()
