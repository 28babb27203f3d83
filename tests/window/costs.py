"""What the window costs on a large survey, measured from outside: time to the first frame, processor time while nothing happens, memory. Run by hand, on a
machine with nothing else to do:

    python3 tests/window/costs.py [--idle SECONDS] [--nodes 10000,1000000]

Bars (they are about a release build, drawn in software): a first frame within 1 s at 10,000 nodes, idle under 1 % of a core over 30 s with no frame drawn,
under 200 MB at any size."""

import argparse
import json
import os
import statistics
import sys
import time
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parent))
from window_runner import SCALE_1, Screen, Window, middle
from survey_runner import Bench, rectangle, small_plan

SPACING_M = 10
FIRST_STARTS = 5
DRAG_STEPS = 20
BARS = {"first frame, s": 1, "idle, % of a core": 1, "frames while idle": 0, "resident, MB": 200, "own, MB": 200}


def make_survey(bench, nodes):
    """Square, a first sample of 400 or a fiftieth of the nodes, half of it dug, one in fifteen positive. Invented."""
    side = round(nodes ** 0.5)
    count = max(400, nodes // 50)
    far = side * SPACING_M
    plan = small_plan(boundary=rectangle(0, 0, far, far), initial={"draw": "pits", "count": {"all": count}, "seed": 11})
    bench.new(plan)
    pits = bench.due()[:count // 2]
    bench.log([{"pit": pit, "find:flint": 1 if number % 15 == 0 else 0} for number, pit in enumerate(pits)])
    return len(pits)


def processor_s(pid):
    """User and system time of all its threads (proc(5), /proc/PID/stat, fields 14 and 15)."""
    fields = Path(f"/proc/{pid}/stat").read_text().rsplit(")", 1)[1].split()
    return (int(fields[11]) + int(fields[12])) / os.sysconf("SC_CLK_TCK")


def memory_mb(pid):
    """Resident; shared pages by share; and what is nobody else's: anonymous pages."""
    lines = (line.split() for line in Path(f"/proc/{pid}/smaps_rollup").read_text().splitlines()[1:])
    kb = {words[0].rstrip(":"): int(words[1]) for words in lines}
    return {"resident, MB": kb["Rss"] / 1024, "by share, MB": kb["Pss"] / 1024, "own, MB": kb["Anonymous"] / 1024}


def idle(window, seconds):
    window.settle()
    before = processor_s(window.process.pid)
    begun = time.monotonic()
    frames = 0
    while time.monotonic() - begun < seconds:
        time.sleep(0.25)
        if window.changed():
            frames += 1
            window.read()
    used = processor_s(window.process.pid) - before
    return {"idle, % of a core": 100 * used / (time.monotonic() - begun), "frames while idle": frames}


def drag(window):
    """From a movement of the pressed pointer to the settled frame after it: some frames, not one, and xdotool's own time."""
    x, y = middle(window.control("map/ground").box)
    window.press(x, y)
    took = []
    for step in range(1, DRAG_STEPS + 1):
        begun = time.monotonic()
        window.event("mousemove", round(x + 4 * step), round(y + 3 * step))
        took.append(time.monotonic() - begun)
    window.let_go()
    return {"drag to settled, ms (median)": 1000 * statistics.median(took)}


def measure(nodes, idle_s):
    bench = Bench()
    try:
        recorded = make_survey(bench, nodes)
        with Screen(1280, 800) as screen:
            window = Window(screen, bench)
            window.remember(px_per_mm=1.5 * SCALE_1)
            took = []
            for _ in range(FIRST_STARTS):
                took.append(window.start("survey.gpkg"))
                window.kill()
            window.start("survey.gpkg")
            row = {"nodes": nodes, "recorded": recorded, "first frame, s": statistics.median(took)}
            row |= idle(window, idle_s) | memory_mb(window.process.pid) | drag(window)
            row["resident after drag, MB"] = memory_mb(window.process.pid)["resident, MB"]
            window.close()
        return row
    finally:
        bench.close()


def main():
    options = argparse.ArgumentParser(description=__doc__.split("\n")[0])
    options.add_argument("--idle", type=float, default=30, metavar="SECONDS")
    options.add_argument("--nodes", default="10000,1000000", help="sizes of the surveys, squares of whole numbers")
    options.add_argument("--json", action="store_true")
    chosen = options.parse_args()
    rows = [measure(int(nodes), chosen.idle) for nodes in chosen.nodes.split(",")]
    if chosen.json:
        print(json.dumps(rows, indent=1))
        return
    for name in rows[0]:
        bar = f"  (bar {BARS[name]})" if name in BARS else ""
        print(f"{name:30}" + "".join(f"{row[name]:14.2f}" if isinstance(row[name], float) else f"{row[name]:14}"
                                     for row in rows) + bar)


if __name__ == "__main__":
    main()
