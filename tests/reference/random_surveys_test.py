#!/usr/bin/python3
"""Plays random surveys through the real program and compares every answer with the oracle.

    NEARPIT=path/to/nearpit [NEARPIT_SURVEYS=40] [NEARPIT_SEED=n] /usr/bin/python3 random_surveys_test.py

The seed is printed. Survey k of a run is played from seed + k, so NEARPIT_SEED=<that> NEARPIT_SURVEYS=1 plays it again. On a
mismatch the survey's files stay in a folder that is named, with `replay.sh` in it.
"""

from collections import Counter
import json
import os
from pathlib import Path
import secrets
import shlex
import shutil
import subprocess
import sys
import tempfile

from oracle import Survey
from random_surveys import Crew
from survey_comparison import differences


class Mismatch(Exception):
    pass


class Program:
    """The program under test, run in a folder of its own, each command at a stated time."""

    def __init__(self, binary, folder):
        self.binary, self.folder = binary, folder
        self.replay = folder / "replay.sh"
        self.replay.write_text("export XDG_CONFIG_HOME=$(mktemp -d) NEARPIT=${NEARPIT:-nearpit}; rm -f survey.gpkg\n")

    def run(self, now, *arguments):
        line = " ".join(map(shlex.quote, arguments))
        with self.replay.open("a") as replay:
            replay.write(f"NEARPIT_CLOCK={now} $NEARPIT {line}\n")
        environment = {**os.environ, "XDG_CONFIG_HOME": str(self.folder / "config"), "NEARPIT_CLOCK": now}
        return subprocess.run([self.binary, *arguments], cwd=self.folder, env=environment, capture_output=True, text=True, timeout=60)

    def done(self, now, *arguments):
        result = self.run(now, *arguments)
        if result.returncode != 0:
            raise Mismatch(f"{' '.join(arguments)}: exit {result.returncode}, expected 0: {result.stderr.strip()}")
        return result.stdout

    def refused(self, now, rule, *arguments):
        result = self.run(now, *arguments)
        if result.returncode != 1 or result.stdout or len(result.stderr.strip().splitlines()) != 1:
            raise Mismatch(f"{' '.join(arguments)}: {rule} must exit 1 with one line on standard error and nothing on standard output; "
                           f"exit {result.returncode}, output {result.stdout[:200]!r}, error {result.stderr[:500]!r}")

    def answer(self, now, *arguments):
        return json.loads(self.done(now, *arguments, "--json"))


def start(program, crew):
    """Makes the survey file; the oracle takes the first sample from the program's first dig list."""
    (program.folder / "plan.json").write_text(json.dumps(crew.plan, indent=1))
    now = crew.tick()
    program.done(now, "new", "plan.json", "survey.gpkg")
    labels = [row["pit"] for row in program.answer(now, "next", "survey.gpkg")["due"]]
    survey = Survey(crew.plan, labels, crew.frame)
    if set(labels) != {crew.frame.label[node] for node in survey.first_sample}:
        raise Mismatch("the first sample is not made of whole primary units, or not of the listed ones")
    for name, stratum in zip(crew.frame.area_names, survey.strata):
        if crew.plan["initial"].get("count", {}).get(name, stratum.count) != stratum.count:
            raise Mismatch(f"area {name}: {stratum.count} units drawn, the plan says {crew.plan['initial']['count'][name]}")
    return survey, now


def compare(program, survey, now, what):
    found = differences(survey, program.answer(now, "next", "survey.gpkg"), program.answer(now, "tally", "survey.gpkg"))
    if not program.answer(now, "check", "survey.gpkg")["whole"]:
        found.append("check: not whole")
    if found:
        raise Mismatch(f"after {what}:\n  " + "\n  ".join(found))


def play(program, crew, seen):
    survey, now = start(program, crew)
    compare(program, survey, now, "new")
    for number, step in enumerate(crew.steps(survey), 1):
        name = f"{number:02}.{'csv' if step.command == 'log' else 'json'}"
        text = step.csv_text() if step.command == "log" else json.dumps(step.actions, indent=1)
        (program.folder / name).write_text(text, newline="")
        if step.refused:
            program.refused(step.now, step.refused, step.command, "survey.gpkg", name)
        else:
            program.done(step.now, step.command, "survey.gpkg", name)
        step.apply(survey)
        compare(program, survey, step.now, name + (f" ({step.refused}, refused)" if step.refused else ""))
        seen["refused files" if step.refused else step.command] += 1
    tell_what_was_seen(survey, seen)


def tell_what_was_seen(survey, seen):
    """Counts what the surveys held, so that a generator that stops making networks or refusals shows."""
    initial = survey.plan["initial"]
    progress = survey.progress()
    seen.update({"surveys": 1, survey.plan["lattice"]["kind"]: 1, initial["draw"]: 1, "complete": progress["complete"],
                 "truncated": progress["truncated"], "areas": len(survey.strata) > 1,
                 "networks of several pits": sum(len(c["pits"]) > 1 for c in survey.clusters())})


def main():
    if "NEARPIT" not in os.environ:
        sys.exit("random_surveys_test: set NEARPIT to the program to test, e.g. NEARPIT=build/nearpit")
    binary = str(Path(os.environ["NEARPIT"]).resolve())
    surveys = int(os.environ.get("NEARPIT_SURVEYS", "40"))
    seed = int(os.environ.get("NEARPIT_SEED") or secrets.randbelow(10 ** 9))
    print(f"random_surveys_test: seed {seed}, {surveys} surveys", flush=True)
    seen, failed = Counter(), 0
    for own_seed in range(seed, seed + surveys):
        folder = Path(tempfile.mkdtemp(prefix=f"nearpit-survey-{own_seed}-"))
        try:
            play(Program(binary, folder), Crew(own_seed), seen)
            shutil.rmtree(folder)
        except Mismatch as mismatch:
            failed += 1
            (folder / "mismatch.txt").write_text(f"{mismatch}\n")
            print(f"MISMATCH, NEARPIT_SEED={own_seed} NEARPIT_SURVEYS=1, files in {folder}\n{mismatch}", flush=True)
    print(", ".join(f"{what} {number}" for what, number in sorted(seen.items())))
    print(f"{surveys - failed} of {surveys} surveys agree")
    return 1 if failed else 0


if __name__ == "__main__":
    sys.exit(main())
