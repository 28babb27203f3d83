"""Names in any script, and the same words and numbers in every locale and time zone of the machine."""

import os
import shutil
import subprocess
import unittest

from survey_runner import Bench, rectangle, small_plan

NAMES = {
    "Cyrillic": ("Ключ у берёзы", "кремень", "лес", "бригада Ж"),
    "Greek": ("Άνω Πηγάδι", "οψιανός", "λόφος", "ομάδα Ω"),
    "Chinese, Japanese, Korean": ("鷺沼の段丘", "土器", "田んぼ", "작업조"),
    "emoji and marks": ("Heron 🪶 Carr", "flint 🪨 (é, e\u0301)", "Wiese „Süd“", "crew 👷🏽‍♀️"),
    "quotes and commas": ("the \"old\" carr, 'north'", "flint, worked; \"burnt\"", "a.b/c:d~e", "A & B <C>"),
}


class NamesAndLocale(unittest.TestCase):
    maxDiff = None

    def setUp(self):
        self.bench = Bench()
        self.addCleanup(self.bench.close)

    def test_names_in_any_script(self):
        for script, (survey, find, area, crew) in NAMES.items():
            with self.subTest(script):
                self.play(survey, find, area, crew)

    def play(self, survey, find, area, crew):
        file = f"{len(survey)} {find.replace('/', ' ')}.gpkg"
        self.bench.new(small_plan(survey=survey, finds=[find, "modern"], positive={"finds": [find], "at_least": 1},
                                  strata=[{"name": area, "boundary": rectangle(0, 0, 60, 50)}], crews=[crew]), file)
        self.bench.log([{"pit": "T2-3", "crew": crew, "note": f"{survey}\n{find}", "bag": area, f"find:{find}": 2,
                         f"weight:{find}": "12.5"}, {"pit": area, "chosen_by": "judgement", "x": "51", "y": "45"}], file)
        self.bench.act({"action": "close_area", "by": crew, "area": area, "reason": "other", "why": survey, "rows": [5]}, file)
        self.assertEqual(self.bench.next("--crew", crew, file=file)["survey"], survey)
        answer = self.bench.tally(file=file)
        self.assertEqual((answer["survey"], answer["frame"]["strata"][0]["name"]), (survey, area))
        self.assertEqual(answer["clusters"][0]["finds"], {find: 2, "modern": 0})
        self.assertIn(find, {row["of"] for row in answer["estimates"]})
        for command in ("next", "tally"):
            self.assertIn(survey, self.bench.done(command, file).out)
        report = self.bench.check(file).json()
        self.assertEqual((report["whole"], report["problems"]), (True, []))
        self.bench.act({"action": "reopen_area", "by": crew, "area": area, "why": find}, file)
        refused = self.bench.run("log", file, self.bench.write("bad.csv", f'pit,"find:x{find.replace(chr(34), chr(34) * 2)}"\nT1-1,1\n'))
        self.assertEqual(refused.code, 1)
        self.assertTrue(refused.err.endswith(f"is no find of the plan; legal: {find}, modern\n"), refused)

    def test_finds_differ_ignoring_case_in_any_script(self):
        for upper, lower in (("FLINT", "flint"), ("КРЕМЕНЬ", "кремень"), ("ΟΨΙΑΝΟΣ", "οψιανος")):
            self.bench.write("plan.json", str(small_plan(finds=[upper, lower], positive={"finds": [upper], "at_least": 1}))
                             .replace("'", '"'))
            refused = self.bench.run("new", "plan.json", "fresh.gpkg")
            self.assertEqual((refused.code, refused.err), (1, f'plan.json:1: finds.1: "{lower}" stands twice; legal: distinct '
                                                              "texts, ignoring case\n"))

    # ---- the machine's settings ----

    def german(self):
        """A locale with a decimal comma: the machine's own, else one made for this test, else whatever the machine has."""
        if b"de_DE.utf8" in subprocess.run(["locale", "-a"], capture_output=True).stdout:
            return {"LC_ALL": "de_DE.UTF-8"}
        if shutil.which("localedef") and os.path.exists("/usr/share/i18n/locales/de_DE"):
            made = subprocess.run(["localedef", "-c", "--no-archive", "-i", "de_DE", "-f", "UTF-8",
                                   str(self.bench.path("de_DE.UTF-8"))], capture_output=True)
            if made.returncode <= 1:
                return {"LC_ALL": "de_DE.UTF-8", "LOCPATH": str(self.bench.folder)}
        return {"LC_ALL": "POSIX"}

    def everything(self, file, environment):
        """What each command says of the same survey played again."""
        said = [self.bench.new(file=file, environment=environment)]
        said.append(self.bench.log([{"pit": "T1-1", "depth_cm": "30.5"}, {"pit": "T5-1", "x": "5.5", "y": "44.25", "moved": "root"},
                                    {"pit": "T2-3", "find:flint": 2, "weight:flint": "1.25"}], file, environment=environment))
        for arguments in (["next"], ["next", "--json", "--from", "12.5,7.25"], ["tally"], ["tally", "--json"], ["check"]):
            said.append(self.bench.done(arguments[0], file, *arguments[1:], environment=environment))
        return [(ran.out.replace(file, "FILE"), ran.err) for ran in said]

    def test_the_same_in_a_locale_with_decimal_commas(self):
        self.assertEqual(self.everything("german.gpkg", self.german()), self.everything("plain.gpkg", {"LC_ALL": "C"}))

    def test_the_same_in_every_time_zone_of_the_machine(self):
        self.assertEqual(self.everything("tokyo.gpkg", {"TZ": "Asia/Tokyo"}), self.everything("utc.gpkg", {"TZ": "UTC"}))

    def test_a_clock_that_is_no_time_is_refused(self):
        self.bench.new()
        said = self.bench.run("next", "survey.gpkg", clock="noon")
        self.assertEqual((said.code, said.out, len(said.lines)), (1, "", 1))
        self.assertIn("NEARPIT_CLOCK", said.err)
        self.assertIn('"noon"', said.err)


if __name__ == "__main__":
    unittest.main()
