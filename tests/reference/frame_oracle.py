"""The ground of a survey, worked out plainly from a plan: nodes, labels, neighbours, areas, primary units.

Part of the oracle (see oracle.py). Python's standard library only; nothing here shares code with the program.
Lengths are metres. A node is the pair (row, column), both counted from 1.
"""

import math
import re

ON_THE_LINE_M = 0.001  # a point within 1 mm of a boundary line is inside


class PlanError(Exception):
    """The plan breaks a rule of the contract."""


# Polygons: GeoJSON Polygon or MultiPolygon, holes allowed.

def polygons_of(geometry):
    if geometry["type"] == "Polygon":
        return [geometry["coordinates"]]
    if geometry["type"] == "MultiPolygon":
        return geometry["coordinates"]
    raise PlanError("not a polygon: " + geometry["type"])


def edges_of(ring):
    return [(ring[i], ring[(i + 1) % len(ring)]) for i in range(len(ring))]


def distance_to_edge(point, edge):
    (ax, ay), (bx, by) = edge[0][:2], edge[1][:2]
    px, py = point
    length2 = (bx - ax) ** 2 + (by - ay) ** 2
    share = 0.0 if length2 == 0 else ((px - ax) * (bx - ax) + (py - ay) * (by - ay)) / length2
    share = min(1.0, max(0.0, share))
    return math.hypot(px - ax - share * (bx - ax), py - ay - share * (by - ay))


def inside_ring(point, ring):
    """Even-odd rule: a ray to the east crosses the ring an odd number of times."""
    px, py = point
    crossings = 0
    for a, b in edges_of(ring):
        if (a[1] > py) != (b[1] > py):
            at_x = a[0] + (py - a[1]) / (b[1] - a[1]) * (b[0] - a[0])
            crossings += at_x > px
    return crossings % 2 == 1


def covers(geometry, point):
    for rings in polygons_of(geometry):
        if any(distance_to_edge(point, edge) <= ON_THE_LINE_M for ring in rings for edge in edges_of(ring)):
            return True
        if inside_ring(point, rings[0]) and not any(inside_ring(point, hole) for hole in rings[1:]):
            return True
    return False


def ring_area(ring):
    x0, y0 = ring[0][:2]  # near the ring, so that far-off coordinates do not eat the digits
    return abs(math.fsum((a[0] - x0) * (b[1] - y0) - (b[0] - x0) * (a[1] - y0) for a, b in edges_of(ring))) / 2


def area_of(geometry):
    return math.fsum(ring_area(rings[0]) - math.fsum(map(ring_area, rings[1:])) for rings in polygons_of(geometry))


# Neighbour rules, as steps (rows, columns).

SQUARE_STEPS = {
    4: [(0, 1), (0, -1), (1, 0), (-1, 0)],
    8: [(r, c) for r in (-1, 0, 1) for c in (-1, 0, 1) if (r, c) != (0, 0)],
    "4x2": [(r * n, c * n) for n in (1, 2) for r, c in ((0, 1), (0, -1), (1, 0), (-1, 0))],
}


def six_steps(row):
    """Even rows are shifted half a spacing along the row, so the two nearest in the next row differ by parity."""
    nearest = (0, 1) if row % 2 == 0 else (-1, 0)
    return [(0, 1), (0, -1)] + [(r, c) for r in (-1, 1) for c in nearest]


def metres_text(value):
    """At most two decimals, trailing zeros dropped, no sign."""
    text = f"{abs(value):.2f}".rstrip("0").rstrip(".")
    return text or "0"


class Frame:
    """All nodes of a plan inside its boundary, with everything fixed before the draw."""

    def __init__(self, plan):
        self.plan = plan
        lattice, initial = plan["lattice"], plan["initial"]
        self.kind = lattice["kind"]
        self.spacing = initial["between"] if "between" in initial else lattice["spacing_m"]
        self.every = round(initial["interval_m"] / initial["between"]) if "between" in initial else initial.get("every")
        self.row_distance = self.spacing * (math.sqrt(3) / 2 if self.kind == "triangular" else 1)
        self._turn(math.radians(lattice.get("transect_bearing_deg", 90)))
        self.origin = tuple(lattice["origin"]) if "origin" in lattice else self._default_origin()
        self.place = self._nodes_inside()  # node -> (x, y), in row and column order
        self.nodes = list(self.place)
        if not self.nodes:
            raise PlanError("no node lies inside the boundary")
        self.area_names = [area["name"] for area in plan["strata"]] if plan.get("strata") else ["all"]
        self.area = {node: self._area_of_node(node) for node in self.nodes}  # node -> index into area_names
        self.label = {node: self._label(node) for node in self.nodes}
        self.node_of = {f"T{r}-{c}": (r, c) for r, c in self.nodes}
        self.node_of.update({self._grid_label(node): node for node in self.nodes})
        self.neighbours = {node: self._allowed_neighbours(node) for node in self.nodes}

    def _turn(self, bearing):
        """Unit vectors along a row and across the rows; a bearing of 90 degrees gives (1, 0) and (0, 1)."""
        self.along = (math.sin(bearing), math.cos(bearing))
        self.across = (-math.cos(bearing), math.sin(bearing))

    def turned(self, point, origin=(0.0, 0.0)):
        dx, dy = point[0] - origin[0], point[1] - origin[1]
        return (dx * self.along[0] + dy * self.along[1], dx * self.across[0] + dy * self.across[1])

    def ground(self, u, v, origin):
        return (origin[0] + u * self.along[0] + v * self.across[0], origin[1] + u * self.along[1] + v * self.across[1])

    def _corners(self):
        return [tuple(p[:2]) for rings in polygons_of(self.plan["boundary"]) for ring in rings for p in ring]

    def _default_origin(self):
        """Lower-left corner of the bounding box in turned coordinates."""
        base = self._corners()[0]
        turned = [self.turned(p, base) for p in self._corners()]
        return self.ground(min(u for u, _ in turned), min(v for _, v in turned), base)

    def node_place(self, node):
        row, column = node
        shift = self.spacing / 2 if row % 2 == 0 and self.kind != "square" else 0
        return self.ground((column - 1) * self.spacing + shift, (row - 1) * self.row_distance, self.origin)

    def _nodes_inside(self):
        turned = [self.turned(p, self.origin) for p in self._corners()]
        columns = [math.floor(f(u for u, _ in turned) / self.spacing) for f in (min, max)]
        rows = [math.floor(f(v for _, v in turned) / self.row_distance) for f in (min, max)]
        inside = {}
        for row in range(rows[0] - 1, rows[1] + 4):
            for column in range(columns[0] - 1, columns[1] + 4):
                place = self.node_place((row, column))
                if covers(self.plan["boundary"], place):
                    inside[(row, column)] = place
        if any(row < 1 or column < 1 for row, column in inside):
            raise PlanError("nodes inside the boundary have a row or column below 1")
        return inside

    def _area_of_node(self, node):
        for index, area in enumerate(self.plan.get("strata") or []):
            if covers(area["boundary"], self.place[node]):
                return index
        if self.plan.get("strata"):
            raise PlanError(f"node {node} lies in no area")
        return 0

    # Labels

    def _labels_key(self):
        labels = self.plan.get("labels", "transect")
        return labels if isinstance(labels, dict) else {"kind": labels}

    def _grid_label(self, node):
        datum = self._labels_key().get("datum") or self.node_place((1, 1))
        east, north = self.turned(self.node_place(node), datum)
        north_text, east_text = metres_text(north), metres_text(east)
        return (("S" if north < 0 and north_text != "0" else "N") + north_text + " "
                + ("W" if east < 0 and east_text != "0" else "E") + east_text)

    def _label(self, node):
        return self._grid_label(node) if self._labels_key()["kind"] == "grid" else "T%d-%d" % node

    def pit(self, label):
        """The node that a label names; else the label itself, a pit off the grid."""
        if label in self.node_of:
            return self.node_of[label]
        if re.fullmatch(r"T\d+-\d+|[NS][\d.]+ [EW][\d.]+", label):
            raise PlanError(f"{label} lies outside the frame")
        return label

    # Neighbours, confined to blocks fixed before the draw

    def block(self, node):
        confine = self.plan.get("confine")
        if confine is None:
            return 0
        if confine == "stratum":
            return self.area[node]
        columns, rows = confine["block"]
        return ((node[1] - 1) // columns, (node[0] - 1) // rows)

    def _steps(self, node):
        return SQUARE_STEPS[self.plan.get("neighbours", 8)] if self.kind == "square" else six_steps(node[0])

    def _allowed_neighbours(self, node):
        around = [(node[0] + r, node[1] + c) for r, c in self._steps(node)]
        return sorted(n for n in around if n in self.place and self.block(n) == self.block(node))

    # Primary units

    def draw_kind(self):
        initial = self.plan["initial"]
        return initial["as"] if initial["draw"] == "listed" else initial["draw"]

    def unit_key(self, node):
        row, column = node
        if self.draw_kind() == "pits":
            return node
        if self.draw_kind() == "transects":
            return row
        p, q = row - 1, column - 1
        if self.kind != "square":
            q -= (row - 1) // 2  # axial: the second axis runs along the shifted direction
        return (q % self.every, p % self.every)

    def primary_units(self):
        """For each area, its non-empty primary units: {key: [nodes]}."""
        units = [{} for _ in self.area_names]
        for node in self.nodes:
            units[self.area[node]].setdefault(self.unit_key(node), []).append(node)
        return units

    # Measures

    def cell_m2(self):
        return self.spacing * self.row_distance

    def pit_m2(self):
        pit = self.plan["pit"]
        return pit["size_m"] ** 2 * (math.pi / 4 if pit["shape"] == "round" else 1)
