"""Questions about sets of taxa: common end, levels of confidence at a horizon, duration, pooled centroid."""

from fractions import Fraction
from math import comb, factorial

import numpy as np
from scipy import optimize, stats

C = 0.95


class Set:
    """Taxa of one set: heights from below upward, in metres; U of the section's coordinate."""

    def __init__(self, taxa, coordinate):
        self.coordinate, self.taxa = coordinate, taxa
        kept = [t for t in taxa if len(t["heights"]) > 1]
        u = coordinate.u
        self.b = np.array([u(t["heights"][0]) for t in kept])
        self.last = np.array([u(t["heights"][-1]) for t in kept])
        self.last_m = np.array([t["heights"][-1] for t in kept])
        self.m = np.array([len(t["heights"]) - 1 for t in kept])
        self.top = max(u(t["heights"][-1]) for t in taxa)
        self.top_m = max(t["heights"][-1] for t in taxa)

    def statistic(self, end, last):
        return 2 * np.sum(self.m * np.log((end - self.b) / (last - self.b)))

    def one_level(self):
        t = self.statistic(self.last.max(), self.last)
        df = 2 * (len(self.m) - 1)
        return t, df, stats.chi2.sf(t, df)

    def given(self, level):
        """Upper end of the common level, one level taken for granted."""
        star = self.last.max()
        f = lambda d: self.statistic(star + d, star) + 2 * np.log1p(-level)
        return self._up(f, star)

    def joint(self):
        star, limit = self.last.max(), stats.chi2.ppf(C, 2 * len(self.m))
        if self.statistic(star, self.last) > limit:
            return None
        return self._up(lambda d: self.statistic(star + d, self.last) - limit, star)

    def _up(self, f, star):
        step = 0.01
        while f(step) < 0:
            step *= 2
        return self.coordinate.height(star + optimize.brentq(f, 0, step, xtol=1e-14, rtol=1e-15, maxiter=500))

    def levels(self, height):
        return np.sort(((self.last - self.b) / (self.coordinate.u(height) - self.b)) ** self.m)

    def distance(self, height):
        s = self.levels(height)
        k = len(s)
        return max((np.arange(1, k + 1) / k - s).max(), (s - np.arange(k) / k).max())

    def at_horizon(self, low, high):
        """Largest exact Kolmogorov-Smirnov p over the horizon's interval, and where."""
        if self.top_m > high:
            return 0.0, None
        low = max(low, self.top_m)
        grid = np.linspace(low, high, 201)
        d = [self.distance(h) for h in grid]
        k = int(np.argmin(d))
        best, where = d[k], grid[k]
        if 0 < k < 200:
            fine = np.linspace(grid[k - 1], grid[k + 1], 4001)
            fd = [self.distance(h) for h in fine]
            best, where = min(fd), fine[int(np.argmin(fd))]
        return stats.kstwo.sf(best, len(self.m)), where

    def combined(self, low, high):
        """Largest p of Fisher's combination over the horizon's interval: at its lowest level with every last find below."""
        if self.top_m > high:
            return 0.0, None
        low = max(low, self.top_m)
        return stats.chi2.sf(-2 * np.log(self.levels(low)).sum(), 2 * len(self.m)), low

    def shortest(self):
        limit = stats.chi2.ppf(C, 2 * (len(self.m) - 1))

        def excess(duration):
            level = self.coordinate.u(self.last_m.max() - duration)
            low = self.last_m < self.last_m.max() - duration
            return 2 * np.sum(self.m[low] * np.log((level - self.b[low]) / (self.last[low] - self.b[low]))) - limit

        if excess(0) <= 0:
            return 0.0
        return optimize.brentq(excess, 0, np.ptp(self.last_m), xtol=1e-14, rtol=1e-15, maxiter=500)

    def box(self):
        level = C ** (1 / len(self.m))
        bound = self.last + (self.last - self.b) * np.expm1(-np.log1p(-level) / self.m)
        upper = np.array([self.coordinate.height(v) for v in bound])
        n = len(self.m)
        longest = max(upper[i] - self.last_m[j] for i in range(n) for j in range(n) if i != j)
        return max(0.0, self.last_m.max() - upper.min()), max(0.0, longest)


def irwin_hall(x, n):
    """P(sum of n uniforms <= x), exact in rationals."""
    x = Fraction(x)
    total = sum((-1) ** k * comb(n, k) * (x - k) ** n for k in range(int(x) + 1))
    return float(total / factorial(n))


def centroid(taxa, coordinate):
    inner = []
    for t in taxa:
        u = [coordinate.u(h) for h in t["heights"]]
        inner += [(v - u[0]) / (u[-1] - u[0]) for v in u[1:-1]] if len(u) > 2 else []
    n = len(inner)
    if n == 0:
        return None
    total = sum(map(Fraction, inner))
    z = float((total / n - Fraction(1, 2))) * np.sqrt(12 * n)
    return z, irwin_hall(total, n) if n <= 60 else stats.norm.cdf(z), n
