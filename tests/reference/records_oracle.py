"""What the records of a survey say at a moment: CSV rows and actions applied one after another.

Part of the oracle (see oracle.py). The last revision of a pit is its record; a withdrawn pit has none.
"""

from datetime import datetime, timezone

from frame_oracle import covers

GROUND_REASONS = {"standing_water", "slope", "paved", "disturbed", "bare_ground", "structure"}
ACCESS_REASONS = {"no_permission", "utility", "hazard", "stop_work", "other"}
OF_THE_REVISION = {"pit", "by", "why"}  # columns that say something of the revision, not of the pit


def moment(text):
    """An ISO 8601 time with offset."""
    return datetime.fromisoformat(text).astimezone(timezone.utc)


class Records:
    """Keys are nodes (row, column), or free labels for pits off the grid."""

    def __init__(self, plan, frame):
        self.plan, self.frame = plan, frame
        self.last = {}  # pit -> its record: {column: cell}, status always present
        self.closed_areas = {}  # name -> (set of nodes, reason)

    def copy(self):
        twin = Records(self.plan, self.frame)
        twin.last = {pit: dict(record) for pit, record in self.last.items()}
        twin.closed_areas = dict(self.closed_areas)
        return twin

    # Reading

    def record(self, pit):
        """The pit's record, or None when it has none or it was withdrawn."""
        record = self.last.get(pit)
        return None if record is None or record["status"] == "withdrawn" else record

    def recorded(self):
        return [pit for pit in self.last if self.record(pit)]

    def withdrawn(self):
        return [pit for pit, record in self.last.items() if record["status"] == "withdrawn"]

    def dug(self, pit):
        record = self.record(pit)
        return record is not None and record["status"] == "dug"

    def count(self, pit, find):
        return int(self.last[pit].get("find:" + find, "0")) if self.dug(pit) else 0

    def target(self, pit):
        return sum(self.count(pit, find) for find in self.plan["positive"]["finds"])

    def positive(self, pit):
        return self.dug(pit) and self.target(pit) >= self.plan["positive"]["at_least"]

    def closed_reason(self, node):
        """The reason of the closed area that takes in a node without record, or None."""
        if self.record(node):
            return None
        reasons = [reason for nodes, reason in self.closed_areas.values() if node in nodes]
        return reasons[0] if reasons else None

    def not_dug_reason(self, node):
        record = self.record(node)
        if record is None:
            return self.closed_reason(node)
        return record["reason"] if record["status"] == "not_dug" else None

    # Writing

    def log(self, rows, now):
        """Rows of one CSV file, as dicts with the same keys. An absent column keeps its value, an empty cell clears it."""
        for row in rows:
            pit = self.frame.pit(row["pit"])
            self.last[pit] = self._revised(self.record(pit), row, now)

    @staticmethod
    def _revised(before, row, now):
        if row.get("status") == "withdrawn":
            return {"status": "withdrawn"}
        record = dict(before or {})
        for column, cell in row.items():
            if column in OF_THE_REVISION:
                continue
            if cell == "":
                record.pop(column, None)
            else:
                record[column] = cell
        record.setdefault("status", "dug")
        record.setdefault("dug_at", now)
        return record

    def act(self, action):
        """One action. close_area and reopen_area name their area in `area`."""
        getattr(self, "_" + action["action"])(action)

    def _withdraw(self, action):
        self.last[self.frame.pit(action["pit"])] = {"status": "withdrawn"}

    def _belongs_to(self, action):
        pit, other = self.frame.pit(action["pit"]), self.frame.pit(action["other"])
        self.last[other] = self.last[pit]
        self.last[pit] = {"status": "withdrawn"}

    def _close_area(self, action):
        self.closed_areas[action["area"]] = (self.nodes_of_area(action), action["reason"])

    def _reopen_area(self, action):
        del self.closed_areas[action["area"]]

    def nodes_of_area(self, action):
        if "rows" in action:
            return {node for node in self.frame.nodes if node[0] in action["rows"]}
        return {node for node in self.frame.nodes if covers(action["polygon"], self.frame.place[node])}
