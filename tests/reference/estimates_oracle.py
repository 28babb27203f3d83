"""Adaptive cluster sampling estimators in exact rational numbers, straight from the textbook formulas.

Thompson SK 1990, Adaptive cluster sampling, JASA 85:1050-1059; Thompson SK 1991, Stratified adaptive cluster sampling,
Biometrika 78:389-397; Thompson SK 1991, Adaptive cluster sampling: designs with primary and secondary units,
Biometrics 47:1103-1115. Formulas from memory, proved by the enumerations in worked_examples_test.py.

A sample is a list of Stratum, one an area. A network is a frozenset of nodes. y is a dict node -> whole number.
"""

from dataclasses import dataclass
from fractions import Fraction
from functools import lru_cache
import math


@dataclass
class Stratum:
    units: list  # every primary unit of the area: a list of its nodes
    drawn: list  # indices of the drawn units

    @property
    def size(self):
        return len(self.units)

    @property
    def count(self):
        return len(self.drawn)

    @property
    def taken_whole(self):
        return self.count == self.size


@dataclass
class Estimate:
    mean: Fraction
    parts: list  # the variance's part of each stratum; None where one unit was drawn of several
    variance: Fraction  # None where any part is None


def nodes_in(strata):
    return sum(len(unit) for stratum in strata for unit in stratum.units)


# Networks

def components(nodes, neighbours):
    """Maximal connected sets of `nodes`."""
    left, found = set(nodes), []
    while left:
        reached, fresh = set(), {min(left)}
        while fresh:
            reached |= fresh
            fresh = {n for node in fresh for n in neighbours(node) if n in left} - reached
        found.append(frozenset(reached))
        left -= reached
    return found


def network_of_each(strata, positives, neighbours):
    """node -> its network. A node that is not positive is a network of its own."""
    network = {node: frozenset([node]) for stratum in strata for unit in stratum.units for node in unit}
    for component in components(positives, neighbours):
        network.update({node: component for node in component})
    return network


def units_met(strata, network):
    """The primary units that a network intersects: for each stratum a frozenset of unit indices."""
    return tuple(frozenset(i for i, unit in enumerate(s.units) if not network.isdisjoint(unit)) for s in strata)


# Sums over units: the shape that Hansen-Hurwitz and the first sample share

def sample_variance(values):
    mean = sum(values, Fraction(0)) / len(values)
    return sum(((v - mean) ** 2 for v in values), Fraction(0)) / (len(values) - 1)


def expand(strata, value_of_unit):
    """mean = N^-1 sum_h (N_h/n_h) sum_i W_hi; v_h = (N_h/N)^2 (1-f_h) s_h^2/n_h."""
    total_nodes = nodes_in(strata)
    mean, parts = Fraction(0), []
    for stratum in strata:
        values = [value_of_unit(unit) for unit in (stratum.units[i] for i in stratum.drawn)]
        weight = Fraction(stratum.size, total_nodes)
        mean += weight * sum(values, Fraction(0)) / stratum.count
        if stratum.taken_whole:
            parts.append(Fraction(0))
        elif stratum.count == 1:
            parts.append(None)
        else:
            unseen = 1 - Fraction(stratum.count, stratum.size)
            parts.append(weight ** 2 * unseen * sample_variance(values) / stratum.count)
    return Estimate(mean, parts, None if None in parts else sum(parts, Fraction(0)))


def first_sample_only(strata, y):
    return expand(strata, lambda unit: Fraction(sum(y.get(node, 0) for node in unit)))


def hansen_hurwitz(strata, network, y):
    """W_hi = sum over the networks k that unit i meets of y*_k / x_k."""
    def share(unit):
        met = {network[node] for node in unit}
        return sum((Fraction(network_total(k, y), network_hits(strata, k)) for k in met), Fraction(0))
    return expand(strata, share)


def network_total(network, y):
    return sum(y.get(node, 0) for node in network)


def network_hits(strata, network):
    """x_k, the number of primary units that intersect network k."""
    return sum(map(len, units_met(strata, network)))


# Horvitz-Thompson

@lru_cache(maxsize=None)
def chance_all_missed(sizes):
    """prod_h C(N_h - x_h, n_h)/C(N_h, n_h), for ((N_h, n_h, x_h), ...)."""
    chance = Fraction(1)
    for size, count, hits in sizes:
        chance *= Fraction(math.comb(size - hits, count), math.comb(size, count))
    return chance


def chance_missed(strata, met):
    return chance_all_missed(tuple((s.size, s.count, len(units)) for s, units in zip(strata, met)))


def inclusion(strata, met):
    """alpha_k = 1 - q_k."""
    return 1 - chance_missed(strata, met)


def joint_inclusion(strata, met_j, met_k):
    """alpha_jk = 1 - q_j - q_k + q_jk, where q_jk is the chance that no drawn unit meets either."""
    either = tuple(a | b for a, b in zip(met_j, met_k))
    return 1 - chance_missed(strata, met_j) - chance_missed(strata, met_k) + chance_missed(strata, either)


def met_networks(strata, network):
    return {network[node] for s in strata for i in s.drawn for node in s.units[i]}


def totals_by_units(strata, networks, y):
    """Networks with y* > 0 that meet the same units are always met together: one total for all of them."""
    totals = {}
    for k in networks:
        total = network_total(k, y)
        if total:
            met = units_met(strata, k)
            totals[met] = totals.get(met, 0) + total
    return list(totals.items())


def horvitz_thompson(strata, network, y):
    """mean = N^-1 sum_k y*_k/alpha_k; v = N^-2 sum_jk (y*_j y*_k/alpha_jk)(alpha_jk/(alpha_j alpha_k) - 1)."""
    total_nodes = nodes_in(strata)
    totals = totals_by_units(strata, met_networks(strata, network), y)
    mean = sum((total / inclusion(strata, met) for met, total in totals), Fraction(0)) / total_nodes
    if any(s.count == 1 and not s.taken_whole for s in strata):
        return Estimate(mean, None, None)
    products = {}  # (alpha_j, alpha_k, alpha_jk) -> sum of y*_j y*_k
    for j, (met_j, total_j) in enumerate(totals):
        for k, (met_k, total_k) in enumerate(totals):
            alpha_jk = inclusion(strata, met_j) if j == k else joint_inclusion(strata, met_j, met_k)
            key = (inclusion(strata, met_j), inclusion(strata, met_k), alpha_jk)
            products[key] = products.get(key, 0) + total_j * total_k
    variance = sum((product / a_jk * (a_jk / (a_j * a_k) - 1) for (a_j, a_k, a_jk), product in products.items()),
                   Fraction(0)) / total_nodes ** 2
    return Estimate(mean, None, variance)


# Intervals: plain t on Satterthwaite's degrees of freedom

def degrees_of_freedom(strata, parts):
    """nu = v^2 / sum over strata with f_h < 1 of v_h^2/(n_h - 1); None where every part is 0."""
    below = sum((part ** 2 / (s.count - 1) for s, part in zip(strata, parts) if not s.taken_whole and part), Fraction(0))
    return None if below == 0 else float(sum(parts) ** 2 / below)


def beta_fraction(a, b, x):
    """Continued fraction of the incomplete beta function, evaluated from the back."""
    value = 0.0
    for m in range(40 + int(2 * math.sqrt(a + b)), 0, -1):
        even = m * (b - m) * x / ((a + 2 * m - 1) * (a + 2 * m))
        odd = -(a + m) * (a + b + m) * x / ((a + 2 * m) * (a + 2 * m + 1))
        value = even / (1 + odd / (1 + value))
    first = -(a + b) * x / (a + 1)
    return 1 / (1 + first / (1 + value))


def incomplete_beta(a, b, x):
    """Regularised I_x(a, b)."""
    if x <= 0 or x >= 1:
        return float(x >= 1)
    front = math.exp(math.lgamma(a + b) - math.lgamma(a) - math.lgamma(b) + a * math.log(x) + b * math.log1p(-x))
    if x < (a + 1) / (a + b + 2):
        return front * beta_fraction(a, b, x) / a
    return 1 - front * beta_fraction(b, a, 1 - x) / b


@lru_cache(maxsize=None)
def t_two_sided(level, nu):
    """t with P(|T| <= t) = level, by bisection on P(|T| > t) = I_{nu/(nu+t^2)}(nu/2, 1/2)."""
    def beyond(t):
        return incomplete_beta(nu / 2, 0.5, nu / (nu + t * t))
    low, high = 0.0, 1.0
    while beyond(high) > 1 - level:
        high *= 2
    while low < (low + high) / 2 < high:
        middle = (low + high) / 2
        low, high = (middle, high) if beyond(middle) > 1 - level else (low, middle)
    return high


# What the first sample can have missed

@lru_cache(maxsize=None)
def missed_cluster_pits(sizes, level):
    """Largest M such that some placement of M nodes is missed with chance >= 1 - level.

    `sizes` are ((N_h, n_h), ...), `level` a Fraction. Every split of M over the strata is tried.
    """
    best = {0: Fraction(1)}  # pits placed so far -> the best chance that they are all missed
    for size, count in sizes:
        grown = {}
        for placed in range(size + 1):
            missed = Fraction(math.comb(size - placed, count), math.comb(size, count))
            for before, chance in best.items():
                if chance * missed >= 1 - level:
                    grown[before + placed] = max(grown.get(before + placed, Fraction(0)), chance * missed)
        best = grown
    return max(best)
