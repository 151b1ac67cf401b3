"""True ends of single taxa: recovery coordinate, uniform, window and sampled; roles and reworking ceilings."""

from bisect import bisect_right
from fractions import Fraction
from math import exp, expm1, log, log1p

import numpy as np

C = 0.95


class Coordinate:
    """U(h): metres of searchable rock, r = 0 in the section's gaps and 1 elsewhere and beyond its ends."""

    def __init__(self, gaps):
        self.gaps = sorted(gaps)

    def u(self, h):
        return h - sum(min(max(h - low, 0), high - low) for low, high in self.gaps)

    def height(self, u):
        """Upper end of the levels with this U."""
        h = u
        for low, high in self.gaps:
            if h >= low - 1e-12 * max(1, abs(low)):
                h += high - low
        return h

    def in_gap(self, u):
        return any(abs(self.u(low) - u) <= 1e-12 * max(1, abs(u)) for low, _ in self.gaps)


def reworking_ceiling(heights, surface, length):
    base = surface - length
    below = [h for h in heights if h <= base]
    if len(below) < 2 or base <= below[0]:
        return None
    density = (len(below) - 1) / (base - below[0])
    ceiling = base + length * (log(density * length) - log(-log(0.95)))
    return ceiling if ceiling > base else None


def role_of(heights, strict_in_place, horizon, ceiling):
    """Role of one taxon against H = (position, high, base of the smear), in the order in which the rules stand."""
    position, high, smear = horizon
    if heights[0] > min(position, smear if smear is not None else position):
        return "aftermath"
    if strict_in_place[-1] > max(high, ceiling if ceiling is not None else high):
        return "survivor"
    return "too-few" if len(heights) < 3 else "candidate"


def sampled(levels, found):
    """Efforts and finds of the levels of the range, mode first, and the barren levels above the highest find."""
    hits = [i for i, (_, names, _) in enumerate(levels) if names & found]
    inside = [(e, bool(names & found)) for _, names, e in levels[hits[0] + 1:hits[-1] + 1]]
    return inside, [(h, e) for h, _, e in levels[hits[-1] + 1:]]


def symmetric(odds, k):
    """Elementary symmetric polynomial of degree k, exact."""
    e = [Fraction(1)] + [Fraction(0)] * k
    for w in odds:
        for i in range(k, 0, -1):
            e[i] += e[i - 1] * w
    return e


def barren_chances(inside, barren):
    """p(j), exact: odds of a find in proportion to effort."""
    finds = sum(found for _, found in inside)
    e = symmetric([effort for effort, _ in inside], finds)
    top, chances = e[finds], [Fraction(1)]
    for _, w in barren:
        for i in range(finds, 0, -1):
            e[i] += e[i - 1] * w
        chances.append(top / e[finds])
    return chances


def median_end(inside, barren, last, top):
    """Posterior median of the end, prior flat in height up to the top, detection 1 - exp(-lambda e), lambda ~ Exp(1)."""
    efforts = np.array([float(e) for e, _ in inside] + [float(e) for _, e in barren])
    efforts = efforts / efforts.mean()
    found = np.array([f for _, f in inside])
    finds, absent, above = efforts[:len(inside)][found], efforts[:len(inside)][~found].sum(), efforts[len(inside):]
    x = np.linspace(-18, 5, 40001)
    lam = np.exp(x)
    shared = np.log(-np.expm1(-np.outer(finds, lam))).sum(axis=0) - lam * (absent + 1) + x
    integrals = np.array([np.exp(shared - shared.max() - lam * a).sum() for a in np.r_[0, np.cumsum(above)]])
    edges = np.array([last] + [h for h, _ in barren] + [top])
    mass = np.r_[0, np.cumsum(integrals * np.diff(edges))]
    return float(np.interp(mass[-1] / 2, mass, edges))


def ends(taxon, coordinate, case):
    """Rows of uniform, window and sampled for the heights of one taxon. case: H, section top, levels searched."""
    heights, horizon, top = taxon["heights"], case["H"], case["top"]
    n, m, last = len(heights), len(heights) - 1, heights[-1]
    out = {"uniform": {"outcome": "undefined"}, "window": {"outcome": "undefined"}}
    out["sampled"] = sampled_end(taxon, case)
    if m < 1:
        return out
    b, u = coordinate.u(heights[0]), coordinate.u(last)
    reach = None if horizon < last else -expm1(m * log((u - b) / (coordinate.u(horizon) - b)))
    if taxon["reaches_top"]:
        out["uniform"] = out["window"] = {"outcome": "leaves-section", "low": last}
        return out
    bound = u + (u - b) * expm1(-log1p(-C) / m)
    high = coordinate.height(bound)
    outcome = "in-hiatus" if coordinate.in_gap(bound) else "closed" if high <= top else "leaves-section"
    out["uniform"] = {"outcome": outcome, "low": last, "high": high, "reach": reach,
                      "point": coordinate.height(u + (u - b) / m)}
    searched = case["levels"][-1][0]
    level = horizon if last < horizon <= searched else searched
    row = {"outcome": outcome, "low": last, "high": high}
    if level > last:
        ratio = (coordinate.u(level) - b) / (u - b)
        row["p"] = exp(-m * log(ratio))
        row["ratio"] = (m - 1) / expm1((m - 1) * log(ratio)) if m > 1 else 1 / log(ratio)
        if level == horizon:
            row["reach"] = 1 - row["p"]
    out["window"] = row
    return out


def sampled_end(taxon, case):
    inside, barren = sampled(case["levels"], taxon["samples"])
    low = taxon["heights"][-1]
    if not any(found for _, found in inside):
        return {"outcome": "undefined", "low": low}
    if taxon["reaches_top"] or not barren:
        return {"outcome": "leaves-section", "low": low}
    row = {"low": low, "point": median_end(inside, barren, low, case["top"])}
    chances, heights = barren_chances(inside, barren), [h for h, _ in barren]
    if case["H"] >= low:
        p = chances[bisect_right(heights, case["H"])]
        row.update(p=float(p), reach=float(1 - p))
    j = max(j for j, p in enumerate(chances) if p > Fraction(5, 100))
    if j == len(barren):
        return {**row, "outcome": "open"}
    return {**row, "outcome": "closed", "high": heights[j]}
