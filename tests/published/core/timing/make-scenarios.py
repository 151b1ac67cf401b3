"""Writes scenarios.json beside itself: python3 make-scenarios.py. Plain quadrature, independent of the product."""
import csv, json, math, os, platform
import numpy as np, scipy
from scipy import integrate, optimize, stats
HERE = os.path.dirname(os.path.abspath(__file__))
SOURCE = 'independent computation: make-scenarios.py, Python %s, numpy %s, scipy %s' % (
    platform.python_version(), np.__version__, scipy.__version__)
SETS = {}
with open(os.path.join(HERE, 'synthetic-sections.csv')) as f:
    for r in csv.DictReader(f): SETS.setdefault(r['set'], {}).setdefault(r['taxon'], []).append(float(r['occurrence_height_m']))
rows = []
def add(case, quantity, inputs, expected, tolerance):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=expected, tolerance=tolerance, source=SOURCE))

class Recovery:
    """U(h) for recovery constant on contiguous pieces (h0, h1, r); r = 1 everywhere without pieces."""
    def __init__(self, pieces=()): self.p = list(pieces)
    def u(self, h):
        if not self.p: return h
        s = 0.0
        for h0, h1, r in self.p: s += r * min(max(h - h0, 0.0), h1 - h0)
        return s + max(0.0, h - self.p[-1][1])
    def knots(self): return [x for a, b, _ in self.p for x in (a, b)]

def taxa(finds, rec): return [dict(b=rec.u(min(h)), A=rec.u(max(h)) - rec.u(min(h)), M=max(h), m=len(h) - 1) for h in map(sorted, finds)]
def L(t, rec, h): return (t['A'] / (rec.u(h) - t['b'])) ** t['m'] if h >= t['M'] else 0.0
def mean_L(t, rec, s, e):
    """Integral of L over (s, e), piece by piece."""
    lo = max(s, t['M'])
    if e <= lo: return 0.0
    cuts = sorted({lo, e, *[k for k in rec.knots() if lo < k < e]}); total = 0.0; A, m = t['A'], t['m']
    for a, c in zip(cuts[:-1], cuts[1:]):
        s0, s1 = rec.u(a) - t['b'], rec.u(c) - t['b']; r = (s1 - s0) / (c - a)
        if m == 0 or s1 - s0 < 1e-14: total += (c - a) * (A / s0) ** m if m else c - a
        elif m == 1: total += A / r * math.log(s1 / s0)
        else: total += A / (m - 1) / r * ((A / s0) ** (m - 1) - (A / s1) ** (m - 1))
    return total
def panels(lo, hi, marks, n, levels=8):
    top = max([x for x in marks if x < hi], default=lo)
    br = sorted({lo, hi, *[x for x in marks if lo < x < hi], *[top + (hi - top) * 4.0 ** -q for q in range(1, levels)]})
    x, w = np.polynomial.legendre.leggauss(n)
    X = np.concatenate([.5 * (b - a) * x + .5 * (a + b) for a, b in zip(br[:-1], br[1:])])
    return X, np.concatenate([.5 * (b - a) * w for a, b in zip(br[:-1], br[1:])])
def matrix(tx, rec, X): return np.array([[L(t, rec, h) for h in X] for t in tx])
def marks(tx, rec): return [t['M'] for t in tx] + rec.knots()
def single(tx, rec, w0, w1):
    X, W = panels(max(w0, max(t['M'] for t in tx)), w1, rec.knots(), 40)
    return X, W * np.prod(matrix(tx, rec, X), axis=0) / (w1 - w0)
def blocks(tx, rec, w0, w1, n=30):
    k = len(tx); X, W = panels(w0, w1, marks(tx, rec), n); M = matrix(tx, rec, X); W = W / (w1 - w0)
    P = [np.ones_like(X)] + [None] * (2 ** k - 1); I = np.zeros(2 ** k)
    for S in range(1, 2 ** k): b = S.bit_length() - 1; P[S] = P[S ^ (1 << b)] * M[b]; I[S] = (W * P[S]).sum()
    return I
def stirling(k, K): return sum((-1) ** (K - j) * math.comb(K, j) * j ** k for j in range(K + 1)) // math.factorial(K)
def exactly(I, k, K, equal=False):
    """Sum over set partitions into K blocks."""
    A = np.array([0.0] + [I[S] * (1 if equal else math.factorial(bin(S).count('1'))) for S in range(1, 2 ** k)])
    f = np.zeros(2 ** k); f[0] = 1.0
    for _ in range(K):
        g = np.zeros(2 ** k)
        for S in range(1, 2 ** k):
            low = S & -S; R = S ^ low; T = R
            while True:
                g[S] += A[T | low] * f[R ^ T]
                if T == 0: break
                T = (T - 1) & R
        f = g
    return math.log(f[-1] * (1 / stirling(k, K) if equal else math.factorial(K) / (math.factorial(k) * math.comb(k - 1, K - 1))))
def gradual(tx, rec, w0, w1, longest, confined=False, nt=16, nd=16):
    M = max(t['M'] for t in tx)
    X, W = panels(max(M, w0), w1, [x + longest for x in marks(tx, rec)] + rec.knots() + [w0 + longest] + [M + (w1 - M) * 4.0 ** -q for q in range(1, 12)], nt)
    x, w = np.polynomial.legendre.leggauss(nd); total = 0.0
    for t, wt in zip(X, W):
        D = min(longest, t - w0) if confined else longest
        br = sorted({0.0, D, *[t - y for y in marks(tx, rec) if 0 < t - y < D], *[(t - M) * 4.0 ** q for q in range(1, 30) if (t - M) * 4.0 ** q < D]})
        s = 0.0
        for d0, d1 in zip(br[:-1], br[1:]):
            for xx, ww in zip(x, w):
                d = .5 * (d1 - d0) * xx + .5 * (d0 + d1); s += .5 * (d1 - d0) * ww * math.prod(mean_L(a, rec, t - d, t) / d for a in tx)
        total += wt * s / D
    return math.log(total / (w1 - w0))
def marker(tx, mu, sd):
    M = max(t['M'] for t in tx); rec = Recovery()
    f = lambda h: stats.norm.pdf(h, mu, sd) * math.prod(L(t, rec, h) for t in tx)
    hi = max(M, mu) + 12 * sd
    return math.log(integrate.quad(f, M, hi, points=[p for p in (mu - sd, mu, mu + sd) if M < p < hi] or None, epsabs=0, epsrel=1e-11, limit=400)[0])
def contaminated(h, H, eps, tau):
    b, M, second, m = h
    base = (1 - eps) * ((M - b) / (tau - b)) ** m if tau >= M else 0.0
    if tau < second or tau < b: return base
    R = (M - b) ** m / ((tau - b) ** (m - 1) * (H - b))
    return base + eps * (R if tau >= M else R / m)
def contaminated_single(finds, w0, w1, H, eps):
    tx = [(min(h), max(h), sorted(h)[-2] if len(h) > 1 else min(h), len(h) - 1) for h in finds]
    X, W = panels(max([w0] + [t[2] for t in tx]), w1, [t[1] for t in tx] + [t[2] for t in tx], 40)
    return math.log(sum(w * math.prod(contaminated(t, H, eps, x) for t in tx) for x, w in zip(X, W)) / (w1 - w0))
def ranked(tx, w0, w1, n=20):
    """Exactly two pulses by height: sum over the taxa of the lower pulse of nested integrals."""
    from numpy.polynomial import legendre as lg
    k = len(tx); rec = Recovery(); top = max(t['M'] for t in tx)
    br = sorted({w0, w1, *[t['M'] for t in tx], *[top + (w1 - top) * 4.0 ** -q for q in range(1, 7)]})
    g, gw = np.polynomial.legendre.leggauss(n); C = np.linalg.inv(np.polynomial.legendre.legvander(g, n - 1))
    Q = np.array([lg.legval(g, lg.legint(C[:, j], lbnd=-1)) for j in range(n)]).T
    X = np.array([.5 * (b - a) * g + .5 * (a + b) for a, b in zip(br[:-1], br[1:])]); H = np.array([.5 * (b - a) for a, b in zip(br[:-1], br[1:])])
    M = [np.array([L(t, rec, h) for h in X.ravel()]).reshape(X.shape) for t in tx]
    P = [np.ones_like(X)] + [None] * (2 ** k - 1)
    for S in range(1, 2 ** k): b = S.bit_length() - 1; P[S] = P[S ^ (1 << b)] * M[b]
    cum = lambda f: H[:, None] * (f @ Q.T) + np.r_[0, np.cumsum(H * (f @ gw))[:-1]][:, None]
    tot = m1 = m2 = 0.0; low = np.zeros(k); full = 2 ** k - 1
    for S in range(1, full):
        c = bin(S).count('1'); wt = math.factorial(c) * math.factorial(k - c); up = P[full ^ S]; F, FX = cum(P[S]), cum(P[S] * X)
        z = wt * (H[:, None] * gw * up * F).sum(); tot += z; low += z * np.array([(S >> i) & 1 for i in range(k)])
        m1 += wt * (H[:, None] * gw * up * FX).sum(); m2 += wt * (H[:, None] * gw * up * X * F).sum()
    return dict(inLower=(low / tot).tolist(), lowerM=m1 / tot, upperM=m2 / tot)

ONE = Recovery()
TINY = [[0.0, 10.0, 4], [0.0, 8.0, 3], [0.0, 5.0, 1]]
tiny = [dict(b=b, A=M - b, M=M, m=m) for b, M, m in TINY]
add('tiny', 'tiny', dict(taxa=TINY, window=[0, 40], longest=20), dict(
    single=math.log(1e4 * 512 * 5 * (1e-7 - 40.0 ** -7) / 7 / 40),
    pulses2=exactly(blocks(tiny, ONE, 0, 40), 3, 2), pulses3=exactly(blocks(tiny, ONE, 0, 40), 3, 3),
    gradual=gradual(tiny, ONE, 0, 40, 20)), 1e-7)
for name, finds in SETS.items():
    tx = taxa(finds.values(), ONE); X, W = single(tx, ONE, 10, 45); I = blocks(tx, ONE, 10, 45)
    add('evidence-' + name, 'evidence', dict(set=name, window=[10, 45], longest=30), dict(
        single=math.log(W.sum()), gradual=gradual(tx, ONE, 10, 45, 30), confined=gradual(tx, ONE, 10, 45, 30, True),
        marker30=marker(tx, 30, .5), marker33=marker(tx, 33, .5), exact30=sum(math.log(L(t, ONE, 30.0)) for t in tx),
        dirichlet=[exactly(I, 8, K) for K in (2, 3, 4)], equal=[exactly(I, 8, K, True) for K in (2, 3, 4)]), 1e-6)
    add('ranked-' + name, 'ranked', dict(set=name, window=[10, 45]), ranked(tx, 10, 45), 1e-7)
    add('level-' + name, 'level', dict(set=name, window=[10, 45], at=[30, 31]), dict(
        mean=float((W * X).sum() / W.sum()), above=[float(single_above / W.sum()) for single_above in
            [(lambda c: (panels(c, 45, [], 60)[1] * np.prod(matrix(tx, ONE, panels(c, 45, [], 60)[0]), axis=0)).sum() / 35)(max(c, max(t['M'] for t in tx))) for c in (30, 31)]]), 1e-8)
    add('contaminated-' + name, 'contaminated', dict(set=name, window=[10, 45], top=45, chance=.02), contaminated_single(finds.values(), 10, 45, 45, .02), 1e-6)
    pieces = [[0., 20., 1.], [20., 26., .5], [26., 29.8, 2.], [29.8, 30.2, 0.], [30.2, 45., 1.]]; rec = Recovery(pieces)
    tr = taxa(finds.values(), rec); X, W = single(tr, rec, 10, 45); I = blocks(tr, rec, 10, 45)
    add('recovery-' + name, 'recovery', dict(set=name, window=[10, 45], longest=30, pieces=pieces), dict(
        single=math.log(W.sum()), pulses=[exactly(I, 8, K) for K in (2, 3)], gradual=gradual(tr, rec, 10, 45, 30),
        inGap=float(W[(X > 29.8) & (X < 30.2)].sum() / W.sum()), aboveGap=float(W[X > 30.2].sum() / W.sum())), 2e-6)
out = list(SETS['S1_sudden'].items()); out = [h + ([41.0] if t == 'T7' else []) for t, h in out]
add('outlier', 'outlier', dict(set='S1_sudden', taxon='T7', find=41.0, window=[10, 45], top=45), dict(
    none=contaminated_single(out, 10, 45, 45, 0.0), some=contaminated_single(out, 10, 45, 45, .02)), 1e-6)
CASES = [[0, 9.0, 6.0, 4], [0, 9.0, 0, 1], [2, 9.0, 2, 1], [1, 7.5, 7.0, 12]]; TAU = [3, 6, 6.5, 7.2, 8.9, 9, 9.5]
add('misplaced', 'misplaced', dict(taxa=CASES, top=10, chance=.02, at=TAU), [[contaminated(t, 10, .02, x) for x in TAU] for t in CASES], 1e-12)
AREAS = [[0, 10, 4, 6, 15], [0, 10, 1, 6, 15], [2, 10, 3, 11, 15]]
add('area', 'area', dict(cases=AREAS), [integrate.quad(lambda h: ((M - b) / (h - b)) ** m, max(a, M), c, epsabs=0, epsrel=1e-13)[0] for b, M, m, a, c in AREAS], 1e-12)
with open(os.path.join(HERE, 'scenarios.json'), 'w') as f: json.dump(rows, f, indent=1); f.write('\n')
