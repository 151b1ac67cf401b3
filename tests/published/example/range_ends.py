"""True ends of single taxa: recovery coordinate, uniform, window and sampled; roles and reworking ceilings."""

from bisect import bisect_right
from fractions import Fraction
from math import comb, exp, expm1, log, log1p

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
    """(N', n', barren levels above the highest find), mode first."""
    hits = [i for i, (_, names) in enumerate(levels) if names & found]
    return hits[-1] - hits[0], len(hits) - 1, [h for h, _ in levels[hits[-1] + 1:]]


def barren_chance(n_range, n_finds, j):
    return Fraction(comb(n_range, n_finds), comb(n_range + j, n_finds))


def furthest_barren(n_range, n_finds, count):
    return max(j for j in range(count + 1) if j == 0 or barren_chance(n_range, n_finds, j) > Fraction(5, 100))


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
    n_range, n_finds, barren = sampled(case["levels"], taxon["samples"])
    low = taxon["heights"][-1]
    if n_finds == 0:
        return {"outcome": "undefined", "low": low}
    if taxon["reaches_top"] or not barren:
        return {"outcome": "leaves-section", "low": low}
    row = {"low": low}
    if case["H"] >= low:
        p = barren_chance(n_range, n_finds, bisect_right(barren, case["H"]))
        row.update(p=float(p), reach=float(1 - p))
    j = furthest_barren(n_range, n_finds, len(barren))
    if j == len(barren):
        return {**row, "outcome": "open"}
    return {**row, "outcome": "closed", "high": barren[j]}
