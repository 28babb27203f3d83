"""The contract of new, next, log, act and tally (design: commands), played through the real program on a survey of 30 pits:
T2-3 turns out positive, its ring of eight opens. Places and finds are invented."""

import math
import sqlite3
import struct
import unittest

from survey_runner import Bench, rectangle, small_plan

RING = ["T1-2", "T1-3", "T1-4", "T2-2", "T2-4", "T3-2", "T3-3", "T3-4"]
NUMBER = (int, float)
NULL = type(None)

DUE = {"pit": str, "because": str, "of": list, "ring": int, "x": float, "y": float, "distance_m": float,
       "bearing_deg": float, "crew": (str, NULL)}
NEXT = {"survey": str, "due": list, "first_sample_left": int, "neighbours_left": int, "open_clusters": int, "tell": list,
        "asked": list}
FRAME = {"pits": int, "area_m2": float, "boundary_m2": float, "pit_area_m2": float, "strata": list}
STRATUM = {"name": str, "primary_units": int, "drawn": int}
PROGRESS = dict.fromkeys(("first_sample", "first_sample_dug", "dug", "positive", "not_dug", "judgement", "due", "halted",
                          "no_longer_required", "withdrawn", "conflicts"), int) | {"complete": bool, "truncated": bool}
CLUSTER = {"label": str, "pits": list, "finds": dict, "area_m2": float, "in_first_sample": int, "closed": bool,
           "open_because": list}
ESTIMATE = {"of": str, "estimator": str, "mean_per_pit": float, "per_m2": (float, NULL), "total": float,
            "variance_of_mean": (float, NULL), "standard_error": (float, NULL), "interval": (dict, NULL), "ground": dict,
            "status": str, "why": list}
INTERVAL = {"level": float, "lower": float, "upper": float, "method": str}
TALLY = {"survey": str, "frame": dict, "progress": dict, "clusters": list, "missed_cluster_pits": (int, NULL),
         "estimates": list}


class Commands(unittest.TestCase):
    maxDiff = None

    def setUp(self):
        self.bench = Bench()
        self.addCleanup(self.bench.close)
        self.made = self.bench.new()

    def has(self, value, shape):
        """Every key of the contract is there, with its type; others may be."""
        for key, kind in shape.items():
            self.assertIn(key, value)
            self.assertIsInstance(value[key], kind, key)
            if kind in (int, float):
                self.assertNotIsInstance(value[key], bool, key)

    def progress(self, **expected):
        progress = self.bench.tally()["progress"]
        self.assertEqual({key: progress[key] for key in expected}, expected)

    def log_first_two(self):
        self.bench.log([{"pit": "T1-1", "crew": "A", "dug_at": "2026-05-04T09:00", "find:flint": ""},
                        {"pit": "T2-3", "crew": "B", "dug_at": "2026-05-04T09:30", "find:flint": 2}])

    def dig_all(self):
        self.log_first_two()
        self.bench.log([{"pit": pit} for pit in [*RING, "T4-5", "T5-1"]])

    def row_of(self, label):
        """The pit as the layer of the file shows it."""
        with sqlite3.connect(f"file:{self.bench.path('survey.gpkg')}?mode=ro", uri=True) as file:
            file.row_factory = sqlite3.Row
            row = file.execute("SELECT * FROM pits WHERE label = ?", (label,)).fetchone()
            return dict(row) if row else None

    # ---- new ----

    def test_new_says_what_it_made(self):
        self.assertEqual(self.made.out, "Made survey.gpkg: Heron Carr (invented)\n"
                         "  30 possible pits on 3000 m2 (local)\n  4 grid pits to dig first\n    all: 4 of 30 pits\n")
        self.assertEqual(self.made.err, "")

    def test_new_draws_the_same_from_the_same_seed_only(self):
        plan = small_plan(initial={"draw": "pits", "count": {"all": 8}, "seed": 7})
        for file in ("one.gpkg", "two.gpkg"):
            self.bench.new(plan, file)
        self.assertEqual(self.bench.due(file="one.gpkg"), self.bench.due(file="two.gpkg"))
        self.bench.new(small_plan(initial={"draw": "pits", "count": {"all": 8}, "seed": 8}), "three.gpkg")
        self.assertNotEqual(self.bench.due(file="one.gpkg"), self.bench.due(file="three.gpkg"))

    def test_new_warns_of_one_drawn_unit(self):
        made = self.bench.new(small_plan(initial={"draw": "transects", "count": {"all": 1}, "seed": 7}), "thin.gpkg")
        self.assertEqual(made.lines, ["note: only 1 of 5 transects drawn: no likely range can be given; draw 2 or more"])

    # ---- next ----

    def test_next_json_has_every_key_of_the_contract(self):
        self.log_first_two()
        answer = self.bench.next()
        self.has(answer, NEXT)
        for pit in answer["due"]:
            self.has(pit, DUE)
            self.assertIn(pit["because"], ("first sample", "neighbour"))
        self.assertEqual((answer["first_sample_left"], answer["neighbours_left"], answer["open_clusters"]), (2, 8, 1))

    def test_next_says_why_and_how_far(self):
        """Distances and bearings derived by hand: along the first sample from the origin at (5, 5)."""
        due = self.bench.next()["due"]
        self.assertEqual([pit["pit"] for pit in due], ["T1-1", "T2-3", "T4-5", "T5-1"])
        steps = [(0, 0), (20, 10), (20, 20), (-40, 10)]
        for pit, (east, north) in zip(due, steps):
            self.assertAlmostEqual(pit["distance_m"], math.hypot(east, north), places=9)
            self.assertAlmostEqual(pit["bearing_deg"], math.degrees(math.atan2(east, north)) % 360, places=9)
            self.assertEqual((pit["because"], pit["of"], pit["ring"]), ("first sample", [], 0))
        self.log_first_two()
        ring = {pit["pit"]: pit for pit in self.bench.next()["due"] if pit["because"] == "neighbour"}
        self.assertEqual(sorted(ring), RING)
        self.assertTrue(all(pit["of"] == ["T2-3"] and pit["ring"] == 1 for pit in ring.values()))
        self.assertEqual((ring["T3-4"]["x"], ring["T3-4"]["y"]), (35, 25))

    def test_next_begins_where_it_is_told(self):
        self.log_first_two()
        for options, start in ((("--from", "52,44"), (52, 44)), (("--from", "T3-4"), (35, 25)), (("--from", "N20 E30"), (35, 25)),
                               (("--crew", "A"), (5, 5)), (("--crew", "B"), (25, 15)), ((), (25, 15))):
            pit = self.bench.next(*options)["due"][0]
            self.assertAlmostEqual(pit["distance_m"], math.dist(start, (pit["x"], pit["y"])), places=9, msg=options)
        self.assertEqual(sorted(self.bench.due("--from", "52,44")), sorted(self.bench.due()))

    def test_next_in_words(self):
        self.bench.log([{"pit": "T1-1"}, {"pit": "T2-3", "find:pottery": 1}, {"pit": "T5-1"}])
        text = self.bench.done("next", "survey.gpkg").out
        self.assertIn("9 pits to dig: 1 grid, 8 around finds; 1 open cluster\n", text)
        self.assertIn("next to T2-3 (one step out)", text)
        self.bench.log([{"pit": pit} for pit in [*RING, "T4-5"]])
        self.assertEqual(self.bench.done("next", "survey.gpkg").out, "Heron Carr (invented): nothing left to dig\n")

    # ---- log ----

    def test_log_says_what_it_saved(self):
        self.assertEqual(self.bench.log([{"pit": "T1-1"}]).out, "Saved 1 pit; 3 to dig\n")
        self.assertEqual(self.bench.log([{"pit": "T2-3", "find:flint": 1}, {"pit": "T5-1", "find:flint": 0}]).out,
                         "Saved 2 pits; 9 to dig\n")

    def test_an_absent_column_keeps_and_an_empty_cell_clears(self):
        self.bench.log([{"pit": "T2-3", "depth_cm": 40, "stop": "bedrock", "note": "wet", "bag": "7", "crew": "A",
                         "find:flint": 2, "find:pottery": 1}])
        self.bench.log([{"pit": "N10 E20", "depth_cm": 45, "note": "", "find:flint": "", "why": "measured again"}])
        row = self.row_of("T2-3")
        self.assertEqual((row["depth_cm"], row["stop"], row["note"], row["bag"], row["crew"]), (45, "bedrock", None, "7", "A"))
        self.assertEqual((row["find_flint"], row["find_pottery"], row["outcome"]), (0, 1, "positive"))

    def test_a_pit_that_stops_being_positive_leaves_its_ring(self):
        self.log_first_two()
        self.bench.log([{"pit": "T1-2"}, {"pit": "T1-3"}])
        self.bench.log([{"pit": "T2-3", "find:flint": 0, "why": "a natural stone"}])
        self.assertEqual(self.bench.due(), ["T4-5", "T5-1"])
        self.progress(positive=0, no_longer_required=2, judgement=2, dug=4)
        self.bench.log([{"pit": "T2-3", "find:flint": 1, "why": "worked after all"}])
        self.progress(positive=1, no_longer_required=0, judgement=0, due=8)

    def test_judgement_pits_stay_out_of_the_design(self):
        self.bench.log([{"pit": "T5-5", "chosen_by": "judgement", "x": "", "y": "", "find:pottery": 1},
                        {"pit": "J1", "chosen_by": "judgement", "x": 51.5, "y": 47, "find:pottery": 9}])
        self.assertEqual(self.bench.due(), ["T1-1", "T2-3", "T4-5", "T5-1"])
        self.progress(judgement=2, positive=2, dug=2, first_sample_dug=0, no_longer_required=0)
        self.assertEqual(self.bench.tally()["clusters"], [])
        self.assertTrue(all(row["mean_per_pit"] == 0 for row in self.bench.tally()["estimates"]))
        self.bench.log([{"pit": "J1", "depth_cm": 30}])
        self.assertEqual(self.row_of("J1")["depth_cm"], 30)

    def test_a_judgement_pit_that_the_design_reaches_joins_it(self):
        self.bench.log([{"pit": "T3-4", "chosen_by": "judgement", "find:flint": 1}])
        self.progress(judgement=1)
        self.bench.log([{"pit": "T2-3", "find:flint": 1}])
        self.progress(judgement=0)
        self.assertEqual(self.bench.tally()["clusters"][0]["pits"], ["T2-3", "T3-4"])
        self.assertIn("T4-4", self.bench.due())

    def test_design_is_accepted_for_what_the_same_table_reaches(self):
        self.bench.log([{"pit": "T3-4", "chosen_by": "design", "find:flint": 1}, {"pit": "T4-4", "chosen_by": "", "find:flint": 0},
                        {"pit": "T2-3", "chosen_by": "design", "find:flint": 1}])
        self.progress(judgement=0, dug=3)

    def test_asked_is_for_what_another_crew_opened(self):
        self.bench.log([{"pit": "T4-1", "chosen_by": "asked"}])
        self.progress(judgement=1, dug=1)

    def test_moved_keeps_the_place_where_it_was_dug(self):
        self.bench.log([{"pit": "T2-3", "x": 26.5, "y": 15.5, "moved": "tree root", "find:flint": 1}])
        self.assertEqual(self.bench.next()["neighbours_left"], 8)
        blob = self.row_of("T2-3")["geom"]
        self.assertEqual(struct.unpack("<dd", blob[-16:]), (26.5, 15.5))
        self.bench.log([{"pit": "T1-1", "x": 5.005, "y": 5}])  # within a centimetre of its place: not moved

    def test_withdrawn_and_logged_again(self):
        self.log_first_two()
        self.bench.log([{"pit": "T2-3", "status": "withdrawn", "why": "another pit"}])
        self.assertEqual(self.bench.due(), ["T2-3", "T4-5", "T5-1"])
        self.progress(withdrawn=1, dug=1, positive=0, first_sample_dug=1)
        self.bench.log([{"pit": "T2-3", "status": "dug", "find:pottery": 1}])
        self.progress(withdrawn=0, dug=2, positive=1)
        row = self.row_of("T2-3")
        self.assertEqual((row["find_flint"], row["find_pottery"], row["crew"]), (0, 1, None), "nothing of the old record")

    def test_not_dug_of_both_classes(self):
        self.bench.log([{"pit": "T1-1", "status": "not_dug", "reason": "paved"},
                        {"pit": "T2-3", "status": "dug"}, {"pit": "T4-5"}, {"pit": "T5-1"}])
        self.progress(complete=True, not_dug=1, first_sample_dug=4)
        self.bench.log([{"pit": "T1-1", "status": "not_dug", "reason": "no_permission"}])
        self.progress(complete=False, not_dug=1, due=0)
        self.assertEqual({row["status"] for row in self.bench.tally()["estimates"]}, {"provisional"})

    def test_a_stop_that_concerns_the_law_is_said_aloud(self):
        said = self.bench.log([{"pit": "T1-1", "stop": "human_remains_stop"}, {"pit": "T2-3", "stop": "bedrock"},
                               {"pit": "T5-1", "stop": "uxo_stop"}])
        self.assertEqual(said.code, 0)
        self.assertEqual([line.split(":")[:2] for line in said.lines], [["note", " T1-1"], ["note", " T5-1"]])
        self.assertIn("human remains", said.lines[0])
        self.assertEqual(self.bench.log([{"pit": "T1-1", "note": "covered again"}]).err, "", "said once")

    # ---- act ----

    def test_belongs_to_moves_the_record(self):
        self.bench.log([{"pit": "T1-1", "crew": "A", "find:flint": 3}])
        self.assertIn("T1-2", self.bench.due())
        said = self.bench.act({"action": "belongs_to", "by": "M. Invented", "why": "wrong label", "pit": "T1-1", "other": "T2-3"})
        self.assertEqual(said.out, "Done: 1 action; 11 pits to dig\n")
        self.assertEqual(sorted(self.bench.due()), sorted([*RING, "T1-1", "T4-5", "T5-1"]))
        self.assertEqual((self.row_of("T2-3")["crew"], self.row_of("T2-3")["find_flint"]), ("A", 3))
        self.progress(withdrawn=1, dug=1)

    def test_close_and_reopen_an_area(self):
        self.log_first_two()
        close = {"action": "close_area", "by": "M. Invented", "area": "alder carr", "reason": "standing_water",
                 "polygon": rectangle(31, 0, 60, 50)}
        self.bench.act(close)
        self.assertEqual(sorted(self.bench.due()), ["T1-2", "T1-3", "T2-2", "T3-2", "T3-3", "T5-1"])
        self.progress(not_dug=4, first_sample_dug=3, due=6)
        self.assertEqual((self.row_of("T4-5")["outcome"], self.row_of("T4-5")["reason"]), ("not dug", "standing_water"))
        self.bench.act({"action": "reopen_area", "by": "M. Invented", "why": "drained", "area": "alder carr"})
        self.assertEqual(sorted(self.bench.due()), sorted([*RING, "T4-5", "T5-1"]))

    def test_close_rows_for_want_of_access(self):
        self.dig_all()
        self.progress(complete=True)
        self.bench.act({"action": "withdraw", "by": "M. Invented", "why": "never dug", "pit": "T5-1"})
        self.bench.act({"action": "close_area", "by": "M. Invented", "reason": "no_permission", "rows": [5]})
        self.progress(complete=False, due=0, not_dug=1)
        self.bench.act({"action": "reopen_area", "by": "M. Invented", "why": "agreed", "area": "closed area 1"})
        self.assertEqual(self.bench.due(), ["T5-1"])

    def test_ask_neighbours_opens_judgement_pits_apart(self):
        self.bench.log([{"pit": "T4-2", "chosen_by": "judgement", "find:flint": 1}])
        self.bench.act({"action": "ask_neighbours", "by": "M. Invented", "why": "dark soil", "pit": "T4-2"})
        answer = self.bench.next()
        self.assertEqual([pit["pit"] for pit in answer["asked"]], ["T3-1", "T3-2", "T3-3", "T4-1", "T4-3", "T5-2", "T5-3"])
        self.assertEqual([pit["pit"] for pit in answer["due"]], ["T1-1", "T2-3", "T4-5", "T5-1"], "T5-1 is due by itself")
        self.assertIn("Judgement pits asked for: T3-1, T3-2, T3-3, T4-1, T4-3, T5-2 and T5-3\n",
                      self.bench.done("next", "survey.gpkg").out)
        self.bench.log([{"pit": "T3-1", "chosen_by": "judgement"}])
        self.assertEqual(len(self.bench.next()["asked"]), 6)

    def test_a_list_of_actions_is_all_or_nothing(self):
        self.log_first_two()
        good = {"action": "withdraw", "by": "M. Invented", "why": "wrong", "pit": "T2-3"}
        said = self.bench.run("act", "survey.gpkg", self.bench.actions([good, {**good, "pit": "T5-1"}]))
        self.assertEqual((said.code, said.out), (1, ""))
        self.progress(withdrawn=0)
        self.assertEqual(self.bench.act([good, {**good, "pit": "T1-1"}]).out, "Done: 2 actions; 4 pits to dig\n")

    # ---- tally ----

    def test_tally_json_has_every_key_of_the_contract(self):
        for step in (lambda: None, self.log_first_two, lambda: self.bench.log([{"pit": pit} for pit in [*RING, "T4-5", "T5-1"]])):
            step()
            answer = self.bench.tally()
            self.has(answer, TALLY)
            self.has(answer["frame"], FRAME)
            self.has(answer["progress"], PROGRESS)
            for stratum in answer["frame"]["strata"]:
                self.has(stratum, STRATUM)
            for cluster in answer["clusters"]:
                self.has(cluster, CLUSTER)
            for row in answer["estimates"]:
                self.has(row, ESTIMATE)
                self.has(row["ground"], {"standard_error": (float, NULL), "interval": (dict, NULL)})
                for interval in (row["interval"], row["ground"]["interval"]):
                    if interval is not None:
                        self.has(interval, INTERVAL)
                self.assertIn(row["status"], ("final", "provisional", "truncated"))
                self.assertTrue(all(isinstance(why, str) for why in row["why"]))
        self.assertTrue(any(row["interval"] for row in answer["estimates"]))

    def test_tally_lists_figures_in_order(self):
        rows = [(row["of"], row["estimator"]) for row in self.bench.tally()["estimates"]]
        self.assertEqual(rows, [(of, estimator) for of in ("target", "flint", "pottery", "modern", "positive pits")
                                for estimator in ("hansen_hurwitz", "horvitz_thompson", "first_sample_only")])

    def test_tally_of_the_finished_ground(self):
        """One positive pit with 2 in a first sample of 4 of 30: the mean of (0, 2, 0, 0), derived by hand."""
        self.dig_all()
        answer = self.bench.tally()
        self.assertEqual(answer["frame"], {"pits": 30, "area_m2": 3000, "boundary_m2": 3000, "pit_area_m2": 0.25,
                                           "strata": [{"name": "all", "primary_units": 30, "drawn": 4}]})
        self.assertTrue(answer["progress"]["complete"])
        self.assertEqual({row["status"] for row in answer["estimates"]}, {"final"})
        target = answer["estimates"][0]
        self.assertAlmostEqual(target["mean_per_pit"], 0.5, places=12)
        self.assertAlmostEqual(target["per_m2"], 2, places=12)
        self.assertAlmostEqual(target["total"], 6000, places=9)
        self.assertAlmostEqual(target["variance_of_mean"], (1 - 4 / 30) / 4, places=12)  # s^2 = 1
        self.assertEqual(answer["estimates"][-1]["per_m2"], None)
        cluster = answer["clusters"][0]
        self.assertEqual({key: cluster[key] for key in CLUSTER},
                         {"label": "T2-3", "pits": ["T2-3"], "finds": {"flint": 2, "pottery": 0, "modern": 0},
                          "area_m2": 100, "in_first_sample": 1, "closed": True, "open_because": []})

    def test_day_takes_what_was_written_by_then_in_the_plans_zone(self):
        """Written at 23:30 New York time on 4 May, which is 5 May in UTC, and on the evening of 5 May."""
        self.bench.new(small_plan(time_zone="America/New_York"), "days.gpkg")
        self.bench.log([{"pit": "T1-1"}], "days.gpkg", clock="2026-05-05T03:30:00+00:00")
        self.bench.log([{"pit": "T5-1", "dug_at": "2026-05-04"}], "days.gpkg", clock="2026-05-05T20:00:00-04:00")
        dug = [self.bench.tally("--day", day, file="days.gpkg")["progress"]["dug"]
               for day in ("2026-05-03", "2026-05-04", "2026-05-05")]
        self.assertEqual(dug, [0, 1, 2])
        self.assertEqual(self.bench.tally("--day", "2026-05-05", file="days.gpkg"), self.bench.tally(file="days.gpkg"))
        self.assertIn("records up to 2026-05-04\n", self.bench.done("tally", "days.gpkg", "--day", "2026-05-04").out)

    # ---- all ----

    def test_json_is_one_object_and_words_go_elsewhere(self):
        for command in ("next", "tally", "check"):
            ran = self.bench.run(command, "survey.gpkg", "--json")
            self.assertEqual((ran.code, ran.err), (0, ""))
            self.assertIsInstance(ran.json(), dict)
            self.assertTrue(ran.out.startswith("{") and ran.out.endswith("}\n"))

    def test_reading_changes_nothing(self):
        before = self.bench.path("survey.gpkg").read_bytes()
        for command in ("next", "tally", "check"):
            self.bench.done(command, "survey.gpkg")
        self.assertEqual(self.bench.path("survey.gpkg").read_bytes(), before)
        self.assertFalse(self.bench.config.exists(), "only writing remembers a writer")

    def test_help_and_version_are_no_errors(self):
        for arguments in (["--help"], ["--version"], ["next", "--help"]):
            ran = self.bench.run(*arguments)
            self.assertEqual((ran.code, ran.err), (0, ""))
            self.assertTrue(ran.out)


if __name__ == "__main__":
    unittest.main()
