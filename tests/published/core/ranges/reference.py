"""Plain textbook formulas for one taxon's range end, independent of the product. numpy, scipy."""
import math
from fractions import Fraction
from scipy import optimize

def one_ended(n, C, mode='first'):
    """Extension as a multiple of R ('first': exponent n-1) or of the distance from a known base ('base': exponent n)."""
    return math.expm1(-math.log1p(-C) / {'first': n - 1, 'base': n}[mode])

def two_ended_level(a, n):
    return 1 - 2 * (1 + a) ** (1 - n) + (1 + 2 * a) ** (1 - n)

def two_ended(n, C):
    return optimize.brentq(lambda a: two_ended_level(a, n) - C, 0, 1e12, xtol=1e-15, rtol=1e-14)

def persistence_p(n, tn, T):
    return (tn / T) ** n

def evidence_ratio(n, tn, T):
    return (n - 1) / ((T / tn) ** (n - 1) - 1)

class Recovery:
    """Piecewise linear recovery in segments (h0, h1, r0, r1)."""
    def __init__(s, segments): s.segments = sorted(segments)
    def U(s, h):
        total = 0
        for h0, h1, r0, r1 in s.segments:
            if h <= h0: break
            x = min(h, h1) - h0; L = h1 - h0
            total += r0 * x + 0.5 * (r1 - r0) / L * x * x
        return total
    def gap(s, u):
        for h0, h1, r0, r1 in s.segments:
            if r0 == 0 and r1 == 0 and abs(s.U(h0) - u) <= 1e-12 * max(1.0, abs(u)): return (h0, h1)
        return None
    def inverse(s, u):
        """For upper limits: on a zero-recovery piece its top."""
        g = s.gap(u)
        if g: return g[1]
        total = 0
        for h0, h1, r0, r1 in s.segments:
            L = h1 - h0; A = 0.5 * (r0 + r1) * L
            if A > 0 and u <= total + A * (1 + 1e-15):
                y = u - total
                if y <= 0: return h0
                return h0 + min(L, 2 * y / (r0 + math.sqrt(max(0.0, r0 * r0 + 2 * y * (r1 - r0) / L))))
            total += A
        return math.inf

def weighted_limit(h, recovery, C):
    h = sorted(h); first, last = recovery.U(h[0]), recovery.U(h[-1])
    upper = last + (last - first) * math.expm1(-math.log1p(-C) / (len(h) - 1))
    return dict(u_first=first, u_last=last, u_upper=upper, upper=recovery.inverse(upper))

def barren_chance(N, n, j):
    p = 1.0
    for i in range(j): p *= (N + i + 1 - n) / (N + i + 1)
    return p

def count(presence, first):
    """presence (0/1) of the sampled horizons upward from the known base: N', n', barren above."""
    k = [i for i, v in enumerate(presence) if v]
    N = k[-1] - k[0] if first else k[-1] + 1
    return N, len(k) - first, len(presence) - 1 - k[-1]

def furthest(N, n, alpha='0.05', M=None):
    """Largest j with p(j) > alpha, in exact integers."""
    a = Fraction(alpha); j = 0
    while (M is None or j < M) and Fraction(math.comb(N, n), math.comb(N + j + 1, n)) > a: j += 1
    return j
