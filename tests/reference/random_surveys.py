"""Random days for a random plan: what a crew logs and does, step by step, following the oracle's dig list.

A Step is one command: a CSV for `log`, or actions for `act`; `refused` steps break a rule and must change nothing.
"""

import csv
from dataclasses import dataclass, field
from datetime import datetime, timedelta, timezone
import io
import math
import random

from oracle import Survey
from random_plans import random_plan

GROUND = ["standing_water", "slope", "paved", "disturbed", "bare_ground", "structure"]
ACCESS = ["no_permission", "utility", "hazard", "other"]


@dataclass
class Step:
    command: str  # "log" or "act"
    now: str
    rows: list = field(default_factory=list)  # of a CSV: dicts with the same keys
    actions: list = field(default_factory=list)
    refused: str = ""  # the rule it breaks

    def csv_text(self):
        out = io.StringIO()
        writer = csv.DictWriter(out, list(self.rows[0]), lineterminator="\r\n")
        writer.writeheader()
        writer.writerows(self.rows)
        return out.getvalue()

    def apply(self, survey):
        if self.refused:
            return
        if self.command == "log":
            survey.log(self.rows, self.now)
        for action in self.actions:
            survey.act(action)


def hidden_finds(rng, plan, frame):
    """node -> {find: count}: thin scatter, and clusters round a few hidden seeds."""
    rate = rng.choice([0.02, 0.05, 0.15])
    seeds = rng.sample(frame.nodes, min(len(frame.nodes), rng.randint(0, 4)))
    truth = {}
    for node in frame.nodes:
        near = min((math.dist(frame.place[node], frame.place[s]) / frame.spacing for s in seeds), default=99)
        chance = max(rate, 0.95 if near < 1.2 else 0.7 if near < 1.8 else 0.3 if near < 2.6 else 0)
        truth[node] = {f: rng.choice([1, 1, 2, 3, 5, 12]) for f in plan["finds"] if rng.random() < chance}
    return truth


class Crew:
    """Invents the next step from the survey as it stands; never changes the survey itself."""

    def __init__(self, seed):
        self.rng = random.Random(seed)
        self.plan, self.frame = random_plan(self.rng)
        self.truth = hidden_finds(self.rng, self.plan, self.frame)
        self.clock = datetime(2026, 5, 4, 7, 0, tzinfo=timezone.utc)
        self.days = self.rng.randint(1, 5)
        self.finishes = self.rng.random() < 0.6
        self.access_lost = self.rng.choice([0, 0, 0.04])  # share of pits that nobody lets us dig
        self.judgement_pits = 0
        self.areas_named = 0

    def tick(self, hours=1):
        self.clock += timedelta(hours=hours, minutes=self.rng.randint(1, 50))
        return self.clock.isoformat()

    def steps(self, survey: Survey):
        """Yields steps; the caller applies each to `survey` before asking for the next."""
        for _ in range(self.days):
            for make, chance in ((self.day_of_digging, 1), (self.refused_step, 0.3), (self.corrections, 0.6), (self.deeds, 0.6)):
                step = make(survey) if self.rng.random() < chance else None
                if step:
                    yield step
            self.tick(12)
        while self.finishes and survey.due():
            yield self.day_of_digging(survey, everything=True)

    # A day's file of new pits

    def day_of_digging(self, survey, everything=False):
        rng, now, twin, rows = self.rng, self.tick(), survey.twin(), []
        for _ in range(rng.choice([1, 1, 2, 3])):  # the neighbours that the file itself opens may stand in it too
            taken = {row["pit"] for row in rows}
            due = [n for n in sorted(twin.due()) if self.frame.label[n] not in taken]
            fresh = [self.new_row(node) for node in rng.sample(due, len(due) if everything else math.ceil(len(due) * rng.random()))]
            rows += fresh
            twin.log(fresh, now)
        if not everything:
            rows += self.judgement_rows(twin)
        rng.shuffle(rows)
        return Step("log", now, self.with_one_header(rows)) if rows else None

    def new_row(self, node):
        """A row for a node without record."""
        rng = self.rng
        row = {"pit": rng.choice([self.frame.label[node]] * 4 + ["T%d-%d" % node])}
        kind = rng.random()
        if kind < 0.04 + self.access_lost:
            row.update({"status": "not_dug", "reason": rng.choice(GROUND if kind < 0.04 else ACCESS)})
            row["note"] = "asked at the farm" if row["reason"] == "other" else ""
            return row
        row.update({"find:" + f: str(n) for f, n in self.truth[node].items()})
        self.add_details(row, node)
        return row

    def add_details(self, row, node):
        rng = self.rng
        if rng.random() < 0.2:
            early = self.clock - timedelta(minutes=rng.randint(0, 50))
            row["dug_at"] = early.astimezone(timezone(timedelta(hours=rng.choice([0, 2, -5])))).isoformat()
        if rng.random() < 0.1:
            row.update({"depth_cm": str(rng.randint(10, 90)), "stop": rng.choice(["sterile_subsoil", "bedrock", "roots"])})
        if rng.random() < 0.1:
            row["note"] = rng.choice(["dark soil, \"greasy\"", "two lines\nof note", "Grünsand, tief"])
        if rng.random() < 0.05:
            row["chosen_by"] = rng.choice(["design", "judgement"])  # only what the crew says: a due pit is the design's
        if rng.random() < 0.05:
            x, y = self.frame.place[node]
            angle, far = rng.uniform(0, 2 * math.pi), rng.uniform(0.1, 1.9)
            row.update({"x": f"{x + far * math.cos(angle):.3f}", "y": f"{y + far * math.sin(angle):.3f}", "moved": "tree"})

    def judgement_rows(self, survey):
        rng, rows = self.rng, []
        idle = [n for n in self.frame.nodes if not survey.records.record(n) and n not in survey.due()]
        for node in rng.sample(idle, min(len(idle), rng.choice([0, 0, 1, 2]))):
            rows.append({**self.new_row(node), "chosen_by": "judgement"})
        if rng.random() < 0.2:
            self.judgement_pits += 1
            near = self.frame.place[rng.choice(self.frame.nodes)]
            rows.append({"pit": f"J{self.judgement_pits}", "chosen_by": "judgement",
                         "x": f"{near[0] + rng.uniform(3, 9):.2f}", "y": f"{near[1] - rng.uniform(3, 9):.2f}",
                         "find:" + rng.choice(self.plan["finds"]): str(rng.randint(0, 9))})
        return rows

    def with_one_header(self, rows):
        columns = {c for row in rows for c in row}
        columns |= {c for c in ["status", "bag", "why", "by"] + ["find:" + f for f in self.plan["finds"]] if self.rng.random() < 0.3}
        columns = self.rng.sample(sorted(columns), len(columns))
        return [{c: row.get(c, "") for c in columns} for row in rows]

    def reasons(self):
        return GROUND + (ACCESS if self.access_lost else [])

    # A file of corrections to pits that have a record

    def corrections(self, survey):
        records, label = survey.records, lambda pit: self.frame.label.get(pit, pit)
        recorded = sorted(records.recorded(), key=str)
        if not recorded:
            return None
        some = self.rng.sample(recorded, min(len(recorded), self.rng.randint(1, 4)))
        make = self.rng.choice([self.recounted, self.recounted, self.turned_over, self.taken_back])
        rows = make(records, some, label)
        return Step("log", self.tick(), rows) if rows else None

    def recounted(self, records, pits, label):
        """The lab's counts for some of the finds; other columns are absent and keep their values."""
        finds = self.rng.sample(self.plan["finds"], self.rng.randint(1, len(self.plan["finds"])))
        return [{"pit": label(pit), **{"find:" + f: self.rng.choice(["0", "", "1", "4", "7"]) for f in finds},
                 "why": "lab count"} for pit in pits if records.dug(pit)]

    def turned_over(self, records, pits, label):
        """Not dug becomes dug, dug becomes not dug; every column that matters is given."""
        rows = []
        for pit in pits:
            row = {"pit": label(pit), "status": "not_dug", "reason": self.rng.choice(self.reasons()), "note": "wrong pit sheet",
                   "depth_cm": "", "stop": "", "dug_at": (self.clock - timedelta(minutes=5)).isoformat(), "why": "sheet misread"}
            row.update({"find:" + f: "" for f in self.plan["finds"]})
            if not records.dug(pit):
                row.update({"status": "dug", "reason": ""})
                row.update({"find:" + f: str(self.rng.choice([0, 0, 1, 3])) for f in self.plan["finds"]})
            if "x" not in records.last[pit]:
                rows.append(row)
        return rows

    def taken_back(self, _records, pits, label):
        return [{"pit": label(pit), "status": "withdrawn", "why": "sheet of another day"} for pit in pits]

    # Actions

    def deeds(self, survey):
        twin, actions = survey.twin(), []
        for make in self.rng.sample([self.withdrawal, self.belonging, self.closing, self.reopening], self.rng.randint(1, 3)):
            action = make(twin)
            if action:
                action.update({"by": "crew chief"})
                twin.act(action)
                actions.append(action)
        return Step("act", self.tick(), actions=actions) if actions else None

    def withdrawal(self, survey):
        recorded = sorted(survey.records.recorded(), key=str)
        if recorded:
            pit = self.rng.choice(recorded)
            return {"action": "withdraw", "pit": self.frame.label.get(pit, pit), "why": "never dug"}

    def belonging(self, survey):
        last = survey.records.last
        movable = [n for n in self.frame.nodes if survey.records.record(n) and "x" not in last[n]
                   and last[n].get("chosen_by") != "judgement"]
        due = sorted(survey.due())
        if movable and due:
            pit, other = self.rng.choice(movable), self.rng.choice(due)
            return {"action": "belongs_to", "pit": self.frame.label[pit], "other": self.frame.label[other], "why": "labels mixed up"}

    def closing(self, survey):
        self.areas_named += 1
        action = {"action": "close_area", "area": f"shut {self.areas_named}", "reason": self.rng.choice(self.reasons()[:9]),
                  "why": "gate shut"}
        if self.rng.random() < 0.5:
            action["rows"] = sorted({self.rng.choice(self.frame.nodes)[0] for _ in range(self.rng.randint(1, 2))})
        else:
            x, y = self.frame.place[self.rng.choice(self.frame.nodes)]
            half = self.frame.spacing * self.rng.uniform(0.6, 1.9)
            corners = [(-1, -0.8), (1, -1), (0.9, 1), (-1, 1), (-1, -0.8)]
            action["polygon"] = {"type": "Polygon",
                                 "coordinates": [[[round(x + half * a, 2), round(y + half * b, 2)] for a, b in corners]]}
        shut = survey.records.nodes_of_area(action)
        overlaps = any(shut & nodes for nodes, _ in survey.records.closed_areas.values())
        return None if overlaps or len(shut) > len(self.frame.nodes) / 3 else action

    def reopening(self, survey):
        if survey.records.closed_areas:
            return {"action": "reopen_area", "area": self.rng.choice(sorted(survey.records.closed_areas)), "why": "gate open"}

    # Steps that must be refused and change nothing

    def refused_step(self, survey):
        due = sorted(survey.due())
        rng, idle = self.rng, [n for n in self.frame.nodes if n not in survey.rings() and n not in survey.records.last]
        good = [self.new_row(node) for node in rng.sample(due, min(len(due), 2))]
        blank = [n for n in self.frame.nodes if n not in survey.records.last]
        choices = [("a pit outside the frame", [{"pit": "T999-1"}])]
        if due:
            label = self.frame.label[due[0]]
            choices += [("the same pit twice", [{"pit": label}, {"pit": label}]),
                        ("a negative count", [{"pit": label, "find:" + self.plan["finds"][0]: "-1"}]),
                        ("an unknown find", [{"pit": label, "find:nothing of the plan": "1"}]),
                        ("not dug without reason", [{"pit": label, "status": "not_dug"}])]
        if idle:
            label = self.frame.label[rng.choice(idle)]
            choices += [("a pit that is not due", [{"pit": label}]), ("design for a pit that is not due",
                                                                       [{"pit": label, "chosen_by": "design"}])]
        if blank:
            choices += [("a withdrawal of nothing", [{"pit": self.frame.label[blank[0]], "status": "withdrawn", "why": "x"}])]
        rule, bad = rng.choice(choices)
        if rule == "a pit that is not due" or rule.startswith("design"):
            good = []  # they might open it
        good = [row for row in good if self.frame.pit(row["pit"]) not in {self.frame.node_of.get(b["pit"]) for b in bad}]
        return Step("log", self.tick(), self.with_one_header(good + bad), refused=rule)
