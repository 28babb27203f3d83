"""How the window begins and ends: a file that can't be opened is told in the window, no display on standard error, and a request to end loses nothing that is
half typed."""

import os
import signal
import sys
import unittest
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parent))
from window_runner import OnSmallGlass


class StartAndEnd(OnSmallGlass):
    def refused(self, file, said):
        """The window opens all the same, says what is wrong with the file, and is of use after that."""
        window = self.window
        window.start(file)
        self.assertIn("Please read", window.texts_of("notice/"))
        told = [text for text in window.texts_of("notice/") if text != "Please read"]
        self.assertEqual(len(told), 1, told)
        self.assertIn(Path(file).name, told[0])
        self.assertIn(said, told[0])
        window.click("notice/understood")
        self.assertTrue(window.has("start/place-0"), window.shown())
        self.assertEqual(window.terminate(), 0)
        self.assertEqual(window.said, "")

    def test_a_file_that_is_not_there(self):
        self.refused("nowhere.gpkg", "no such file")
        self.assertFalse(self.bench.path("nowhere.gpkg").exists())

    def test_a_file_that_is_no_survey(self):
        self.bench.write("letter.gpkg", "Dear all, this is no survey.\n")
        self.refused("letter.gpkg", "not")
        self.assertEqual(self.bench.path("letter.gpkg").read_text(), "Dear all, this is no survey.\n")

    def test_no_display(self):
        said = self.bench.run()
        self.assertEqual((said.code, said.out, len(said.lines)), (1, "", 1), said)
        self.assertIn("no window can be opened", said.err)
        self.assertIn("nearpit --help", said.err)
        self.bench.new()
        said = self.bench.run("survey.gpkg", environment={"DISPLAY": ":9999"})
        self.assertEqual((said.code, said.out, len(said.lines)), (1, "", 1), said)

    def test_asked_to_end_while_half_typed(self):
        self.bench.new()
        window = self.window
        before = self.bench.next()
        for way in (signal.SIGTERM, signal.SIGINT, signal.SIGHUP):
            window.start("survey.gpkg")
            pit = window.control("dig-list/record").label.split()[-1]
            window.click("dig-list/record", "record/find-1/more")
            window.key("t")
            window.write("x")
            os.kill(window.process.pid, way)
            self.assertEqual((window.ended(), window.said), (0, ""), way)
        window.start("survey.gpkg")
        self.assertEqual(window.control("dig-list/record").label, f"Go on with {pit}")
        window.click("dig-list/record")
        self.assertIn("3", window.texts_of("record/find-1/count/"))
        window.key("t")
        self.assertEqual(window.typed(), "xxx")
        self.assertEqual(self.bench.next(), before, "nothing was saved unasked")
        self.assertTrue(self.bench.check().json()["whole"])

    def test_ends_before_anything_is_open(self):
        self.window.start()
        self.assertEqual((self.window.terminate(), self.window.said), (0, ""))


if __name__ == "__main__":
    unittest.main()
