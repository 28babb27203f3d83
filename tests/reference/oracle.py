"""An independent oracle of a whole survey: from plan, first sample and records to the dig list and the day's figures.

It recomputes everything from scratch at each question, in exact rational numbers (fractions.Fraction), with Python's
standard library alone, and shares no code with the program. frame_oracle.py holds the ground, records_oracle.py the
records, estimates_oracle.py the estimators; this file holds the dig list, the progress, the clusters and the answers in the shape
of `next --json` and `tally --json`. worked_examples_test.py proves it against published and derived examples.
"""

from fractions import Fraction
import math

from estimates_oracle import (Stratum, components, degrees_of_freedom, first_sample_only, hansen_hurwitz, horvitz_thompson,
                              missed_cluster_pits, network_of_each, t_two_sided)
from frame_oracle import Frame, PlanError, area_of
from records_oracle import ACCESS_REASONS, Records, moment


class Survey:
    def __init__(self, plan, first_sample_labels=None, frame=None):
        """`first_sample_labels`: the drawn pits; not needed for a listed first sample, which the plan gives."""
        self.plan = plan
        self.frame = frame or Frame(plan)
        self.units = self.frame.primary_units()
        if plan["initial"]["draw"] == "listed":
            first_sample_labels = plan["initial"]["pits"]
        self.strata = self._strata(self.frame.node_of[label] for label in first_sample_labels)
        self.first_sample = {node for s in self.strata for i in s.drawn for node in s.units[i]}
        self.records = Records(plan, self.frame)

    def _strata(self, drawn_nodes):
        """Each drawn node stands for the primary unit that holds it."""
        drawn_nodes, strata = set(drawn_nodes), []
        for units in self.units:
            drawn = [i for i, unit in enumerate(units.values()) if not drawn_nodes.isdisjoint(unit)]
            strata.append(Stratum(list(units.values()), drawn))
        if not all(s.drawn for s in strata):
            raise PlanError("an area has no drawn unit")
        return strata

    def twin(self):
        """The same survey with records of its own, to try things on."""
        twin = Survey.__new__(Survey)
        twin.__dict__.update(self.__dict__, records=self.records.copy())
        return twin

    def log(self, rows, now):
        self.records.log(rows, now)

    def act(self, action):
        self.records.act(action)

    # The dig list

    def rings(self):
        """The design's pits: node -> ring, the fewest steps from the first sample through positives of the design."""
        ring = {node: 0 for node in self.first_sample}
        limit, step = self.plan.get("ring_limit"), 0
        while True:
            step += 1
            opened = {n for node, at in ring.items() if at == step - 1 and self.records.positive(node)
                      for n in self.frame.neighbours[node]} - ring.keys()
            if not opened or (limit is not None and step > limit):
                return ring
            ring.update({node: step for node in opened})

    def due(self):
        """The design's pits without record, outside closed areas."""
        return {node for node in self.rings() if not self.records.record(node) and not self.records.closed_reason(node)}

    def design_positives(self):
        return {node for node in self.rings() if self.records.positive(node)}

    def truncated(self):
        ring = self.rings()
        return any(n not in ring for node in self.design_positives() for n in self.frame.neighbours[node])

    def next(self):
        ring, positives, due = self.rings(), self.design_positives(), sorted(self.due())
        rows = {}
        for node in due:
            first = node in self.first_sample
            opened_by = [] if first else [self.frame.label[n] for n in self.frame.neighbours[node] if n in positives]
            x, y = self.frame.place[node]
            rows[self.frame.label[node]] = {"because": "first sample" if first else "neighbour", "of": sorted(opened_by),
                                            "ring": ring[node], "x": x, "y": y}
        left = sum(node in self.first_sample for node in due)
        return {"due": rows, "first_sample_left": left, "neighbours_left": len(due) - left,
                "open_clusters": sum(not cluster["closed"] for cluster in self.clusters())}

    # Progress

    def access_non_response(self):
        return {node for node in self.rings() if self.records.not_dug_reason(node) in ACCESS_REASONS}

    def answered(self, node):
        """Dug or not dug, by a record or by a closed area."""
        return bool(self.records.record(node)) or self.records.closed_reason(node) is not None

    def progress(self):
        records, ring = self.records, self.rings()
        recorded = records.recorded()
        dug = [pit for pit in recorded if records.dug(pit)]
        outside = [pit for pit in recorded if pit not in ring]
        answered = sum(map(self.answered, self.first_sample))
        due = len(self.due())
        return {
            "first_sample": len(self.first_sample), "first_sample_dug": answered,
            "dug": len(dug), "positive": sum(map(records.positive, dug)),
            "not_dug": len(recorded) - len(dug) + sum(records.closed_reason(node) is not None for node in ring),
            "judgement": len(outside), "due": due, "halted": 0,
            "no_longer_required": sum(pit in self.frame.place and records.last[pit].get("chosen_by") != "judgement"
                                      for pit in outside),
            "withdrawn": len(records.withdrawn()), "conflicts": 0,
            "complete": answered == len(self.first_sample) and due == 0 and not self.access_non_response(),
            "truncated": self.truncated(),
        }

    # Clusters: networks of the design's positives

    def clusters(self):
        due = self.due()
        found = sorted(sorted(c) for c in components(self.design_positives(), lambda node: self.frame.neighbours[node]))
        return [self._cluster(pits, due) for pits in found]

    def _cluster(self, pits, due):
        first_dug = min(pits, key=lambda node: (moment(self.records.last[node]["dug_at"]), node))
        beside = sorted({n for node in pits for n in self.frame.neighbours[node] if n in due})
        label = self.frame.label
        return {"label": label[first_dug], "pits": [label[node] for node in pits],
                "finds": {f: sum(self.records.count(node, f) for node in pits) for f in self.plan["finds"]},
                "area_m2": len(pits) * self.frame.cell_m2(),
                "in_first_sample": sum(node in self.first_sample for node in pits),
                "closed": not beside, "open_because": [label[node] for node in beside]}

    # Figures

    def value_of(self, of):
        """y of every pit of the design: only dug pits count, whatever lies in judgement pits."""
        return {node: self.value(of, node) for node in self.rings()}

    def value(self, of, pit):
        if of == "positive pits":
            return int(self.records.positive(pit))
        return self.records.target(pit) if of == "target" else self.records.count(pit, of)

    def networks(self):
        return network_of_each(self.strata, self.design_positives(), lambda node: self.frame.neighbours[node])

    def status(self, estimator):
        if self.due() or self.access_non_response():
            return "provisional"
        return "truncated" if self.truncated() and estimator != "first_sample_only" else "final"

    def missed_cluster_pits(self):
        if self.frame.draw_kind() != "pits" or not all(map(self.answered, self.first_sample)):
            return None
        sizes = tuple((s.size, sum(self.records.not_dug_reason(s.units[i][0]) is None for i in s.drawn)) for s in self.strata)
        return missed_cluster_pits(sizes, Fraction(str(self.plan.get("confidence", 0.95))))

    def estimates(self):
        network, rows = self.networks(), []
        open_now = bool(self.due())
        first_sample_open = any(node in self.first_sample for node in self.due())
        for of in ["target"] + self.plan["finds"] + ["positive pits"]:
            y = self.value_of(of)
            squares = {node: value ** 2 for node, value in y.items()}
            parts = hansen_hurwitz(self.strata, network, y).parts
            for name, estimator in (("hansen_hurwitz", lambda of_y: hansen_hurwitz(self.strata, network, of_y)),
                                    ("horvitz_thompson", lambda of_y: horvitz_thompson(self.strata, network, of_y))):
                rows.append(self._row(of, name, estimator(y), open_now, parts, estimator(squares).mean))
            first = first_sample_only(self.strata, y)
            rows.append(self._row(of, "first_sample_only", first, first_sample_open, first.parts,
                                  first_sample_only(self.strata, squares).mean))
        return rows

    def _row(self, of, estimator, estimate, open_now, parts, mean_square):
        variance = None if open_now else estimate.variance
        one_stratum_of_pits = len(self.strata) == 1 and self.frame.draw_kind() == "pits"
        if variance is not None and one_stratum_of_pits and abs(variance) < Fraction(1, 10 ** 12) * estimate.mean ** 2:
            variance = Fraction(0)
        found = sum(self.value(of, node) for node in self.frame.nodes if self.records.dug(node))
        per_m2 = float(estimate.mean) / self.frame.pit_m2()
        pits = of == "positive pits"
        return {"of": of, "estimator": estimator, "mean_per_pit": estimate.mean,
                "per_m2": None if pits else per_m2,
                "total": float(estimate.mean * len(self.frame.nodes)) if pits
                else per_m2 * len(self.frame.nodes) * self.frame.cell_m2(),
                "variance_of_mean": variance,
                "standard_error": None if self.no_spread(estimate.mean, variance) else math.sqrt(variance),
                "plain_t": self.plain_t(estimate.mean, variance, parts, Fraction(found, len(self.frame.nodes)),
                                        self.most_positive() if pits else None),
                "ground_standard_error": None if pits or self.no_spread(estimate.mean, variance) else self.ground_standard_error(estimate.mean, variance, mean_square),
                "status": self.status(estimator)}

    def no_spread(self, mean, variance):
        """No variance, a negative one, or every drawn unit alike though not all were drawn (statistics: v <= 1e-18 est^2)."""
        if variance is None or variance < 0:
            return True
        return not all(s.taken_whole for s in self.strata) and variance <= Fraction(1, 10 ** 18) * mean ** 2

    def most_positive(self):
        """The share of nodes that can be positive at the most: those not dug and found empty."""
        dug = [node for node in self.frame.nodes if self.records.dug(node)]
        empty = sum(1 for node in dug if not self.value("positive pits", node))
        return 1 - Fraction(empty, len(self.frame.nodes))

    def ground_standard_error(self, mean, variance, mean_square):
        """Of per_m2: S2 = N/(N-1) [mean(y^2) - (mean^2 - v)], not below 0, and v_ground = v + S2/N."""
        size = len(self.frame.nodes)
        if variance is None or variance < 0 or size == 1:
            return None
        spread = max(Fraction(0), Fraction(size, size - 1) * (mean_square - mean ** 2 + variance))
        return math.sqrt(variance + spread / size) / self.frame.pit_m2()

    def plain_t(self, mean, variance, parts, at_least, at_most=None):
        """The plain t interval, or None; neither end below what was found already nor above what is possible."""
        if variance is None or variance < 0 or mean == 0:
            return None
        if all(s.taken_whole for s in self.strata):
            half = 0.0
        elif variance <= Fraction(1, 10 ** 18) * mean ** 2 or degrees_of_freedom(self.strata, parts) is None:
            return None
        else:
            level = self.plan.get("confidence", 0.95)
            half = t_two_sided(level, degrees_of_freedom(self.strata, parts)) * math.sqrt(variance)
        upper = float(mean) + half
        if at_most is not None and half:
            upper = min(upper, float(at_most))
        return [max(float(mean) - half, float(at_least)), max(upper, float(at_least))]

    def tally(self):
        return {"frame": {"pits": len(self.frame.nodes), "area_m2": len(self.frame.nodes) * self.frame.cell_m2(),
                          "boundary_m2": area_of(self.plan["boundary"]), "pit_area_m2": self.frame.pit_m2(),
                          "strata": [{"name": name, "primary_units": s.size, "drawn": s.count}
                                     for name, s in zip(self.frame.area_names, self.strata)]},
                "progress": self.progress(), "clusters": self.clusters(),
                "missed_cluster_pits": self.missed_cluster_pits(), "estimates": self.estimates()}
