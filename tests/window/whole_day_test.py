"""A day at the window with real pointer and key events: a survey is made, twenty pits are recorded by touch and by keys, some are amended, withdrawn or
belonged to another pit, the program is killed in the middle of a record, and the day is finished. The same records go into a second file by command:
both must hold the same revisions, layers and figures."""

import json
import math
import re
import shutil
import sqlite3
import sys
import unittest
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parent))
from window_runner import Screen, Window, middle
from survey_runner import SOURCE, Bench

PLAN = SOURCE / "demo_projects" / "cinder_brook" / "plan.json"  # an invented survey: 48 grid pits, three kinds of find
FINDS = json.loads(PLAN.read_text())["finds"]
MORNING = "2026-05-04T08:10:00.000+00:00"
AFTERNOON = "2026-05-04T14:20:00.000+00:00"
FILE, TWIN = "plans/brook.gpkg", "twin.gpkg"
BUTTONS_MM = 14
FIT_MARGIN_MM = 6  # ui/field_map: what 'All' leaves free around the survey


class ByCommand:
    """The same survey by command, each record as soon as the window has saved it."""

    def __init__(self, bench):
        self.bench, self.clock = bench, MORNING
        bench.done("new", "plans/plan.json", TWIN, clock=MORNING)

    def log(self, pit, counts=(0, 0, 0), **fields):
        row = {"pit": pit, "crew": "A", "by": "A", "started_at": self.clock, **fields}
        row |= {f"find:{find}": count for find, count in zip(FINDS, counts)} if row.get("status") != "not_dug" else {}
        self.bench.log([row], file=TWIN, clock=self.clock)

    def amend(self, pit, why, **fields):
        self.bench.log([{"pit": pit, "by": "A", "why": why, **fields}], file=TWIN, clock=self.clock)

    def act(self, **action):
        self.bench.act({"by": "A", **action}, file=TWIN, clock=self.clock)


class Places:
    """Where pits lie on the ground, from one pit's place and the plan, and so on the glass while the whole survey is shown."""

    def __init__(self, due, plan):
        spacing = plan["lattice"]["spacing_m"]
        along = math.radians(plan["lattice"]["transect_bearing_deg"])
        self.along = (spacing * math.sin(along), spacing * math.cos(along))
        self.across = (-self.along[1], self.along[0])
        row, column = self.numbers(due["pit"])
        self.first = [due[axis] - column * self.along[i] - row * self.across[i] for i, axis in enumerate("xy")]
        corners = plan["boundary"]["coordinates"][0]
        self.low = [min(corner[i] for corner in corners) for i in (0, 1)]
        self.high = [max(corner[i] for corner in corners) for i in (0, 1)]

    @staticmethod
    def numbers(label):
        return map(int, re.fullmatch(r"T(\d+)-(\d+)", label).groups())

    def ground(self, label):
        row, column = self.numbers(label)
        return [self.first[i] + column * self.along[i] + row * self.across[i] for i in (0, 1)]

    def glass(self, label, box, margin):
        """Where the pit lies when the whole survey is shown; the column of buttons at the right (14 mm) is left free."""
        box = box._replace(right=box.right - margin / FIT_MARGIN_MM * BUTTONS_MM)
        scale = min((box.right - box.left - 2 * margin) / (self.high[0] - self.low[0]),
                    (box.bottom - box.top - 2 * margin) / (self.high[1] - self.low[1]))
        x, y = self.ground(label)
        return (middle(box)[0] + (x - (self.low[0] + self.high[0]) / 2) * scale,
                middle(box)[1] - (y - (self.low[1] + self.high[1]) / 2) * scale)


class Day(unittest.TestCase):
    def setUp(self):
        self.bench = Bench(clock=MORNING)
        self.addCleanup(self.bench.close)
        self.screen = self.enterContext(Screen(1280, 800))
        self.window = Window(self.screen, self.bench, clock=MORNING)
        self.addCleanup(self.window.close)
        self.bench.path("plans").mkdir()
        shutil.copyfile(PLAN, self.bench.path("plans/plan.json"))
        self.by_command = ByCommand(self.bench)
        self.recorded = []

    def enterContext(self, manager):
        entered = manager.__enter__()
        self.addCleanup(manager.__exit__, None, None, None)
        return entered

    # ---- steps ----

    def make_the_survey(self):
        window = self.window
        window.start()
        for _ in range(14):  # 1.03 times each: a screen of ten inches
            window.click("sizes/much-larger")
        window.click("sizes/fits", "start/place-0", "start/file-plans", "start/file-plan.json", "start/name")
        for _ in "plan":
            window.key("BackSpace")
        window.write("brook")
        window.key("Return")
        window.click("start/make")
        self.assertTrue(window.has("dig-list/record"), window.shown())
        self.map_box = window.control("map/ground").box
        self.px_per_mm = json.loads((self.bench.config / "nearpit" / "window.json").read_text())["px_per_mm"]
        self.assertAlmostEqual(self.px_per_mm / (96 / 25.4), 1.5, delta=0.05)
        due = self.bench.next(file=FILE)["due"]
        self.places = Places(due[0], json.loads(PLAN.read_text()))
        for pit in due:  # the places worked out here are the program's own
            for said, found in zip((pit["x"], pit["y"]), self.places.ground(pit["pit"])):
                self.assertAlmostEqual(said, found, places=6)
        self.assertTrue(window.says("48 pits to dig, all grid pits"), window.shown())
        self.assertEqual(self.bench.due(file=FILE), self.bench.due(file=TWIN))

    def choose_crew(self):
        self.window.click("strip/crew", "office/crew-0")
        self.window.key("d")
        self.assertEqual(self.window.control("strip/crew").label, "At work: A")

    def proposed(self):
        return self.window.control("dig-list/record").label.split()[-1]

    def saved(self, pit, how=""):
        """The strip says so, the list is back, and agrees with what the file says."""
        self.assertIn(f"Saved {pit}{how} at ", " ".join(self.window.texts_of("strip/")))
        self.assertTrue(self.window.has("dig-list/record"), self.window.shown())
        due = self.bench.next("--crew", "A", file=FILE)["due"]
        self.assertIn(f"{len(due)} to dig", self.window.texts_of("strip/"))
        self.assertIn(self.proposed(), [one["pit"] for one in due])
        if not how:
            self.recorded.append(pit)

    def map_says(self, pit):
        """The pit that is chosen."""
        self.assertIn(pit, [text.text for text in self.window.texts if text.path.startswith("map/")], self.window.shown())

    def chosen_on_map(self, pit):
        """Taps on the map where the pit lies; the whole survey must be in view."""
        self.window.tap(*self.places.glass(pit, self.map_box, FIT_MARGIN_MM * self.px_per_mm))
        self.map_says(pit)

    def open_on_map(self, pit):
        self.chosen_on_map(pit)
        self.window.click("map/record-chosen")

    def negative_by_touch(self):
        pit = self.proposed()
        self.window.click("dig-list/record", "record/nothing-found", "record/save")
        self.saved(pit)
        self.by_command.log(pit)

    def negative_by_keys(self):
        pit = self.proposed()
        self.window.key("Return", "n", "Return")
        self.saved(pit)
        self.by_command.log(pit)

    def positive_by_touch(self):
        """Two kinds of find, depth and stop reason."""
        pit = self.proposed()
        self.window.click("dig-list/record", "record/find-0/more", "record/find-0/more", "record/find-1/count", "record/digits/1",
                          "record/digits/2", "record/depth", "record/digits/4", "record/digits/7", "record/digits/point",
                          "record/digits/5", "record/stop", "record/stops/sterile_subsoil", "record/save")
        self.saved(pit)
        self.by_command.log(pit, (2, 12, 0), depth_cm="47.5", stop="sterile_subsoil")
        return pit

    def positive_by_keys(self):
        """All of it without the pointer, and a slip rubbed out."""
        pit = self.proposed()
        self.window.key("r", "4", "Down", "7", "BackSpace", "1", "plus", "Down", "3", "minus", "Down", "3", "9", "s")
        self.window.key("Tab")  # the ring goes through the reasons
        while self.window.control("record/stops/bedrock").flag != "focused":
            self.window.key("Tab")
        self.window.key("space", "Return")  # the ring goes with the panel, so Enter saves
        self.saved(pit)
        self.by_command.log(pit, (4, 2, 2), depth_cm="39", stop="bedrock")
        return pit

    def modern_finds_only(self):
        """Finds that don't make a pit positive."""
        pit = self.proposed()
        self.window.click("dig-list/record", "record/find-2/more")
        self.window.key("Return")
        self.saved(pit)
        self.by_command.log(pit, (0, 0, 1))

    def not_dug(self, reason, by_key):
        pit = self.proposed()
        self.window.click("dig-list/record")
        if by_key:
            self.window.key("x")
        else:
            self.window.click("record/not-dug")
        self.window.click(f"record/reasons/{reason}", "record/save")
        self.saved(pit)
        self.by_command.log(pit, status="not_dug", reason=reason)
        return pit

    def negative_with_a_note(self):
        """Typed by our own keys and the keyboard, with a letter that is none of ASCII."""
        pit = self.proposed()
        self.window.click("dig-list/record", "record/nothing-found", "record/note")
        self.window.touch_letters("caf")
        self.window.click("typing/letters/signs", "typing/letters/é", "typing/letters/signs")
        self.window.write(" side, roots")
        self.window.click("typing/done", "record/save")
        self.saved(pit)
        self.by_command.log(pit, note="café side, roots")

    def another_from_the_list(self):
        window = self.window
        first = self.proposed()
        row = next(path for path, control in window.controls.items()
                   if re.fullmatch(r"dig-list/T\d+-\d+", path) and control.visible == control.box and
                   control.label != first)
        pit = window.control(row).label
        window.click(row)
        self.assertEqual(self.proposed(), pit)
        self.negative_by_touch()
        self.assertEqual(self.recorded[-1], pit)

    def judgement_on_the_map(self):
        """A pit that is not called for, found on the map."""
        due = set(self.bench.due(file=FILE))
        pit = next(label for label in (f"T{row}-{column}" for row in (6, 7, 8, 9) for column in range(8, 16))
                   if label not in due and label not in self.recorded)
        self.chosen_on_map(pit)
        self.assertTrue(self.window.says("not called for", "map/"), self.window.shown())
        self.window.click("map/record-chosen")
        self.assertIn("judgement pit", self.window.texts_of("record/"))
        self.window.key("2", "Return")
        self.saved(pit)
        self.by_command.log(pit, (2, 0, 0), chosen_by="judgement")
        return pit

    def amended(self, pit):
        """After zooming in and dragging the map; the count was 2."""
        window = self.window
        x, y = self.places.glass(pit, self.map_box, FIT_MARGIN_MM * self.px_per_mm)
        window.wheel(x, y, 3)
        window.drag(x, y, middle(self.map_box)[0], middle(self.map_box)[1] - 20)
        window.tap(middle(self.map_box)[0], middle(self.map_box)[1] - 20)
        self.map_says(pit)
        window.click("map/record-chosen")
        self.assertTrue(window.says("recorded: dug, positive", "record/"), window.shown())
        window.key("3")
        self.assertIn("why", window.control("record/save").label + " ".join(window.texts_of("record/save/")))
        window.click("record/why", "typing/phrase/0", "typing/done", "record/save")
        self.saved(pit, " changed")
        window.key("f")
        self.by_command.amend(pit, "miscounted", **{f"find:{FINDS[0]}": 3})

    def withdrawn(self, pit):
        window = self.window
        self.open_on_map(pit)
        window.click("record/more", "record/more/withdraw", "typing/phrase/1", "typing/done")
        self.saved(pit, " withdrawn")
        self.by_command.act(action="withdraw", pit=pit, why="never dug")
        self.assertIn(pit, self.bench.due(file=FILE))

    def moved(self, pit, other):
        """The record of `pit` belongs to `other`, which is touched on the map."""
        window = self.window
        self.open_on_map(pit)
        window.click("record/more", "record/more/move")
        self.chosen_on_map(other)
        window.click("record/move/why", "typing/phrase/0", "typing/done", "record/move/do")
        self.saved(pit, f" moved to {other}")
        self.by_command.act(action="belongs_to", pit=pit, other=other, why="written on the wrong pit")

    def killed_half_way(self):
        """kill -9 with a count, a depth and half a note; after reopening the list says so and the record goes on."""
        window = self.window
        pit = self.proposed()
        window.click("dig-list/record", "record/find-1/more")
        window.key("Up", "8", "Up", "5", "1")
        window.click("record/note")
        window.write("pit wall fell i")
        window.kill()
        window.clock = self.by_command.clock = AFTERNOON
        window.start(FILE)
        self.assertEqual(window.control("dig-list/record").label, f"Go on with {pit}")
        self.assertIn("half written", window.texts_of(f"dig-list/{pit}/"))
        window.click("dig-list/record")
        self.assertEqual([text for path in ("find-0/count", "find-1/count", "depth") for text in
                          window.texts_of(f"record/{path}/")][0::2], ["8", "1", "51 cm"], window.shown())
        window.click("record/note")
        self.assertEqual(window.typed(), "pit wall fell i")
        window.write("n at noon")
        window.key("Return", "Return")
        self.saved(pit)
        self.by_command.log(pit, (8, 1, 0), depth_cm="51", note="pit wall fell in at noon", started_at=MORNING)

    # ---- both files ----

    def same_in_both(self, query):
        found = []
        for file in (FILE, TWIN):
            with sqlite3.connect(f"file:{self.bench.path(file)}?mode=ro", uri=True) as file:
                found.append(file.execute(query).fetchall())
        self.assertEqual(*found)
        return found[0]

    def both_files_say_the_same(self):
        self.assertEqual(self.bench.tally(file=FILE), self.bench.tally(file=TWIN))
        self.assertEqual(self.bench.next(file=FILE), self.bench.next(file=TWIN))
        numbers = "(SELECT group_concat(p.number) FROM nearpit_revision p WHERE instr(r.parents, p.id))"
        revisions = self.same_in_both('SELECT r.number, "by", at_ms, at_offset_min, object, body, why, '
                                      f"{numbers} FROM nearpit_revision r ORDER BY r.number")
        self.same_in_both("SELECT area, unit FROM nearpit_drawn ORDER BY number")
        columns = [row[1] for row in self.same_in_both("PRAGMA table_info(pits)")]
        named = ", ".join(f'"{column}"' for column in columns[1:])
        pits = self.same_in_both(f"SELECT {named} FROM pits ORDER BY label")
        self.assertGreaterEqual(len(pits), 48)
        return revisions

    def test_a_day(self):
        self.make_the_survey()
        self.choose_crew()
        self.negative_by_touch()
        self.negative_by_keys()
        first_positive = self.positive_by_touch()
        self.assertTrue(self.window.says("next to finds", "dig-list/"), self.window.shown())
        self.negative_with_a_note()
        wet = self.not_dug("standing_water", by_key=False)
        self.another_from_the_list()
        self.positive_by_keys()
        self.judgement_on_the_map()
        self.not_dug("no_permission", by_key=True)
        self.modern_finds_only()
        self.killed_half_way()
        self.assertEqual(len(self.recorded), 11)
        self.negative_by_touch()
        self.amended(first_positive)
        self.negative_by_keys()
        self.withdrawn(wet)
        self.negative_by_keys()
        self.negative_by_touch()
        self.moved(self.recorded[-1], self.proposed())
        self.modern_finds_only()
        while len(self.recorded) < 20:
            self.negative_by_keys()
        self.assertEqual(self.window.terminate(), 0, self.window.said)
        self.assertEqual(self.window.said, "")
        self.assertTrue(self.bench.check(file=FILE).json()["whole"])
        revisions = self.both_files_say_the_same()
        self.assertEqual(len(revisions), 20 + 1 + 1 + 2)
        progress = self.bench.tally(file=FILE)["progress"]
        self.assertEqual({key: progress[key] for key in ("dug", "positive", "not_dug", "judgement", "withdrawn")},
                         {"dug": 18, "positive": 4, "not_dug": 1, "judgement": 1, "withdrawn": 2})


if __name__ == "__main__":
    unittest.main()
