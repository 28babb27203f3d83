#!/usr/bin/python3
"""Proves the oracle before it judges: published and derived worked examples, and enumeration of every sample.

'derived' examples were worked out in exact fractions by enumerating all samples; published sources stand beside each test.
"""

from fractions import Fraction as F
from itertools import combinations, product
import unittest

from estimates_oracle import (Stratum, degrees_of_freedom, first_sample_only, hansen_hurwitz, horvitz_thompson, inclusion,
                              chance_all_missed, expand, joint_inclusion, met_networks, missed_cluster_pits, network_hits,
                              network_of_each, network_total, nodes_in, sample_variance, t_two_sided, totals_by_units)
from frame_oracle import Frame
from oracle import Survey

NOW = "2026-05-04T12:00:00+00:00"
SPACING = 10


def cell_around(row, column):
    x, y, half = (column - 1) * SPACING, (row - 1) * SPACING, SPACING / 2
    return [[x - half, y - half], [x + half, y - half], [x + half, y + half], [x - half, y + half], [x - half, y - half]]


def cells(nodes):
    return {"type": "MultiPolygon", "coordinates": [[cell_around(*node)] for node in nodes]}


class Ground:
    """A little ground drawn as text: rows of counts, `.` where there is no node, `x` where no pit can be dug."""

    def __init__(self, drawing, at_least, draw="pits", areas=None, **more):
        self.count = {(r, c): cell for r, line in enumerate(drawing.strip().split("/"), 1)
                      for c, cell in enumerate(line.split(), 1) if cell != "."}
        self.areas = areas or [lambda node: True]
        strata = [{"name": f"area {i}", "boundary": cells(filter(inside, self.count))} for i, inside in enumerate(self.areas)]
        self.plan = {"survey": "worked example", "crs": "local", "boundary": cells(self.count),
                     "lattice": {"kind": "square", "spacing_m": SPACING, "origin": [0, 0]}, "neighbours": 4,
                     "pit": {"shape": "square", "size_m": 0.5}, "finds": ["find"],
                     "positive": {"finds": ["find"], "at_least": at_least},
                     "initial": {"draw": "listed", "as": draw, "how": "one of all samples"}}
        if len(self.areas) > 1:
            self.plan["strata"] = strata
        self.plan.update(more)
        self.plan["initial"].update(every=self.plan.pop("every", None))
        self.frame = Frame(self.plan)

    def y(self, node):
        return 0 if self.count[node] == "x" else int(self.count[node])

    def mean(self):
        return F(sum(map(self.y, self.count)), len(self.count))

    def survey(self, drawn):
        labels = ["T%d-%d" % node for node in drawn]
        return Survey({**self.plan, "initial": {**self.plan["initial"], "pits": labels}}, frame=self.frame)

    def dig(self, survey, nodes):
        rows = [{"pit": "T%d-%d" % n, "status": "not_dug" if self.count[n] == "x" else "dug",
                 "reason": "slope" if self.count[n] == "x" else "", "find:find": "" if self.count[n] in "x0" else self.count[n]}
                for n in nodes]
        survey.log(rows, NOW)

    def dug_out(self, drawn):
        """The survey with these units drawn and everything dug that becomes due."""
        survey = self.survey(drawn)
        while survey.due():
            self.dig(survey, survey.due())
        return survey

    def samples(self, counts):
        """The finished survey of every possible sample: counts[h] units of area h, all equally likely."""
        units = self.survey(self.one_of_each_area()).units
        for chosen in product(*(combinations(list(u.values()), n) for u, n in zip(units, counts))):
            yield self.dug_out([unit[0] for area in chosen for unit in area])

    def one_of_each_area(self):
        return [next(filter(inside, sorted(self.count))) for inside in self.areas]

    def whole(self):
        """The survey with every node drawn and dug: it shows all networks."""
        return self.dug_out(sorted(self.count))


def estimates(survey, of="target"):
    """(HH mean, HH variance, HT mean, HT variance) of one survey."""
    rows = {row["estimator"]: row for row in survey.estimates() if row["of"] == of}
    hh, ht = rows["hansen_hurwitz"], rows["horvitz_thompson"]
    return hh["mean_per_pit"], hh["variance_of_mean"], ht["mean_per_pit"], ht["variance_of_mean"]


def average(values):
    values = list(values)
    return sum(values, F(0)) / len(values)


def spread(values):
    values = list(values)
    return average((v - average(values)) ** 2 for v in values)


# Exact design variances from the whole population, by the textbook formulas (Thompson 1990, 1991).

def design_variances(ground, counts):
    """(V of Hansen-Hurwitz, V of Horvitz-Thompson) without drawing a sample."""
    survey = ground.whole()
    y, network = survey.value_of("target"), survey.networks()
    strata = [Stratum(s.units, list(range(n))) for s, n in zip(survey.strata, counts)]
    total_nodes = nodes_in(strata)
    v_hh = F(0)
    for s in strata:
        w = [sum((F(network_total(k, y), network_hits(strata, k)) for k in {network[n] for n in unit}), F(0)) for unit in s.units]
        v_hh += F(s.size, total_nodes) ** 2 * (1 - F(s.count, s.size)) * sample_variance(w) / s.count
    totals = totals_by_units(strata, set(network.values()), y)
    v_ht = F(0)
    for j, (met_j, total_j) in enumerate(totals):
        for k, (met_k, total_k) in enumerate(totals):
            alpha_j, alpha_k = inclusion(strata, met_j), inclusion(strata, met_k)
            both = alpha_j if j == k else joint_inclusion(strata, met_j, met_k)
            v_ht += total_j * total_k * (both / (alpha_j * alpha_k) - 1)
    return v_hh, v_ht / total_nodes ** 2


class Enumerated(unittest.TestCase):
    def check_every_sample(self, ground, counts):
        """Both estimators are unbiased, so are their variance estimates, and the design variances are what happens."""
        rows = [estimates(survey) for survey in ground.samples(counts)]
        v_hh, v_ht = design_variances(ground, counts)
        self.assertEqual(average(row[0] for row in rows), ground.mean())
        self.assertEqual(average(row[2] for row in rows), ground.mean())
        self.assertEqual(spread(row[0] for row in rows), v_hh)
        self.assertEqual(spread(row[2] for row in rows), v_ht)
        self.assertEqual(average(row[1] for row in rows), v_hh)
        self.assertEqual(average(row[3] for row in rows), v_ht)
        return v_hh, v_ht


class FiveUnits(Enumerated):
    """Thompson SK 1990, JASA 85:1050-1059 (input and published variances from memory, the rest derived)."""

    ground = Ground("1 0 2 10 1000", at_least=5)
    by_sample = {  # columns drawn: HH, HT, v_HH, v_HT, mean of all pits dug
        (1, 2): (0.5, 0.5, 0.15, 0.15, 0.5), (1, 3): (1.5, 1.5, 0.15, 0.15, 1.5), (2, 3): (1, 1, 0.6, 0.6, 1),
        (1, 4): (253, 289.071429, 38102.4, 24866.762245, 253.25), (1, 5): (253, 289.071429, 38102.4, 24866.762245, 253.25),
        (2, 4): (252.5, 288.571429, 38253.75, 24982.040816, 253), (2, 5): (252.5, 288.571429, 38253.75, 24982.040816, 253),
        (3, 4): (253.5, 289.571429, 37951.35, 24751.783673, 337.333333),
        (3, 5): (253.5, 289.571429, 37951.35, 24751.783673, 337.333333),
        (4, 5): (505, 288.571429, 0, 24982.040816, 337.333333)}

    def test_each_sample(self):
        for columns, (hh, ht, v_hh, v_ht, plain) in self.by_sample.items():
            survey = self.ground.dug_out([(1, c) for c in columns])
            got = estimates(survey)
            dug = [n for n in survey.frame.nodes if survey.records.dug(n)]
            for value, want in zip((got[0], got[2], got[1], got[3], F(sum(map(self.ground.y, dug)), len(dug))),
                                   (hh, ht, v_hh, v_ht, plain)):
                self.assertAlmostEqual(float(value), want, delta=6e-7, msg=columns)

    def test_over_all_samples(self):
        v_hh, v_ht = self.check_every_sample(self.ground, [2])
        self.assertAlmostEqual(float(v_hh), 22861.59, delta=0.005)
        self.assertAlmostEqual(float(v_ht), 17418.4114, delta=0.00005)
        surveys = list(self.ground.samples([2]))
        plain = spread(first_sample_only(s.strata, s.value_of("target")).mean for s in surveys)
        self.assertAlmostEqual(float(plain), 59615.34, delta=0.005)
        self.assertEqual(average(s.progress()["dug"] for s in surveys), F(31, 10))

    def test_figures_are_final(self):
        survey = self.ground.dug_out([(1, 1), (1, 4)])
        self.assertEqual({row["status"] for row in survey.estimates()}, {"final"})
        self.assertTrue(survey.progress()["complete"])
        self.assertEqual([c["pits"] for c in survey.clusters()], [["T1-4", "T1-5"]])


class TextbookPair(unittest.TestCase):
    """Thompson SK 2012, Sampling, 3rd ed., chapter 24 (input from memory): 400 pits, 10 drawn, two networks met."""

    def setUp(self):
        small, large = range(0, 6), range(6, 17)
        self.y = {n: 6 for n in small} | {n: 10 for n in large} | {16: 7}
        self.strata = [Stratum([[n] for n in range(400)], [0, 6] + list(range(20, 28)))]
        beside = lambda n: [m for m in (n - 1, n + 1) if (m in small) == (n in small) and m in self.y]
        self.network = network_of_each(self.strata, self.y, beside)

    def test_hansen_hurwitz(self):
        hh = hansen_hurwitz(self.strata, self.network, self.y)
        self.assertAlmostEqual(float(hh.mean), 1.572727, delta=5e-7)
        self.assertAlmostEqual(float(hh.variance), 1.147089, delta=5e-7)

    def test_horvitz_thompson(self):
        (met_1, total_1), (met_2, total_2) = sorted(totals_by_units(self.strata, met_networks(self.strata, self.network), self.y),
                                                    key=lambda item: item[1])
        self.assertEqual((total_1, total_2), (36, 107))
        self.assertAlmostEqual(float(inclusion(self.strata, met_1)), 0.1417650710, delta=5e-11)
        self.assertAlmostEqual(float(inclusion(self.strata, met_2)), 0.2457906438, delta=5e-11)
        self.assertAlmostEqual(float(joint_inclusion(self.strata, met_1, met_2)), 0.0319971261, delta=5e-11)
        ht = horvitz_thompson(self.strata, self.network, self.y)
        self.assertAlmostEqual(float(ht.mean), 1.7231777, delta=5e-8)
        self.assertAlmostEqual(float(ht.variance), 1.1162552, delta=5e-8)


class JointChances(unittest.TestCase):
    """derived: alpha_jk - alpha_j alpha_k = q_jk - q_j q_k for (N, n, x_j, x_k, x_jk)."""

    def test_exact_values(self):
        for (size, n, xj, xk, both), want in {(400, 10, 6, 11, 0): -2.847401990758761e-3,
                                              (10 ** 7, 10, 2, 3, 0): -5.9999784000243e-13,
                                              (1000, 20, 5, 7, 3): 4.89134490006435e-2}.items():
            q = lambda hits: chance_all_missed(((size, n, hits),))
            self.assertAlmostEqual(float(q(xj + xk - both) - q(xj) * q(xk)) / want, 1, delta=2e-14)


class AreasAndRows(Enumerated):
    """derived, by enumerating every sample in exact fractions (Thompson 1991, Biometrika 78:389-397 and Biometrics 47:1103-1115)."""

    def test_network_across_the_line_of_two_areas(self):
        ground = Ground("0 1 0 6 8 0 2 0 5", at_least=5, areas=[lambda n: n[1] <= 4, lambda n: n[1] > 4])
        self.assertEqual(ground.mean(), F(22, 9))
        v_hh, v_ht = self.check_every_sample(ground, [2, 2])
        self.assertAlmostEqual(float(v_hh), 1.4578189300, delta=5e-11)
        self.assertEqual(v_ht, F(32, 27))

    def test_an_area_left_undrawn_biases(self):
        ground = Ground("0 1 0 6 8 0 2 0 5", at_least=5, areas=[lambda n: n[1] <= 4, lambda n: n[1] > 4])
        survey = ground.whole()
        first, second = survey.strata
        y, network = survey.value_of("target"), survey.networks()
        means = []
        for pair in combinations(range(first.size), 2):
            strata = [Stratum(first.units, list(pair)), Stratum(second.units, [])]
            shares = [F(network_total(network[n], y), network_hits(strata, network[n])) for i in pair for n in first.units[i]]
            means.append(F(first.size, 9) * average(shares))
        self.assertEqual(average(means), F(8, 9))

    def test_strips(self):
        ground = Ground("0 0 3 0 / 0 6 5 0 / 1 0 9 0 / 0 0 0 2 / 7 0 0 0", at_least=5, draw="transects")
        self.assertEqual(ground.mean(), F(33, 20))
        v_hh, v_ht = self.check_every_sample(ground, [2])
        self.assertEqual(v_hh, F(305625, 1000000))
        self.assertAlmostEqual(float(v_ht), 0.2654464286, delta=5e-11)
        self.assertEqual(average(s.progress()["dug"] for s in ground.samples([2])), F(119, 10))

    def unequal_rows(self):
        return Ground("0 0 . . / 0 6 5 0 / 1 0 9 0 / . 0 0 2 / 7 0 0 0", at_least=5, draw="transects",
                      areas=[lambda n: n[1] <= 2, lambda n: n[1] > 2])

    def test_unequal_rows_in_two_areas(self):
        ground = self.unequal_rows()
        self.assertEqual(ground.mean(), F(30, 17))
        self.assertEqual(self.check_every_sample(ground, [2, 2]), (F(15325, 31212), F(1205, 3468)))

    def test_unequal_rows_one_draw(self):
        survey = self.unequal_rows().dug_out([(2, 1), (5, 1), (2, 3), (3, 3)])
        self.assertEqual([(s.size, s.count) for s in survey.strata], [(5, 2), (4, 2)])
        self.assertEqual(estimates(survey), (F(365, 102), F(5, 3468), F(715, 306), F(68335, 93636)))
        totals = {total: met for met, total in totals_by_units(survey.strata, met_networks(survey.strata, survey.networks()),
                                                               survey.value_of("target"))}
        self.assertEqual(inclusion(survey.strata, totals[20]), F(9, 10))
        self.assertEqual(inclusion(survey.strata, totals[7]), F(2, 5))
        self.assertEqual(joint_inclusion(survey.strata, totals[20], totals[7]), F(7, 20))

    def test_negative_variance_estimate(self):
        ground = Ground("1 3 / 0 3 / 3 0 / 0 0", at_least=3, draw="transects")
        survey = ground.dug_out([(1, 1), (3, 1)])
        self.assertEqual(estimates(survey), (F(7, 4), F(1, 32), F(19, 10), F(-1, 400)))
        rows = {row["estimator"]: row for row in survey.estimates() if row["of"] == "target"}
        self.assertIsNone(rows["horvitz_thompson"]["standard_error"])
        self.assertIsNone(rows["horvitz_thompson"]["plain_t"])
        self.check_every_sample(ground, [2])

    def test_sub_lattices_and_confined_blocks(self):
        picture = "0 0 6 0 / 0 7 5 0 / 1 0 0 0 / 0 0 5 6"
        self.check_every_sample(Ground(picture, at_least=5, draw="systematic", neighbours=8, every=2), [2])
        self.check_every_sample(Ground(picture, at_least=5, draw="transects", neighbours="4x2", confine={"block": [2, 2]}), [2])
        split = Ground(picture, at_least=5, areas=[lambda n: n[1] <= 2, lambda n: n[1] > 2], confine="stratum")
        self.check_every_sample(split, [2, 2])

    def test_one_drawn_of_several_gives_no_variance(self):
        # derived: with N = 2, n = 1 and y = 1, 3 the Horvitz-Thompson form would average 5/2 while V = 1.
        survey = Ground("1 3", at_least=5).dug_out([(1, 1)])
        hh, v_hh, ht, v_ht = estimates(survey)
        self.assertEqual((hh, v_hh, ht, v_ht), (1, None, 1, None))

    def test_an_area_taken_whole_adds_nothing(self):
        survey = Ground("2 1 0 4", at_least=5, areas=[lambda n: n[1] <= 1, lambda n: n[1] > 1]).dug_out([(1, 1), (1, 2), (1, 4)])
        # derived: (3/4)^2 (1 - 2/3) (9/2)/2 = 27/64
        self.assertEqual(estimates(survey)[1], F(27, 64))

    def test_record_counts(self):
        """derived: where y is 1 exactly for a positive pit, Hansen-Hurwitz is the first sample's mean."""
        for survey in Ground("1 0 2 10 1000 0 6", at_least=2).samples([3]):
            rows = {row["estimator"]: row for row in survey.estimates() if row["of"] == "positive pits"}
            self.assertEqual(rows["hansen_hurwitz"]["mean_per_pit"], rows["first_sample_only"]["mean_per_pit"])
            self.assertEqual(rows["hansen_hurwitz"]["variance_of_mean"], rows["first_sample_only"]["variance_of_mean"])


class DaysThatNeedCare(unittest.TestCase):
    def test_pits_not_dug_for_ground_reasons(self):
        """derived: per diggable pit R = T_y/T_d and its residual variance, from the same estimators."""
        ground = Ground("0 4 6 x 0 0 x 3 0 0", at_least=3)
        survey = ground.dug_out([(1, 2), (1, 4), (1, 5), (1, 9)])
        diggable = {n: int(survey.records.dug(n)) for n in survey.rings()}
        for estimator, figures in ((hansen_hurwitz, (F(5, 4), F(3, 4), F(5, 3), F(40, 27))),
                                   (horvitz_thompson, (F(3, 2), F(4, 5), F(15, 8), F(16125, 14336)))):
            estimate = lambda y: estimator(survey.strata, survey.networks(), y)
            y = survey.value_of("target")
            share = estimate(diggable).mean
            ratio = estimate(y).mean / share
            residual = {n: y[n] - ratio * diggable[n] for n in y}
            self.assertEqual((estimate(y).mean, share, ratio, estimate(residual).variance / share ** 2), figures)
        self.assertEqual({row["status"] for row in survey.estimates()}, {"final"})

    def test_unfinished_ring(self):
        """derived: nothing but the first sample dug; both estimators stand at 9/2 and fall when the ring is dug."""
        ground = Ground("0 9 1 1 1 0 0 0 0 0", at_least=1)
        survey = ground.survey([(1, 2), (1, 8)])
        ground.dig(survey, [(1, 2), (1, 8)])
        self.assertEqual(estimates(survey), (F(9, 2), None, F(9, 2), None))
        first = [row for row in survey.estimates() if row["estimator"] == "first_sample_only"][0]
        self.assertIsNotNone(first["variance_of_mean"])
        self.assertEqual({row["status"] for row in survey.estimates()}, {"provisional"})
        self.assertEqual(survey.next()["due"].keys(), {"T1-1", "T1-3"})
        finished = ground.dug_out([(1, 2), (1, 8)])
        self.assertEqual(estimates(finished)[::2], (F(3, 2), F(9, 5)))

    def test_ring_limit(self):
        """derived; the kind of bias is described by Su Z & Quinn TJ 2003, Environ. Ecol. Stat. 10:17-41."""
        per_cent = {0: (0, -7.25), 1: (0.956, -5.94), 2: (0.717, -1.45), 3: (0, 0)}
        for limit, (bias_hh, bias_ht) in per_cent.items():
            ground = Ground("0 0 5 9 6 8 1 0 0 2", at_least=5, ring_limit=limit)
            rows = [estimates(survey) for survey in ground.samples([2])]
            self.assertEqual(ground.mean(), F(31, 10))
            self.assertAlmostEqual(float(average(r[0] for r in rows) / ground.mean() - 1) * 100, bias_hh, delta=0.0006)
            self.assertAlmostEqual(float(average(r[2] for r in rows) / ground.mean() - 1) * 100, bias_ht, delta=0.006)

    def test_truncated_status_spares_the_first_sample(self):
        survey = Ground("0 0 5 9 6 8 1 0 0 2", at_least=5, ring_limit=1).dug_out([(1, 3), (1, 9)])
        self.assertTrue(survey.progress()["truncated"])
        self.assertEqual([row["status"] for row in survey.estimates()][:3], ["truncated", "truncated", "final"])


class BlueWingedTeal(unittest.TestCase):
    """Smith DR, Conroy MJ & Brakhage DH 1995, Biometrics 51:777-788 (layout from memory; the total agrees with a textbook's)."""

    ground = Ground("0 0 3 5 0 0 0 0 0 0 / 0 0 0 24 14 0 0 10 103 0 / 0 0 0 0 2 3 2 0 13639 1 / "
                    "0 0 0 0 0 0 0 0 14 122 / 0 0 0 0 0 0 2 0 0 177", at_least=1)

    def test_design_variances(self):
        self.assertEqual(self.ground.mean(), F(14121, 50))
        v_hh, v_ht = design_variances(self.ground, [10])
        self.assertAlmostEqual(float(v_hh), 39635.87715, delta=5e-6)
        self.assertAlmostEqual(float(v_ht), 18151.98524, delta=5e-6)
        plain = (F(1, 10) - F(1, 50)) * sample_variance([F(self.ground.y(n)) for n in self.ground.count])
        self.assertAlmostEqual(float(plain), 297293.4109, delta=5e-5)

    def test_expected_final_size_and_spread(self):
        survey = self.ground.whole()
        network, positives = survey.networks(), survey.design_positives()
        size = F(0)
        for node in survey.frame.nodes:
            reached_from = set(network[node])
            if node not in positives:
                reached_from |= {m for n in survey.frame.neighbours[node] if n in positives for m in network[n]}
            size += 1 - chance_all_missed(((50, 10, len(reached_from)),))
        self.assertAlmostEqual(float(size), 29.04960153, delta=5e-9)
        s2, mean = sample_variance([F(self.ground.y(n)) for n in self.ground.count]), float(self.ground.mean())
        v_hh, v_ht = design_variances(self.ground, [10])
        for variance, cv in (((1 / size - F(1, 50)) * s2, .81977), (v_hh, .70494), (v_ht, .47705)):
            self.assertAlmostEqual(float(variance) ** 0.5 / mean, cv, delta=1e-5)  # 0.7049345 exactly for Hansen-Hurwitz


class IntervalsAndBounds(unittest.TestCase):
    def test_plain_t(self):
        """derived: W = 0, 0, 6, 2 of 10 and 0, 3, 9 of 6, one-node units."""
        strata = [Stratum([[("a", i)] for i in range(10)], [0, 1, 2, 3]), Stratum([[("b", i)] for i in range(6)], [0, 1, 2])]
        w = {("a", 2): 6, ("a", 3): 2, ("b", 1): 3, ("b", 2): 9}
        estimate = expand(strata, lambda unit: F(w.get(unit[0], 0)))
        nu = degrees_of_freedom(strata, estimate.parts)
        t = t_two_sided(0.95, nu)
        self.assertEqual((estimate.mean, estimate.variance), (F(11, 4), F(123, 128)))
        self.assertAlmostEqual(nu, 4.750824, delta=5e-7)
        self.assertAlmostEqual(t, 2.611668, delta=5e-7)
        half = t * float(estimate.variance) ** 0.5
        self.assertAlmostEqual(2.75 - half, 0.189849, delta=5e-7)
        self.assertAlmostEqual(2.75 + half, 5.310151, delta=5e-7)

    def test_student_quantiles(self):
        """Closed forms of Student's t at 1, 2 and 4 degrees of freedom: p = 1/2 + atan(t)/pi; t/(2 sqrt(2 + t^2)) + 1/2."""
        self.assertAlmostEqual(t_two_sided(0.5, 1), 1, delta=1e-12)
        self.assertAlmostEqual(t_two_sided(0.95, 2), 0.95 * (2 / (1 - 0.95 ** 2)) ** 0.5, delta=1e-11)
        self.assertAlmostEqual(t_two_sided(0.95, 1), 12.706204736174694, delta=1e-9)

    def test_missed_cluster(self):
        """derived: the largest M that some placement lets escape with chance 5 %."""
        for sizes, want in {((400, 10),): 102, ((400, 20),): 54, ((400, 40),): 27, ((300, 60),): 13,
                            ((200, 40), (100, 5)): 44, ((200, 40), (100, 20)): 13, ((300, 30), (100, 30)): 27}.items():
            self.assertEqual(missed_cluster_pits(sizes, F(95, 100)), want, sizes)


if __name__ == "__main__":
    unittest.main()
