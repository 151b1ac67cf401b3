"""Iridium of one section: background, tests, integrated excess, box mixing. Optimisers are SciPy's."""

import numpy as np
from scipy import optimize, stats
from scipy.special import log_ndtr

from study_tables import number_and_limit

LN10 = np.log(10)
UNIT = {"ng/g": 1.0, "ppb": 1.0, "pg/g": 1e-3}
SIGMAS = {"1s": lambda e, c: e, "2s": lambda e, c: e / 2, "1s%": lambda e, c: e * c / 100, "2s%": lambda e, c: e * c / 200}


def profile(study, section):
    """Arrays of the section's iridium from below upward, ng/g; a point or slab each."""
    cells = []
    for r in study.measurements:
        if r["section"] != section or r["analyte"] != "iridium":
            continue
        factor = UNIT[r["unit"]]
        value, censored = number_and_limit(r["value"])
        sigma = SIGMAS[r["error_kind"]](float(r["error"]), value) if r["error"] else np.nan
        slab = study.samples[section, r["sample"]]
        density = float(slab["density"] or study.meta[section]["density_g_cm3"])
        limit = float(r["detection_limit"]) if r["detection_limit"] else np.nan
        cells.append((slab["height"], slab["base"], slab["top"], value * factor, censored, sigma * factor, density,
                      limit * factor, r["sample"]))
    cells.sort()
    names = ["height", "base", "top", "value", "censored", "sigma", "density", "limit"]
    p = {name: np.array([c[i] for c in cells]) for i, name in enumerate(names)}
    p["sample"] = [c[-1] for c in cells]
    p["censored"] = p["censored"].astype(bool)
    assert not np.isnan(p["sigma"][~p["censored"]]).any(), "every measured value of the example has an error"
    # Below detection: r = 0.10 and a = DL / 3.29.
    dl = p["value"]
    p["sigma"] = np.where(p["censored"], np.hypot(0.10 * dl, dl / 3.29), p["sigma"])
    return p


def censored_normal(y, censored):
    def minus(t):
        z = (y - t[0]) / np.exp(t[1])
        return -np.sum(np.where(censored, log_ndtr(z), -0.5 * z * z - t[1] - 0.5 * np.log(2 * np.pi)))

    start = [np.median(y), np.log(np.std(y) + 0.05)]
    best = optimize.minimize(minus, start, method="BFGS", options={"gtol": 1e-9})
    best = optimize.minimize(minus, best.x, method="Nelder-Mead", options={"xatol": 1e-12, "fatol": 1e-14, "maxiter": 4000})
    return best.x[0], np.exp(best.x[1])


def shortest_half(y, floor):
    v = np.sort(y)
    n = len(v)
    hh = n // 2 + 1
    width = v[hh - 1:] - v[: n - hh + 1]
    i = int(np.argmin(width))
    return np.median(v[i:i + hh]), max(width[i] / (2 * stats.norm.ppf(0.5 + hh / (2 * n))), floor)


def product_limit_quantile(y, censored, q):
    """Smallest measured value with F(v) >= q, F the product limit from the top."""
    s, below = 1.0, []
    for v in sorted(set(y[~censored]), reverse=True):
        below.append((v, s))
        at_or_below = np.sum(y <= v)
        s *= 1 - np.sum((y == v) & ~censored) / at_or_below
    fit = [v for v, f in below if f >= q - 1e-12]
    return min(fit) if fit and s < q else None


def background(p, by_likelihood):
    """m, s of lg C and the kept set. `by_likelihood`: every pass clips with the censored likelihood, else with the
    product-limit median and upper quartile; the last m and s are the likelihood's in both."""
    y, censored = np.log10(p["value"]), p["censored"]
    m, s = shortest_half(y, 0.02)
    if censored.any() and not by_likelihood:
        s = max(s, 0.1)
    kept = None
    for _ in range(20):
        new = (y <= m + 3 * s) if censored.any() else (np.abs(y - m) <= 3 * s)
        if kept is not None and (new == kept).all():
            break
        kept = new
        yk, ck = y[kept], censored[kept]
        if not ck.any():
            m = np.median(yk)
            s = 1.4826 * np.median(np.abs(yk - m))
        elif by_likelihood:
            m, s = censored_normal(yk, ck)
        else:
            q50, q75 = (product_limit_quantile(yk, ck, q) for q in (0.5, 0.75))
            m, s = (q50, (q75 - q50) / 0.6745) if q50 is not None and q75 is not None else censored_normal(yk, ck)
        s = max(s, 0.02)
    if censored[kept].any():
        m, s = censored_normal(y[kept], censored[kept])
    s = max(s, 0.02)
    return {"m": m, "s": s, "kept": kept, "n": int(kept.sum()), "detects": int((kept & ~censored).sum()),
            "median": 10 ** m, "mean": np.exp(m * LN10 + (s * LN10) ** 2 / 2), "threshold": 10 ** (m + 3 * s),
            "likelihood": bool(censored[kept].any())}


def tests(p, bg):
    n, s = bg["n"], bg["s"]
    scale, factor, df = (s, 1 + 1 / n, max(2, bg["detects"] - 1)) if bg["likelihood"] else (
        s * n / (n - 0.8), 1 + np.pi / (2 * n), max(2, 0.37 * (n - 1)))
    t = (np.log10(p["value"]) - bg["m"]) / np.sqrt(scale**2 * factor + (p["sigma"] / (p["value"] * LN10)) ** 2)
    pv = np.where(p["censored"], 1.0, stats.t.sf(t, df))
    order = np.argsort(pv, kind="stable")
    n_all = len(pv)
    stepped = pv[order] * n_all / np.arange(1, n_all + 1)
    q = np.empty(n_all)
    q[order] = np.minimum(1, np.minimum.accumulate(stepped[::-1])[::-1])
    return pv, q


def runs(flagged, p, pv, ceiling):
    out = []
    for i in np.flatnonzero(flagged):
        if out and i == out[-1][1] + 1:
            out[-1][1] = i
        elif out and i == out[-1][1] + 2 and (
                p["value"][i - 1] > ceiling if p["censored"][i - 1] else pv[i - 1] <= 0.05):
            out[-1][1] = i
        else:
            out.append([i, i])
    return [(int(a), int(b)) for a, b in out]


def fluence(p, bg, run, seed=1, draws=20000):
    """Linear fill of gaps, slabs summed; first-order sigma terms; Monte Carlo limits."""
    w = slice(max(0, run[0] - 1), min(len(p["value"]), run[1] + 2))
    base, top = p["base"][w] * 100, p["top"][w] * 100
    mu, s = bg["m"] * LN10, bg["s"] * LN10
    u = (np.log(p["value"][w]) - mu) / s
    below = np.exp(mu + s * s / 2 + log_ndtr(u - s) - log_ndtr(u))
    square = np.exp(2 * mu + 2 * s * s + log_ndtr(u - 2 * s) - log_ndtr(u))
    cens = p["censored"][w]
    c = np.where(cens, below, p["value"][w])
    sigma = np.where(cens, np.sqrt(np.maximum(0, square - below**2)), p["sigma"][w])
    gap = base[1:] - top[:-1]
    width = top - base + (np.append(gap, 0) + np.append(0, gap)) / 2
    rho = p["density"][w]
    sigma_b = bg["mean"] * LN10 * 1.2533 * bg["s"] / np.sqrt(bg["n"])
    value = np.sum((c - bg["mean"]) * rho * width)
    analytic = np.sum((rho * width * sigma) ** 2)
    of_background = (np.sum(rho * width) * sigma_b) ** 2
    rng = np.random.default_rng(seed)
    s2 = np.log1p((sigma / c) ** 2)
    drawn = c * np.exp(np.sqrt(s2) * rng.standard_normal((draws, len(c))) - s2 / 2)
    b = bg["mean"] + sigma_b * rng.standard_normal(draws)
    f = np.sum((drawn - b[:, None]) * rho * width, axis=1)
    return {"value": value, "analytic": analytic, "background": of_background,
            "sigma": np.sqrt(analytic + of_background), "low": np.quantile(f, 0.025), "high": np.quantile(f, 0.975),
            "censoredInWindow": int(cens.sum()), "coverage": 1 - np.maximum(gap, 0).sum() / (top[-1] - base[0])}


class Box:
    """Box-mixing likelihood in four parameters: F (ng/cm2), B (ng/g), hb (cm), ln L (cm)."""

    def __init__(self, p, bg, run, margin=10):
        w = slice(max(0, run[0] - margin), min(len(p["value"]), run[1] + margin + 1))
        self.datum = p["base"][run[0]]
        self.base, self.top = (p["base"][w] - self.datum) * 100, (p["top"][w] - self.datum) * 100
        self.c, self.cens, self.rho, self.sig = (p[k][w] for k in ("value", "censored", "density", "sigma"))
        self.bg = bg
        det = ~p["censored"]
        a = np.column_stack([(p["value"][det] / p["sigma"][det]) ** 2, p["sigma"][det] ** -2.0])
        (self.r2, self.a2), _ = optimize.nnls(a, np.ones(det.sum()))
        self.first = np.hypot(self.sig, bg["s"] * LN10 * bg["median"])

    def shape(self, hb, length):
        low = np.maximum(self.base, hb)
        thick = self.top - self.base
        slab = -np.expm1(-np.maximum(0, self.top - low) / length) / np.where(thick > 0, thick, 1)
        mean = np.exp(-(low - hb) / length) * np.where(thick > 0, slab, 1 / length)
        return np.where(self.top > hb, mean, 0) / self.rho

    def loglik(self, model, s):
        z = (self.c - model) / s
        return np.sum(np.where(self.cens, log_ndtr(z), -0.5 * z * z - np.log(s) - 0.5 * np.log(2 * np.pi)))

    def line(self, u, s):
        """Best F and B for a shape: weighted least squares, then Newton-Raphson where cells are censored."""
        x = np.column_stack([u, np.ones_like(u)])
        d = ~self.cens
        beta = np.linalg.lstsq(x[d] / s[d, None], self.c[d] / s[d], rcond=None)[0]
        if self.cens.any():
            beta = self._newton(x, s, beta)
        return beta, self.loglik(x @ beta, s)

    def _newton(self, x, s, beta):
        value = self.loglik(x @ beta, s)
        for _ in range(50):
            z = (self.c - x @ beta) / s
            mills = np.exp(stats.norm.logpdf(z) - log_ndtr(z))
            slope = np.where(self.cens, -mills, z) / s
            bend = np.where(self.cens, mills * (mills + z), 1) / s**2
            step = np.linalg.solve(x.T @ (bend[:, None] * x), x.T @ slope)
            share = 1.0
            while share > 1e-6 and self.loglik(x @ (beta + share * step), s) < value:
                share /= 2
            beta = beta + share * step if share > 1e-6 else beta
            new = self.loglik(x @ beta, s)
            if new - value < 1e-13 * (1 + abs(new)):
                break
            value = new
        return beta

    def at(self, hb, length, s):
        return self.line(self.shape(hb, length), s)

    def best(self, s, start=None):
        def minus(t):
            return -self.at(t[0], np.exp(t[1]), s)[1]

        if start is None:
            grid = [(minus((hb, np.log(length))), hb, np.log(length))
                    for hb in np.arange(self.base[0], self.top[-1], 0.5) for length in (1, 2, 4, 8, 12)]
            start = min(grid)[1:]
        x = np.array(start)
        for _ in range(3):
            x = optimize.minimize(minus, x, method="Nelder-Mead", options={
                "xatol": 1e-9, "fatol": 1e-12, "maxiter": 4000, "initial_simplex": [x, x + [0.05, 0], x + [0, 0.02]]}).x
        (f, b), value = self.at(x[0], np.exp(x[1]), s)
        return {"hb": x[0], "L": np.exp(x[1]), "F": f, "B": b, "lnL": value}

    def refit(self, first):
        best = first
        for _ in range(3):
            model = best["B"] + best["F"] * self.shape(best["hb"], best["L"])
            ratio = np.sqrt((self.r2 * model**2 + self.a2) / (self.r2 * self.c**2 + self.a2))
            s = np.hypot(self.sig * ratio, self.bg["s"] * LN10 * best["B"])
            best = self.best(s, (best["hb"], np.log(best["L"])))
        model = best["B"] + best["F"] * self.shape(best["hb"], best["L"])
        d = ~self.cens
        chi2 = np.sum(((self.c - model) / s)[d] ** 2)
        misfit = stats.chi2.sf(chi2, d.sum() - 4)
        best["inflation"] = max(1, chi2 / (d.sum() - 4)) if misfit < 0.01 else 1.0
        return best, s

    def thin(self, s):
        gap = self.base[1:] - self.top[:-1]
        thick = self.top - self.base
        thick = np.where(thick > 0, thick, (np.append(gap, 0) + np.append(0, gap)) / 2)
        return max(self.line(np.where(np.arange(len(self.c)) == i, 1 / (self.rho * thick), 0), s)[1]
                   for i in np.flatnonzero(~self.cens & (thick > 0)))

    def none(self, s):
        one = optimize.minimize_scalar(lambda b: -self.loglik(np.full(len(self.c), b), s), bounds=(0, self.c.max()),
                                       method="bounded", options={"xatol": 1e-12})
        return -one.fun

    def interval(self, what, best, s, drop):
        """Profile-likelihood limits of L, or of h0 = hb + L itself."""
        def profile_at(v):
            span = np.log([best["L"] / 1.6, best["L"] * 1.6])
            if what == "L":
                lo, hi = best["hb"] - 3, best["hb"] + 3
                f = lambda hb: -self.at(hb, v, s)[1]
            else:
                lo, hi = span
                f = lambda q: -self.at(v - np.exp(q), np.exp(q), s)[1]
            grid = np.linspace(lo, hi, 121)
            k = int(np.argmin([f(g) for g in grid]))
            m = optimize.minimize_scalar(f, bounds=(grid[max(0, k - 1)], grid[min(120, k + 1)]), method="bounded",
                                         options={"xatol": 1e-9})
            return -m.fun

        centre = best["L"] if what == "L" else best["hb"] + best["L"]
        g = lambda v: profile_at(v) - (best["lnL"] - drop)
        step = 0.05
        while g(centre - step) > 0:
            step *= 2
        low = optimize.brentq(g, centre - step, centre, xtol=1e-7)
        step = 0.05
        while g(centre + step) > 0:
            step *= 2
        return low, optimize.brentq(g, centre, centre + step, xtol=1e-7)


def mixing(p, bg, run):
    box = Box(p, bg, run)
    first = box.best(box.first)
    n = len(box.c)
    aicc = {k: -2 * v + 2 * q + 2 * q * (q + 1) / (n - q - 1) for k, v, q in (
        ("M0", box.none(box.first), 1), ("M1", box.thin(box.first), 3), ("M2", first["lnL"], 4))}
    best, s = box.refit(first)
    drop95 = stats.chi2.ppf(0.95, 1) / 2 * best["inflation"]
    metres = lambda cm: box.datum + cm / 100
    h0 = best["hb"] + best["L"]
    low, high = box.interval("h0", best, s, drop95)
    low68, high68 = box.interval("h0", best, s, 0.5 * best["inflation"])
    l_low, l_high = box.interval("L", best, s, drop95)
    return {"h0": metres(h0), "hb": metres(best["hb"]), "L": best["L"] / 100, "F": best["F"], "B": best["B"],
            "low": metres(low), "high": metres(high), "sigma": (high68 - low68) / 200, "Llow": l_low / 100,
            "Lhigh": l_high / 100, "aicc": aicc, "inflation": best["inflation"], "cells": n}
