"""Nothing that was said to be saved is lost, and nothing that was changed behind the program's back goes unseen: file modes,
tampering, a clock set back, two programs at once, an old copy, a full disk, kill -9."""

import os
import random
import resource
import signal
import sqlite3
import subprocess
import time
import unittest
from contextlib import closing

from survey_runner import NEARPIT, Bench, small_plan

PITS = [f"T{row}-{column}" for row in range(1, 6) for column in range(1, 7)]


def every_pit_plan():
    """All 30 pits are grid pits, so that any may be logged."""
    return small_plan(initial={"draw": "pits", "count": {"all": 30}, "seed": 1})


class Safety(unittest.TestCase):
    maxDiff = None

    def setUp(self):
        self.bench = Bench()
        self.addCleanup(self.bench.close)

    def file(self, name="survey.gpkg"):
        return closing(sqlite3.connect(self.bench.path(name)))

    def behind_the_back(self, statement, *values, name="survey.gpkg"):
        """Changes the log as somebody would who takes the triggers away and puts them back."""
        with self.file(name) as file:
            triggers = file.execute("SELECT name, sql FROM sqlite_schema WHERE type = 'trigger'").fetchall()
            for trigger, _ in triggers:
                file.execute(f'DROP TRIGGER "{trigger}"')
            file.execute(statement, values)
            for _, sql in triggers:
                file.execute(sql)
            file.commit()

    def revisions(self, name="survey.gpkg"):
        with self.file(name) as file:
            return file.execute("SELECT object, writer, seq, clock FROM nearpit_revision ORDER BY number").fetchall()

    def recorded(self, name="survey.gpkg"):
        return {row[0].removeprefix("pit/") for row in self.revisions(name)}

    def whole(self, name="survey.gpkg"):
        report = self.bench.check(name)
        self.assertEqual((report.code, report.json()["whole"]), (0, True), report)
        return report.json()

    def not_whole(self, kind, where):
        """check exits 1, prints its object all the same, and names what is wrong where."""
        report = self.bench.check()
        self.assertEqual(report.code, 1)
        answer = report.json()
        self.assertEqual(set(answer), {"whole", "complete", "problems"})
        self.assertEqual((answer["whole"], answer["complete"]), (False, False))
        for problem in answer["problems"]:
            self.assertEqual(set(problem), {"kind", "where", "what", "do"})
            self.assertTrue(all(isinstance(text, str) and text for text in problem.values()), problem)
        self.assertIn(kind, [problem["kind"] for problem in answer["problems"] if where in problem["where"]])
        self.assertEqual(len(report.lines), 1, "one line on standard error")
        words = self.bench.run("check", "survey.gpkg", "--all-errors")
        self.assertEqual((words.code, words.out, len(words.lines)), (1, "", len(answer["problems"])))
        return answer

    # ---- the file ----

    def test_files_are_private(self):
        old = os.umask(0)
        self.addCleanup(os.umask, old)
        self.bench.new()
        self.bench.log([{"pit": "T1-1"}])
        self.assertEqual(self.bench.path("survey.gpkg").stat().st_mode & 0o777, 0o600)
        remembered = list((self.bench.config / "nearpit").iterdir())
        self.assertEqual([path.stat().st_mode & 0o777 for path in remembered], [0o600])
        self.assertEqual([path.name for path in self.bench.folder.glob("*gpkg*")], ["survey.gpkg"], "no journal is left")

    def test_check_says_what_the_plan_requires(self):
        self.bench.new(small_plan(record={"require": ["depth_cm", "stop"]}))
        self.bench.log([{"pit": "T1-1", "depth_cm": 30}, {"pit": "T5-1", "status": "not_dug", "reason": "slope"}])
        answer = self.whole()
        self.assertEqual((answer["complete"], answer["problems"]), (False, [
            {"kind": "blank", "where": "T1-1", "what": "the plan requires stop", "do": "log the pit again with it"}]))
        self.bench.log([{"pit": "T1-1", "stop": "bedrock"}])
        self.assertEqual(self.whole(), {"whole": True, "complete": True, "problems": []})

    # ---- changed behind the back ----

    def some_records(self):
        self.bench.new()
        for rows in ([{"pit": "T1-1"}], [{"pit": "T2-3", "find:flint": 2}], [{"pit": "T5-1"}]):
            self.bench.log(rows)

    def test_the_file_refuses_changes_of_its_log(self):
        self.some_records()
        with self.file() as file:
            for statement in ("UPDATE nearpit_revision SET body = '{}'", "DELETE FROM nearpit_revision",
                              "INSERT OR REPLACE INTO nearpit_revision SELECT * FROM nearpit_revision"):
                with self.assertRaises(sqlite3.IntegrityError):
                    file.execute(statement)
        self.whole()

    def test_check_sees_a_changed_byte_of_a_record(self):
        self.some_records()
        self.behind_the_back("UPDATE nearpit_revision SET body = replace(body, '\"flint\":2', '\"flint\":3') WHERE seq = 2")
        self.not_whole("chain", "revision 2")

    def test_check_sees_a_record_taken_out(self):
        self.some_records()
        self.behind_the_back("DELETE FROM nearpit_revision WHERE seq = 2")
        self.not_whole("gap", "revision 3")

    def test_check_sees_the_last_record_taken_out(self):
        """The chain can't: what comes last in it is missed by nobody. The layers are."""
        self.some_records()
        self.behind_the_back("DELETE FROM nearpit_revision WHERE seq = 3")
        self.not_whole("layer", "T5-1")

    def test_check_sees_a_changed_layer(self):
        self.some_records()
        with self.file() as file:
            file.execute("UPDATE pits SET outcome = 'negative' WHERE label = 'T2-3'")
            file.commit()
        answer = self.not_whole("layer", "T2-3")
        self.assertEqual(len(answer["problems"]), 1)
        self.assertIn('"outcome" is "negative", the record says "positive"', answer["problems"][0]["what"])

    def test_check_sees_a_trigger_taken_away(self):
        self.some_records()
        with self.file() as file:
            file.execute("DROP TRIGGER nearpit_revision_no_delete")
            file.commit()
        self.not_whole("schema", "nearpit_revision_no_delete")

    def test_check_of_a_file_cut_short_prints_its_object_too(self):
        self.some_records()
        whole = self.bench.path("survey.gpkg").read_bytes()
        self.bench.write("survey.gpkg", whole[:len(whole) // 2])
        report = self.bench.check()
        self.assertEqual((report.code, report.json()["whole"], len(report.lines)), (1, False, 1))

    # ---- clocks and copies ----

    def test_a_clock_set_back_keeps_the_order(self):
        self.bench.new()
        self.bench.log([{"pit": "T1-1", "find:flint": 1}], clock="2026-05-04T12:00:00+00:00")
        self.bench.log([{"pit": "T1-1", "find:flint": 0}], clock="2025-01-01T00:00:00+00:00")
        self.bench.log([{"pit": "T1-1", "find:flint": 5}], clock="2025-01-01T00:00:00+00:00")
        clocks = [row[3] for row in self.revisions()]
        self.assertEqual(clocks, sorted(set(clocks)))
        self.whole()
        self.assertEqual(self.bench.tally()["clusters"][0]["finds"]["flint"], 5, "the last word holds")

    def test_an_old_copy_goes_on_as_a_new_writer(self):
        self.bench.new()
        self.bench.log([{"pit": "T1-1"}])
        self.bench.copy("survey.gpkg", "old.gpkg")
        self.bench.log([{"pit": "T2-3"}])
        said = self.bench.log([{"pit": "T5-1"}], file="old.gpkg")
        self.assertEqual(said.lines, [
            "note: this copy of the survey does not hold what this device last wrote (an older or another copy): it goes on as a "
            "new writer, and the copies can be merged later"])
        self.assertEqual(len({row[1] for row in self.revisions("old.gpkg")}), 2)
        self.assertEqual(self.bench.log([{"pit": "T4-5"}], file="old.gpkg").err, "", "said once")
        self.whole("old.gpkg")
        self.whole()

    def test_a_copy_of_now_goes_on_in_silence(self):
        self.bench.new()
        self.bench.log([{"pit": "T1-1"}])
        self.bench.copy("survey.gpkg", "copy.gpkg")
        self.assertEqual(self.bench.log([{"pit": "T5-1"}], file="copy.gpkg").err, "")
        self.assertEqual(len({row[1] for row in self.revisions("copy.gpkg")}), 1)

    def test_another_device_is_another_writer(self):
        self.bench.new()
        self.bench.log([{"pit": "T1-1"}])
        said = self.bench.log([{"pit": "T5-1"}], environment={"XDG_CONFIG_HOME": str(self.bench.path("tablet"))})
        self.assertEqual(said.err, "")
        self.assertEqual([row[1:3] for row in self.revisions()], [(row[1], 1) for row in self.revisions()])
        self.assertEqual(len({row[1] for row in self.revisions()}), 2)
        self.whole()

    # ---- several at once, a full disk, a sudden end ----

    def test_two_programs_at_once_lose_nothing(self):
        self.bench.new(every_pit_plan())
        tables = [self.bench.table([{"pit": pit} for pit in PITS[part::4]]) for part in range(4)]
        running = [self.bench.start("log", "survey.gpkg", table) for table in tables]
        ended = [process.communicate(timeout=60) + (process.returncode,) for process in running]
        saved = {pit for part, (out, err, code) in enumerate(ended) if code == 0 for pit in PITS[part::4]}
        for out, err, code in ended:
            if code != 0:
                self.assertEqual((code, out), (1, b""))
                self.assertRegex(err.decode(), r"\Asurvey\.gpkg: another program is using the file.*nothing was saved.*\n\Z")
        self.assertTrue(saved)
        self.assertEqual(self.recorded(), saved)
        self.whole()

    def full_disk_says_so(self, said, before):
        self.assertEqual((said.code, said.out), (1, ""))
        self.assertEqual(len(said.lines), 1)
        self.assertRegex(said.err, r"\A\S*survey\.gpkg: the disk (is full|refused to read or write).*; nothing was saved; .*\n\Z")
        self.assertEqual(self.recorded(), before)
        self.whole()

    def long_table(self):
        return self.bench.table([{"pit": pit, "note": "clay " * 700, "find:flint": 1} for pit in PITS])

    def test_a_limit_on_the_file_leaves_the_survey_whole(self):
        self.bench.new(every_pit_plan())
        self.bench.log([{"pit": "T1-1"}])
        most = self.bench.path("survey.gpkg").stat().st_size + 4096

        def limited():
            signal.signal(signal.SIGXFSZ, signal.SIG_IGN)
            resource.setrlimit(resource.RLIMIT_FSIZE, (most, most))
        said = self.bench.run("log", "survey.gpkg", self.long_table(), preexec_fn=limited, restore_signals=False)
        self.full_disk_says_so(said, {"T1-1"})
        self.bench.done("log", "survey.gpkg", self.long_table())

    def test_a_full_disk_leaves_the_survey_whole(self):
        disk = self.bench.path("disk")
        disk.mkdir()
        mount = "mount -t tmpfs -o size=400k none disk"
        if subprocess.run(["unshare", "-Urm", "sh", "-c", mount], cwd=self.bench.folder, capture_output=True).returncode != 0:
            self.skipTest("no disk of our own can be mounted here")
        self.bench.new(every_pit_plan())
        self.bench.log([{"pit": "T1-1"}])
        script = (f"{mount} && cp survey.gpkg disk && '{NEARPIT}' log disk/survey.gpkg {self.long_table()}; code=$?; "
                  "cp disk/survey.gpkg survey.gpkg; exit $code")
        done = subprocess.run(["unshare", "-Urm", "sh", "-c", script], cwd=self.bench.folder, capture_output=True,
                              env=self.bench.environment())
        self.assertEqual(done.stdout, b"")
        said = type("Said", (), {"code": done.returncode, "out": "", "err": done.stderr.decode(),
                                 "lines": done.stderr.decode().splitlines()})
        self.full_disk_says_so(said, {"T1-1"})

    def test_an_output_that_takes_nothing(self):
        """Reading failed; writing did not, and says so."""
        self.bench.new()
        with open("/dev/full", "wb") as full:
            for arguments in (["next"], ["tally", "--json"], ["check", "--json"]):
                said = self.bench.run(arguments[0], "survey.gpkg", *arguments[1:], stdout=full)
                self.assertEqual((said.code, said.err), (1, "standard output can't be written\n"))
            said = self.bench.run("log", "survey.gpkg", self.bench.table([{"pit": "T1-1"}]), stdout=full)
        self.assertEqual((said.code, said.err), (1, "everything is saved; only standard output can't be written\n"))
        self.assertEqual(self.recorded(), {"T1-1"})

    def test_kill_leaves_what_was_said_to_be_saved(self):
        seed = random.SystemRandom().randrange(1 << 32)
        print(f"kill: seed {seed}")
        chance = random.Random(seed)
        self.bench.new(every_pit_plan())
        tables = [self.bench.table([{"pit": pit, "note": "loam " * 50}]) for pit in PITS]
        begun = time.monotonic()
        self.bench.done("log", "survey.gpkg", tables[0])
        usual = time.monotonic() - begun
        acknowledged, tried = {PITS[0]}, {PITS[0]}
        for pit, table in zip(PITS[1:], tables[1:]):
            process = self.bench.start("log", "survey.gpkg", table)
            tried.add(pit)
            time.sleep(chance.uniform(0.3, 1.6) * usual)
            process.kill()
            out, _ = process.communicate(timeout=60)
            if out:
                acknowledged.add(pit)
        self.bench.done("next", "survey.gpkg")  # takes back a save that was cut off
        recorded = self.recorded()
        self.assertLessEqual(acknowledged, recorded)
        self.assertLessEqual(recorded, tried)
        print(f"kill: {len(recorded)} of {len(tried)} were saved, {len(acknowledged)} said so")
        self.whole()
        self.bench.log([{"pit": "T1-1", "why": "and on"}])
        self.whole()


if __name__ == "__main__":
    unittest.main()
