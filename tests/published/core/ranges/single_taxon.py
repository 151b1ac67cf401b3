"""Plain textbook formulas for one taxon's range end beyond the uniform model, independent of the product. numpy, scipy."""
import math
from fractions import Fraction
import numpy as np
from scipy import integrate, optimize, special, stats

# ---- uniform finds, Bayesian
def flat_extension(n, C): return math.expm1(-math.log1p(-C) / (n - 2))
def flat_two_ended(n, C):
    return optimize.brentq(lambda a: 1 - 2 * (1 + a) ** (2 - n) + (1 + 2 * a) ** (2 - n) - C, 0, 1e12, xtol=1e-15, rtol=1e-14)
def flat_coverage(n, C): return 1 - (1 - C) ** ((n - 1) / (n - 2))
def share_above(b, M, U, e): return ((U - b) / (M - b)) ** (1 - e)
def truncated_quantile(b, M, U, e, p):
    """By quadrature of the density (t - b)^-e on [M, U]."""
    mass = lambda t: integrate.quad(lambda x: ((x - b) / (M - b)) ** -e, M, t, epsabs=0, epsrel=1e-13)[0]
    total = mass(U)
    return optimize.brentq(lambda t: mass(t) / total - p, M, U, xtol=1e-14)

# ---- exponential trend, exact rationals from the decimal strings, plain alternating sum
def trend_p(t, T):
    t = [Fraction(str(v)) for v in t]; T = Fraction(str(T)); n = len(t); S = sum(t)
    F = lambda x: sum((-1) ** i * math.comb(n, i) * (1 - i * x / S) ** (n - 1) for i in range(n + 1) if i * x < S)
    return float(F(max(t)) / F(T))

# ---- gaps
def gap_ranks(gaps, C, gamma):
    g = sorted(gaps); N = len(g)
    low = next((l for l in range(N, 0, -1) if stats.binom.sf(l - 1, N, C) >= gamma), None)
    high = next((u for u in range(1, N + 1) if stats.binom.cdf(u - 1, N, C) >= gamma), None)
    j = math.ceil(C * (N + 1) - 1e-12)
    at = lambda r: None if r is None else float(g[r - 1])
    j = j if j <= N else None
    return dict(rank_low=low, rank_high=high, gap_low=at(low), gap_high=at(high), exact_rank=j, exact_gap=at(j))
def gaps_needed(C, gamma): return math.ceil(math.log(1 - gamma) / math.log(C) - 1e-12)

# ---- Weibull-type tail, weights by a dense solve
def tail(t, alpha=.05, k=None):
    t = np.sort(np.asarray(t, float))[::-1][:k]; k = len(t)
    if k < 3 or t[0] == t[1] or t[1] == t[-1]: return None
    v = np.log((t[0] - t[-1]) / (t[0] - t[1:-1])).sum() / (k - 1)
    g = special.gammaln; L = np.zeros((k, k))
    for i in range(1, k + 1):
        for j in range(1, i + 1): L[i - 1, j - 1] = L[j - 1, i - 1] = math.exp(g(2 * v + i) + g(v + j) - g(v + i) - g(j))
    a = np.linalg.solve(L, np.ones(k)); a /= a.sum()
    S = lambda p: (-math.log(p) / k) ** -v
    bound = lambda p: t[0] + (t[0] - t[-1]) / (S(p) - 1)
    return dict(shape=v, estimate=float(a @ t), upper_one_sided=bound(alpha), ci_low=bound(1 - alpha / 2),
                ci_high=bound(alpha / 2), weights=list(map(float, a)))

# ---- recovery with unknown slope; base at 0, theta ~ 1/theta on (max x, Umax), lambda ~ N(0, s^2); adaptive inner quadrature
def declining(x, s=2., Umax=math.inf, probs=(.5, .9, .95)):
    x = np.sort(np.asarray(x, float)); n = len(x); xm = x[-1]; y = x / xm; sl = np.log(y).sum()
    zlo = 0. if math.isinf(Umax) else xm / Umax
    def falling(m, z0, z1):
        f = lambda z: math.exp((n - 1) * math.log(z) + m * np.log1p(-y * z).sum() + n * math.log1p(m)) if 0 < z < 1 else 0.
        return integrate.quad(f, z0, z1, epsabs=0, epsrel=1e-10, limit=400)[0] if z1 > z0 else 0.
    def rising(l, z0, z1):
        p = n * (1 + l); return math.exp(n * math.log1p(l) + l * sl) * (z1 ** p - z0 ** p) / p
    nodes, weights = np.polynomial.legendre.leggauss(24); edges = np.linspace(0, 8 * s, 13)
    M = np.concatenate([.5 * (b - a) * nodes + .5 * (a + b) for a, b in zip(edges[:-1], edges[1:])])
    W = np.concatenate([.5 * (b - a) * weights for a, b in zip(edges[:-1], edges[1:])])
    W = W * np.exp(-.5 * (M / s) ** 2) / (s * math.sqrt(2 * math.pi))
    Z = lambda z0, z1: (sum(w * falling(m, z0, z1) for m, w in zip(M, W)), sum(w * rising(m, z0, z1) for m, w in zip(M, W)))
    down, up = Z(zlo, 1.); total = down + up; out = dict(falling=down / total)
    for p in probs:
        out['q%g' % p] = xm / optimize.brentq(lambda z: sum(Z(zlo, z)) / total - (1 - p), max(zlo, 1e-9), 1 - 1e-12, xtol=1e-11)
    return out

# ---- rate taken as known; steps of one
def stepped_p(n, tn, T): return (1 - n / tn) ** (T - tn)
def stepped_bound(n, tn, alpha): return tn + math.log(alpha) / math.log1p(-n / tn)

# ---- highest finds
def two_highest(C, beta): return 1 / (C ** (-1 / beta) - 1)
def top_k(h, k, beta, C):
    h = sorted(h); omega = (1 - (1 - C) ** (1 / (k - 1))) ** (1 / beta)
    return (h[-1] - omega * h[-k]) / (1 - omega)
def omega(k, beta, C): return (-math.expm1(math.log1p(-C) / (k - 1))) ** (1 / beta)
