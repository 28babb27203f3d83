"""A pit that said 'Saved' survives kill -9 at that very moment; one that had not said so yet is either saved whole or still half written, and what was typed
is there either way."""

import random
import sqlite3
import sys
import time
import unittest
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parent))
from window_runner import OnSmallGlass
from survey_runner import rectangle, small_plan

FILE = "survey.gpkg"
PITS = 15
KILLED_EARLY = 8


def long_list():
    """Thirty grid pits."""
    return small_plan(initial={"draw": "pits", "count": {"all": 30}, "seed": 3}, boundary=rectangle(0, 0, 60, 50))


class SavedIsOnDisk(OnSmallGlass):
    def setUp(self):
        super().setUp()
        self.bench.new(long_list())

    def in_file(self):
        """Flint of each pit that the file holds, read without the program; a journal that a kill left is rolled back first, as any reader does."""
        with sqlite3.connect(self.bench.path(FILE)) as file:
            return dict(file.execute("SELECT label, find_flint FROM pits WHERE outcome IN ('positive', 'negative')"))

    def typed(self, count):
        """Opens the record proposed and types a count; its pit."""
        pit = self.window.control("dig-list/record").label.split()[-1]
        self.window.key("Return", *str(count))
        return pit

    def test_killed_when_it_says_saved(self):
        window, said = self.window, {}
        for number in range(PITS):
            window.start(FILE)
            pit = self.typed(number)
            if number == 0:
                window.key("n")
            window.press(*window.where("record/save"))
            window.screen.do("mouseup", 1)
            window.wait_for(lambda: window.says(f"Saved {pit} at", "strip/"), "Saved")
            window.kill()
            said[pit] = number
            self.assertEqual(self.in_file(), said)
        self.assertEqual(len(said), PITS)
        self.assertTrue(self.bench.check().json()["whole"])

    def test_killed_between_saving_and_forgetting_the_draft(self):
        """What such a kill leaves is put there: the record is in the file and its draft is still beside it. Nobody is asked about it."""
        window = self.window
        window.start(FILE)
        first = self.typed(4)
        drafts = next((self.bench.config / "nearpit").glob("drafts-*"))
        half_typed = drafts.read_bytes()
        window.key("Return")
        self.assertFalse(drafts.exists())
        window.kill()
        drafts.write_bytes(half_typed)
        window.start(FILE)
        self.assertRegex(window.control("dig-list/record").label, r"^Record T\d-\d$")
        second = self.typed(5)
        window.key("Return")
        window.kill()
        self.assertEqual(self.in_file(), {first: 4, second: 5})

    def test_killed_before_it_says_saved(self):
        seed = random.SystemRandom().randrange(1 << 32)
        print(f"killed before it says saved: seed {seed}")
        chance = random.Random(seed)
        window, saved, usual, early = self.window, {}, None, 0
        for number in range(1, KILLED_EARLY + 1):
            window.start(FILE)
            pit = self.typed(number)
            window.press(*window.where("record/save"))
            begun = time.monotonic()
            hand = window.screen.begin("mouseup", 1)
            if usual is None:
                window.wait_for(lambda: window.says(f"Saved {pit} at", "strip/"), "Saved")
                usual = time.monotonic() - begun
            else:
                time.sleep(chance.uniform(0, 0.2) * usual)  # the save is in the first of some frames
            window.kill()
            hand.wait()
            found = self.in_file()
            early += pit not in found
            if pit in found:
                saved[pit] = number
            self.assertEqual(found, saved)
            window.start(FILE)
            if pit not in found:
                self.assertEqual(window.control("dig-list/record").label, f"Go on with {pit}")
                window.key("Return")
                self.assertIn(str(number), window.texts_of("record/find-0/count/"))
                window.key("Return")
                window.wait_for(lambda: window.says(f"Saved {pit} at", "strip/"), "Saved")
                saved[pit] = number
            window.kill()
        print(f"killed before it says saved: {early} of {KILLED_EARLY} were not saved yet")
        self.assertEqual(self.in_file(), saved)
        self.assertTrue(self.bench.check().json()["whole"])


if __name__ == "__main__":
    unittest.main()
