"""Runs the program for the tests of this folder: each Bench has a folder of its own for surveys and for what the program
remembers, takes the binary from the environment variable NEARPIT, and gives back exit code, output and error lines."""

import csv
import io
import json
import os
import shutil
import subprocess
import sys
import tempfile
from pathlib import Path

SOURCE = Path(os.environ.get("NEARPIT_SOURCE") or Path(__file__).resolve().parents[2])
NEARPIT = os.environ.get("NEARPIT") or str(SOURCE / "build" / "dev" / "nearpit")
NOON = "2026-05-04T12:00:00+00:00"
MEMORY = "/dev/shm"  # no test waits for a disk where there is one in memory


class Ran:
    """What one call of the program left behind."""

    def __init__(self, done):
        self.code = done.returncode
        self.out = done.stdout.decode("utf-8")
        self.err = done.stderr.decode("utf-8")
        self.lines = self.err.splitlines()

    def json(self):
        return json.loads(self.out)

    def __repr__(self):
        return f"exit {self.code}\nout: {self.out}\nerr: {self.err}"


class Bench:
    """A folder for one test, gone when the test is over."""

    def __init__(self, clock=NOON):
        self.folder = Path(tempfile.mkdtemp(prefix="nearpit-test-", dir=MEMORY if os.access(MEMORY, os.W_OK) else None))
        self.clock = clock
        self.config = self.folder / "config"
        self.numbers = 0

    def close(self):
        shutil.rmtree(self.folder, ignore_errors=True)

    def path(self, name):
        return self.folder / name

    def write(self, name, content):
        path = self.path(name)
        path.write_bytes(content if isinstance(content, bytes) else content.encode("utf-8"))
        return path

    def environment(self, clock=None, **more):
        environment = {"PATH": os.environ.get("PATH", "/usr/bin"), "HOME": str(self.folder), "LC_ALL": "C.UTF-8",
                       "XDG_CONFIG_HOME": str(self.config), "NEARPIT_CLOCK": clock or self.clock}
        environment.update(more)
        # A build with sanitizers, and libraries in places of their own.
        for name in ("ASAN_OPTIONS", "UBSAN_OPTIONS", "LD_LIBRARY_PATH", "PROJ_LIB", "PROJ_DATA"):
            if name in os.environ:
                environment.setdefault(name, os.environ[name])
        return environment

    def start(self, *arguments, clock=None, environment=None, **options):
        command = [NEARPIT, *(argument if isinstance(argument, bytes) else str(argument) for argument in arguments)]
        options.setdefault("stdout", subprocess.PIPE)
        return subprocess.Popen(command, cwd=self.folder, stdin=subprocess.DEVNULL, stderr=subprocess.PIPE,
                                env=self.environment(clock, **(environment or {})), **options)

    def run(self, *arguments, **options):
        process = self.start(*arguments, **options)
        out, err = process.communicate(timeout=120)
        return Ran(subprocess.CompletedProcess(process.args, process.returncode, out or b"", err))

    def done(self, *arguments, **options):
        """Runs what must succeed."""
        ran = self.run(*arguments, **options)
        if ran.code != 0:
            raise AssertionError(f"nearpit {' '.join(map(str, arguments))}: {ran!r}")
        return ran

    def new(self, plan=None, file="survey.gpkg", **options):
        self.write("plan.json", json.dumps(plan or small_plan(), ensure_ascii=False, indent=1))
        return self.done("new", "plan.json", file, **options)

    def log(self, rows, file="survey.gpkg", **options):
        return self.done("log", file, self.table(rows), **options)

    def act(self, actions, file="survey.gpkg", **options):
        return self.done("act", file, self.actions(actions), **options)

    def table(self, rows):
        self.numbers += 1
        return self.write(f"pits-{self.numbers}.csv", table_text(rows)).name

    def actions(self, actions):
        self.numbers += 1
        return self.write(f"action-{self.numbers}.json", json.dumps(actions, ensure_ascii=False)).name

    def next(self, *options, file="survey.gpkg", **more):
        return self.done("next", file, "--json", *options, **more).json()

    def due(self, *options, file="survey.gpkg"):
        return [pit["pit"] for pit in self.next(*options, file=file)["due"]]

    def tally(self, *options, file="survey.gpkg", **more):
        return self.done("tally", file, "--json", *options, **more).json()

    def check(self, file="survey.gpkg"):
        return self.run("check", file, "--json")

    def copy(self, source, target):
        shutil.copyfile(self.path(source), self.path(target))


def table_text(rows):
    """A table of pits from dicts; the columns are the keys in order of their first use."""
    columns = list(dict.fromkeys(key for row in rows for key in row))
    text = io.StringIO()
    writer = csv.DictWriter(text, columns, lineterminator="\r\n")
    writer.writeheader()
    writer.writerows(rows)
    return text.getvalue()


def rectangle(left, low, right, high):
    return {"type": "Polygon", "coordinates": [[[left, low], [right, low], [right, high], [left, high], [left, low]]]}


def small_plan(**changes):
    """30 pits in 5 rows of 6, ten metres apart, T1-1 at (5, 5); a first sample of four. Invented."""
    plan = {
        "survey": "Heron Carr (invented)",
        "crs": "local",
        "boundary": rectangle(0, 0, 60, 50),
        "lattice": {"kind": "square", "spacing_m": 10, "origin": [5, 5]},
        "neighbours": 8,
        "pit": {"shape": "square", "size_m": 0.5},
        "finds": ["flint", "pottery", "modern"],
        "positive": {"finds": ["flint", "pottery"], "at_least": 1},
        "initial": {"draw": "listed", "as": "pits", "pits": ["T1-1", "T2-3", "T4-5", "T5-1"],
                    "how": "slips drawn from a hat"},
    }
    plan.update(changes)
    return {key: value for key, value in plan.items() if value is not None}


def skip(reason):
    """Ends the whole script as skipped."""
    print(f"skipped: {reason}")
    sys.exit(77)
