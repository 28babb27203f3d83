"""Random small plans for the random surveys: every lattice, draw, confinement and shape of ground, at most 120 nodes.

The ground, its areas and its finds are invented and mean nothing.
"""

import math

from frame_oracle import Frame, PlanError

FIND_NAMES = ["flaked stone", "pottery", "modern", "burnt bone"]
MOST_NODES = 120


def random_plan(rng):
    """A plan that keeps the contract, and its Frame; a first sample is never so small that an area has no unit drawn."""
    while True:
        plan = draft_plan(rng)
        try:
            frame = Frame(plan)
            if not 8 <= len(frame.nodes) <= MOST_NODES:
                continue
            choose_first_sample(rng, plan, frame)
            return plan, frame
        except PlanError:
            continue


def draft_plan(rng):
    spacing = rng.choice([5, 7.5, 10, 15, 20])
    kind = rng.choice(["square", "square", "staggered", "triangular"])
    base = rng.choice([(0, 0), (412.5, 1310), (431250, 4120480)])
    turn = rng.choice([0, 0, rng.uniform(0, math.pi)])
    shape, width, height = random_shape(rng, spacing)
    ground = Turned(base, turn)
    finds = FIND_NAMES[:rng.randint(1, 4)]
    plan = {"survey": "Random ground", "crs": "EPSG:32617" if base[0] > 1000 else "local",
            "boundary": ground.geometry(shape),
            "lattice": {"kind": kind, "spacing_m": spacing},
            "pit": {"shape": rng.choice(["square", "round"]), "size_m": rng.choice([0.3, 0.5, 1])},
            "finds": finds,
            "positive": {"finds": rng.sample(finds, rng.randint(1, len(finds))), "at_least": rng.choice([1, 1, 2, 3])},
            "initial": {"draw": rng.choice(["pits", "pits", "transects", "systematic", "listed"]), "seed": rng.randrange(10 ** 6)}}
    if kind == "square" and rng.random() < 0.8:
        plan["neighbours"] = rng.choice([8, 4, "4x2"])
    elif kind != "square" and rng.random() < 0.3:
        plan["neighbours"] = 6
    if rng.random() < 0.5:
        plan["lattice"]["transect_bearing_deg"] = rng.choice([90, 0, 45, 270, round(rng.uniform(0, 359.9), 1)])
    if rng.random() < 0.4:
        plan["strata"] = random_areas(rng, ground, width, height)
    add_options(rng, plan)
    return plan


class Turned:
    """Shapes drawn from (0, 0), turned about it and moved to the ground's corner; places rounded to a centimetre."""

    def __init__(self, base, turn):
        self.base, self.turn = base, turn

    def point(self, point):
        u, v = point
        return [round(self.base[0] + u * math.cos(self.turn) - v * math.sin(self.turn), 2),
                round(self.base[1] + u * math.sin(self.turn) + v * math.cos(self.turn), 2)]

    def geometry(self, parts):
        """parts: a list of polygons, each a list of rings without the closing point."""
        polygons = [[[self.point(p) for p in ring + ring[:1]] for ring in rings] for rings in parts]
        if len(polygons) == 1:
            return {"type": "Polygon", "coordinates": polygons[0]}
        return {"type": "MultiPolygon", "coordinates": polygons}


def box(x0, y0, x1, y1):
    return [(x0, y0), (x1, y0), (x1, y1), (x0, y1)]


def random_shape(rng, spacing):
    """(polygons, width, height): a box, a box with a hole, an L, two pieces, or a jagged round."""
    w, h = (spacing * rng.choice([n, n + rng.random()]) for n in (rng.randint(3, 12), rng.randint(4, 12)))
    kind = rng.choice(["box", "hole", "L", "pieces", "jagged"])
    if kind == "hole":
        hole = box(w * 0.3, h * 0.25, w * rng.uniform(0.5, 0.8), h * rng.uniform(0.5, 0.8))
        return [[box(0, 0, w, h), hole[::-1]]], w, h
    if kind == "L":
        x, y = w * rng.uniform(0.3, 0.7), h * rng.uniform(0.3, 0.7)
        return [[[(0, 0), (w, 0), (w, y), (x, y), (x, h), (0, h)]]], w, h
    if kind == "pieces":
        x = w * rng.uniform(0.35, 0.6)
        return [[box(0, 0, x, h)], [box(x + spacing * 0.7, h * 0.2, w + spacing, h)]], w + spacing, h
    if kind == "jagged":
        corners = rng.randint(3, 9)
        ring = [(w / 2 * (1 + r * math.cos(a)), h / 2 * (1 + r * math.sin(a)))
                for a, r in ((2 * math.pi * i / corners, rng.uniform(0.6, 1)) for i in range(corners))]
        return [[ring]], w, h
    return [[box(0, 0, w, h)]], w, h


def random_areas(rng, ground, width, height):
    """Two or three slices by slanted or straight lines; sometimes the outer two slices are one area in two pieces."""
    cuts = [-9.0] + sorted(width * x for x in rng.sample([0.25, 0.4, 0.5, 0.6, 0.75], rng.choice([1, 2]))) + [width + 9.0]
    slants = [0.0] + [rng.choice([0, 0, width * rng.uniform(-0.04, 0.04)]) for _ in cuts[2:]] + [0.0]
    slices = [[[(a, -9.0), (b, -9.0), (b + t, height + 9.0), (a + s, height + 9.0)]]
              for a, b, s, t in zip(cuts, cuts[1:], slants, slants[1:])]
    if len(slices) == 3 and rng.random() < 0.4:
        parts = [[slices[0], slices[2]], [slices[1]]]
    else:
        parts = [[s] for s in slices]
    return [{"name": name, "boundary": ground.geometry(part)} for name, part in zip(["terrace", "slope", "wet end"], parts)]


def add_options(rng, plan):
    lattice, spacing = plan["lattice"], plan["lattice"]["spacing_m"]
    if rng.random() < 0.3:
        frame = Frame({**plan, "initial": {"draw": "pits"}, "confine": None})
        shift = rng.choice([(spacing * 0.4, spacing * 0.3), (rng.uniform(0, spacing / 2), rng.uniform(0, spacing / 2))])
        lattice["origin"] = [round(x, 2) for x in frame.ground(-shift[0], -shift[1], frame.origin)]
    confine = rng.choice(["none", "none", "block", "stratum", "ring"])
    if confine == "block":
        plan["confine"] = {"block": [rng.randint(1, 4), rng.randint(1, 4)]}
    elif confine == "stratum" and "strata" in plan:
        plan["confine"] = "stratum"
    elif confine == "ring":
        plan["ring_limit"] = rng.randint(1, 3)
    if rng.random() < 0.25:
        plan["labels"] = rng.choice(["grid", {"kind": "grid", "datum": plan["boundary"]["coordinates"][0][0]}])
        if isinstance(plan["labels"], dict) and plan["boundary"]["type"] == "MultiPolygon":
            plan["labels"]["datum"] = plan["boundary"]["coordinates"][0][0][1]
    if rng.random() < 0.3:
        plan["confidence"] = rng.choice([0.8, 0.9, 0.99])
    if rng.random() < 0.3:
        plan["order"] = rng.choice(["transect", "nearest"])
    add_draw(rng, plan)


def add_draw(rng, plan):
    initial = plan["initial"]
    if initial["draw"] == "listed":
        del initial["seed"]
        initial.update({"as": rng.choice(["pits", "transects", "systematic"]), "how": "drawn by lot at the gate", "pits": []})
    if "systematic" in (initial["draw"], initial.get("as")):
        every = rng.randint(2, 3)
        if initial["draw"] == "systematic" and rng.random() < 0.3:
            initial.update({"interval_m": plan["lattice"].pop("spacing_m") * every})
            initial["between"] = initial["interval_m"] / every
        else:
            initial["every"] = every


def choose_first_sample(rng, plan, frame):
    units = frame.primary_units()
    if not all(units):
        raise PlanError("an area has no node")
    counts = {name: random_count(rng, len(u)) for name, u in zip(frame.area_names, units)}
    if plan["initial"]["draw"] != "listed":
        plan["initial"]["count"] = counts
        return
    for name, area_units in zip(frame.area_names, units):
        for unit in rng.sample(list(area_units.values()), counts[name]):
            plan["initial"]["pits"] += [frame.label[node] for node in rng.sample(unit, min(len(unit), rng.choice([1, 1, 2])))]
    rng.shuffle(plan["initial"]["pits"])


def random_count(rng, size):
    kind = rng.random()
    if kind < 0.1:
        return 1
    if kind < 0.2:
        return size
    return min(size, rng.randint(2, max(2, size // 3)))
