"""Every bad input of bad_inputs/*.txt is refused with the very lines that stand there, the exit code that stands there,
nothing on standard output, and the folder as it was to the byte.

A file of cases: '== name' begins a case, '#' a remark. '- text' lines are a piece of the base (it stands there once) and the
'+ text' lines under them take its place; '| text' lines are a whole input; '%' says that these hold escapes such as \\x00; '$ arguments' is
the command line; '= 2' the exit code when it is not 1; '> line' what is printed with --all-errors, a line each. Without
--all-errors it is the first of them and how many more there are."""

import ast
import json
import os
import shlex
import sys
import unittest
from pathlib import Path

from survey_runner import Bench

CASES = Path(__file__).with_name("bad_inputs")
LEAST = {"plans": 25, "tables": 30, "actions": 10, "usage": 8}


class Case:
    def __init__(self, name, line):
        self.name, self.line = name, line
        self.changes, self.whole, self.lines = [], [], []
        self.escaped, self.arguments, self.code = False, None, 1

    def take(self, mark, text):
        if mark == "-":
            if not self.changes or self.changes[-1][1]:
                self.changes.append(([], []))
            self.changes[-1][0].append(text)
        elif mark == "+":
            self.changes[-1][1].append(text)
        elif mark == "|":
            self.whole.append(text)
        elif mark == "%":
            self.escaped = True
        elif mark == "$":
            self.arguments = shlex.split(text)
        elif mark == "=":
            self.code = int(text)
        elif mark == ">":
            self.lines.append(text)
        else:
            raise ValueError(f"line begins with {mark!r}")

    def input(self, base):
        """The bytes of the bad input."""
        if self.whole:
            text = "\n".join(self.whole) + "\n"
            return ast.literal_eval(f"b'''{text}'''") if self.escaped else text.encode("utf-8")
        text = base
        for old_lines, new_lines in self.changes:
            old = "\n".join(old_lines)
            if text.count(old) != 1:
                raise ValueError(f"{self.name}: {old!r} stands {text.count(old)} times in the base")
            text = text.replace(old, "\n".join(new_lines))
        return text.encode("utf-8")

    def expected(self, all_errors):
        if all_errors or len(self.lines) == 1:
            return self.lines
        return [f"{self.lines[0]} (and {len(self.lines) - 1} more)"]


def read_cases(kind):
    """The base text (from the case named 'base') and the other cases."""
    cases = []
    for number, line in enumerate((CASES / f"{kind}.txt").read_text("utf-8").splitlines(), 1):
        if line.startswith("== "):
            cases.append(Case(line[3:], number))
        elif line and not line.startswith("#"):
            cases[-1].take(line[0], line[2:])
    base = "".join(f"{line}\n" for case in cases if case.name == "base" for line in case.whole)
    return base, [case for case in cases if case.name != "base"]


def state_of(folder):
    """Every file below with its bytes, every folder and link."""
    state = {}
    for root, folders, files in os.walk(folder):
        for name in folders + files:
            path = Path(root) / name
            state[str(path)] = os.readlink(path) if path.is_symlink() else path.is_file() and path.read_bytes()
    return state


class BadInputs(unittest.TestCase):
    maxDiff = None

    @classmethod
    def setUpClass(cls):
        cls.bench = bench = Bench()
        cls.plan, cls.plans = read_cases("plans")
        bench.write("survey_plan.json", cls.plan)
        bench.done("new", "survey_plan.json", "survey.gpkg")
        setup, _ = read_cases("setup")
        for step in setup.split("----\n"):
            first, _, rest = step.partition("\n")
            bench.write(f"setup.{first}", rest)
            bench.done("log" if first == "csv" else "act", "survey.gpkg", f"setup.{first}")
        cls.make_odd_files(bench)

    @classmethod
    def make_odd_files(cls, bench):
        whole = bench.path("survey.gpkg").read_bytes()
        bench.path("folder").mkdir()
        bench.path("folder.gpkg").mkdir()
        bench.path("link.gpkg").symlink_to("survey.gpkg")
        bench.write("text.gpkg", "this is a letter, not a survey\n")
        bench.write("empty.gpkg", b"")
        bench.write("cut.gpkg", whole[:len(whole) // 2])
        bench.write("good.csv", "pit\nT5-1\n")
        bench.write("good.json", json.dumps({"action": "reopen_area", "by": "M", "why": "dry", "area": "alder carr"}))
        for name in ("good.csv", "good.json", "link.gpkg", "cut.gpkg"):
            assert bench.path(name).exists()

    @classmethod
    def tearDownClass(cls):
        cls.bench.close()

    def refuse(self, kind, case, arguments):
        before = state_of(self.bench.folder)
        for all_errors in (False, True):
            with self.subTest(kind=kind, case=case.name, line=case.line, all_errors=all_errors):
                ran = self.bench.run(*arguments, *(["--all-errors"] if all_errors and case.code == 1 else []),
                                     clock=self.clock_of(case))
                self.assertEqual(ran.lines, case.expected(all_errors or case.code != 1))
                self.assertEqual((ran.code, ran.out), (case.code, ""))
                self.assertTrue(ran.err.endswith("\n"))
        with self.subTest(kind=kind, case=case.name, line=case.line, left="the folder as it was"):
            after = state_of(self.bench.folder)
            self.assertEqual(sorted(after), sorted(before))
            self.assertTrue(after == before, "a file was changed")

    def clock_of(self, case):
        return None

    def enough(self, kind, cases):
        self.assertGreaterEqual(len(cases), LEAST[kind])
        self.assertEqual(len({case.name for case in cases}), len(cases), "each case has a name of its own")

    def test_plans(self):
        self.enough("plans", self.plans)
        for case in self.plans:
            self.bench.write("plan.json", case.input(self.plan))
            self.refuse("plans", case, ["new", "plan.json", "fresh.gpkg"])

    def test_tables(self):
        base, cases = read_cases("tables")
        self.enough("tables", cases)
        for case in cases:
            self.bench.write("pits.csv", case.input(base))
            self.refuse("tables", case, ["log", "survey.gpkg", "pits.csv"])

    def test_actions(self):
        base, cases = read_cases("actions")
        self.enough("actions", cases)
        for case in cases:
            self.bench.write("action.json", case.input(base))
            self.refuse("actions", case, ["act", "survey.gpkg", "action.json"])

    def test_usage(self):
        _, cases = read_cases("usage")
        self.enough("usage", cases)
        for case in cases:
            before = state_of(self.bench.folder)
            with self.subTest(kind="usage", case=case.name, line=case.line):
                ran = self.bench.run(*case.arguments)
                self.assertEqual(ran.lines, case.expected(False))
                self.assertEqual((ran.code, ran.out), (case.code, ""))
                self.assertEqual(state_of(self.bench.folder), before)

    def test_the_bases_are_good(self):
        """Else a case could be refused for something that it does not say."""
        for kind, command in (("tables", "log"), ("actions", "act")):
            base, _ = read_cases(kind)
            self.bench.copy("survey.gpkg", f"{kind}.gpkg")
            self.bench.write(f"base.{kind}", base)
            self.bench.done(command, f"{kind}.gpkg", f"base.{kind}")
            self.bench.path(f"{kind}.gpkg").unlink()


def show(kind, name):
    """What the program prints today for the cases of a kind, to be judged before it is written down."""
    BadInputs.setUpClass()
    bench = BadInputs.bench
    base, cases = read_cases(kind)
    for case in cases:
        if name and name not in case.name:
            continue
        files = {"plans": "plan.json", "tables": "pits.csv", "actions": "action.json"}
        if kind in files:
            bench.write(files[kind], case.input(base))
        arguments = {"plans": ["new", "plan.json", "fresh.gpkg", "--all-errors"],
                     "tables": ["log", "survey.gpkg", "pits.csv", "--all-errors"],
                     "actions": ["act", "survey.gpkg", "action.json", "--all-errors"]}.get(kind, case.arguments)
        ran = bench.run(*arguments)
        print(f"== {case.name} ({case.line}): exit {ran.code} {ran.out}")
        for line in ran.lines:
            print(f"> {line}")
    BadInputs.tearDownClass()


if __name__ == "__main__":
    if sys.argv[1:2] == ["--show"]:
        show(sys.argv[2], sys.argv[3] if len(sys.argv) > 3 else "")
    else:
        unittest.main()
