"""Writes assemblage.json beside itself: python3 make-assemblage.py. Plain textbook formulas and brute force, independent of the
product."""
import csv, itertools, json, math, os, platform, sys
import numpy as np, scipy
from scipy import optimize, stats
HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, os.path.join(HERE, '..', 'ranges'))
from reference import Recovery

SOURCE = 'independent computation: make-assemblage.py, Python %s, numpy %s, scipy %s' % (platform.python_version(), np.__version__, scipy.__version__)
SETS = {}
with open(os.path.join(HERE, 'synthetic-sections.csv')) as f:
    for r in csv.DictReader(f): SETS.setdefault(r['set'], {}).setdefault(r['taxon'], []).append(float(r['occurrence_height_m']))
SETS = {s: {t: sorted(h) for t, h in taxa.items()} for s, taxa in SETS.items()}
rows = []
def add(case, quantity, inputs, expected, tolerance=1e-9):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=expected, tolerance=tolerance, source=SOURCE))
def taxa_of(name): return [(h[0], h[-1], len(h) - 1) for h in SETS[name].values()]

def combined(tx, th):
    X = -2 * sum(m * math.log((x - b) / (th - b)) for b, x, m in tx)
    return dict(statistic=X, df=2 * len(tx), p=float(stats.chi2.sf(X, 2 * len(tx))))
def half(tx, cover=.95):
    e = sorted(b + (x - b) * 2 ** (1 / m) for b, x, m in tx); k = len(e); M = max(t[1] for t in tx); best = None
    for r in range(1, k // 2 + 1):
        c = stats.binom.cdf(k - r, k, .5) - stats.binom.cdf(r - 1, k, .5)
        if c >= cover: best = (r, float(c))
    r, c = best
    return dict(ends=e, coverage=c, set=dict(low=max(M, e[r - 1]), high=e[k - r]))
def half_p(tx, th):
    e = [b + (x - b) * 2 ** (1 / m) for b, x, m in tx]; n = sum(v < th for v in e)
    return dict(below=n, p=float(stats.binomtest(n, len(e), .5).pvalue))
def pooled_bound(tx, C, U=lambda h: h, inverse=lambda u: u):
    M = max(t[1] for t in tx); f = lambda u: sum(m * math.log((U(M) - U(b)) / (u - U(b))) for b, x, m in tx) - math.log1p(-C)
    hi = U(M) + 1
    while f(hi) > 0: hi = U(M) + (hi - U(M)) * 2
    return M, inverse(optimize.brentq(f, U(M), hi, xtol=1e-13))
def apart(A, B, C, *recovery):
    MA, uA = pooled_bound(A, C, *recovery); MB, uB = pooled_bound(B, C, *recovery)
    return dict(lowM=MB - uA, highM=uB - MA)
def pulses(tx, K):
    """Best of all ways to cut the taxa, in order of last finds, into K groups of neighbours: brute force."""
    s = sorted(tx, key=lambda t: t[1]); k = len(s); best = None
    for cuts in itertools.combinations(range(1, k), K - 1):
        edges = (0,) + cuts + (k,); ll = 0
        for a, z in zip(edges, edges[1:]): ll -= sum(m * math.log(s[z - 1][1] - b) for b, x, m in s[a:z])
        if best is None or ll > best[0]: best = (ll, [s[z - 1][1] for z in edges[1:]])
    return dict(logLikelihood=best[0], levels=best[1])
def rarity(a, b):
    ra, rb = stats.rankdata(a), stats.rankdata(b); rho = stats.spearmanr(ra, rb).statistic; S = float(np.dot(ra, rb))
    P = np.array(list(itertools.permutations(rb))); return dict(rho=float(rho), p=float((P @ ra >= S - 1e-9).mean()))
def two_highest(hs, beta, C=.95, extra=()):
    M = max(h[-1] for h in hs); q = stats.chi2.ppf(C, 2 * len(hs)); lo = max([M, *extra])
    f = lambda th: -2 * sum(math.log1p(-((th - h[-1]) / (th - h[-2])) ** beta) for h in hs) - q
    if f(lo) > 0: return None
    hi = lo + 1
    while f(hi) < 0: hi = lo + (hi - lo) * 2
    return [lo, optimize.brentq(f, lo, hi, xtol=1e-13)]
def binomial(lasts, surfaces, w, zone):
    windows = []
    for a, b in sorted([max(zone[0], s - w), min(zone[1], s)] for s in surfaces):
        if windows and a <= windows[-1][1]: windows[-1][1] = max(windows[-1][1], b)
        else: windows.append([a, b])
    inside = [x for x in lasts if zone[0] <= x <= zone[1]]; n = sum(any(a <= x <= b for a, b in windows) for x in inside)
    share = sum(b - a for a, b in windows) / (zone[1] - zone[0])
    return windows, inside, dict(count=n, taxa=len(inside), share=share, binomialP=float(stats.binom.sf(n - 1, len(inside), share)))
def clustering(lasts, surfaces, w, zone):
    windows, inside, out = binomial(lasts, surfaces, w, zone); L = zone[1] - zone[0]; total = 0
    edges = sorted({0, L, *(((x - e) % L) for x in inside for win in windows for e in win)})
    for a, b in zip(edges, edges[1:]):
        c = sum(any((x - (a + b) / 2 - lo) % L <= hi - lo for lo, hi in windows) for x in inside)
        if c >= out['count']: total += b - a
    return dict(out, shiftP=total / L)
def poisson_binomial(p):
    d = np.array([1.0])
    for q in p: d = np.convolve(d, [1 - q, q])
    return d

A, B = ['T2', 'T4', 'T6', 'T8'], ['T1', 'T3', 'T5', 'T7']
SEGMENTS = [[0, 20, 1, 1], [20, 26, .5, .5], [26, 29.8, 2, 2], [29.8, 30.2, 0, 0], [30.2, 60, 1, 1]]
recovery = Recovery(SEGMENTS)
surfaces = dict(surfaces=[8., 16., 24.], below=2., zone=[5., 30.])
for s in SETS:
    tx = taxa_of(s); hs = list(SETS[s].values()); lasts = [t[1] for t in tx]
    part = lambda names: [t for t, n in zip(tx, SETS[s]) if n in names]
    for th in (28.5, 29.8, 30., 31., 33.):
        if th >= max(lasts):
            add(f'combined-{s}-{th}', 'combined', dict(set=s, theta=th), combined(tx, th), 1e-8)
            add(f'half-test-{s}-{th}', 'half-test', dict(set=s, theta=th), half_p(tx, th))
    add(f'half-{s}', 'half', dict(set=s), half(tx))
    for C in (.5, .9, .95): add(f'apart-{s}-{C}', 'apart', dict(set=s, early=A, late=B, C=C), apart(part(A), part(B), C))
    add(f'apart-recovery-{s}', 'apart', dict(set=s, early=A, late=B, C=.95, segments=SEGMENTS), apart(part(A), part(B), .95, recovery.U, recovery.inverse), 1e-8)
    for K in range(1, 9): add(f'pulses-{s}-{K}', 'pulses', dict(set=s, K=K), pulses(tx, K))
    n = [len(h) for h in hs]
    add(f'rarity-{s}', 'rarity', dict(abundance=n, lasts=lasts), rarity(n, lasts))
    density = [(len(h) - 2) / (h[-1] - h[0]) for h in hs]
    add(f'density-{s}', 'rarity', dict(abundance=density, lasts=lasts), rarity(density, lasts))
    for beta in (1, 2): add(f'two-highest-{s}-{beta}', 'two-highest', dict(set=s, tail=beta), two_highest(hs, beta), 1e-8)
    add(f'surfaces-{s}', 'surfaces', dict(surfaces, lasts=lasts), clustering(lasts, **{'surfaces': surfaces['surfaces'], 'w': 2., 'zone': [5., 30.]}), 1e-10)
for x in (30.2, 33.): add(f'two-highest-single-{x}', 'two-highest', dict(set='S1_sudden', tail=1, single=x), two_highest(list(SETS['S1_sudden'].values()), 1, extra=[x]), 1e-8)
lasts = [t[1] for t in taxa_of('S3_gradual')] + [33.]; union = [6., 16., 17., 24.]
add('surfaces-union', 'surfaces', dict(surfaces=union, below=2., zone=[5., 30.], lasts=lasts), clustering(lasts, union, 2., [5., 30.]), 1e-10)
for a, b in (([1, 1, 2, 3, 3, 3, 4], [2, 2, 1, 5, 6, 6, 9]), ([4, 3, 2, 1], [1, 2, 3, 4])): add('rarity-ties-%d' % len(a), 'rarity', dict(abundance=a, lasts=b), rarity(a, b))
n = [25, 18, 14, 12, 10, 8, 6, 5]
for x in (15, 20, 22.5, 25, 27, 28, 29, 29.5):
    p = [1 - (x / 30) ** m for m in n]; cdf = np.cumsum(poisson_binomial(p))
    add(f'envelope-{x}', 'envelope', dict(exponents=n, theta=30, x=x), dict(expected=sum(p), low=int(np.argmax(cdf >= .025)), high=int(np.argmax(cdf >= .975))))
for above in (5, 8, 9):
    d = [.6, .3, .1]; p = [1 - (1 - q) ** (10 - above) for q in d]
    add(f'samples-above-{above}', 'samples', dict(detections=[[q] * (10 - above) for q in d]), dict(expected=sum(p), distribution=poisson_binomial(p).tolist()), 1e-10)
add('detection', 'detection', dict(mean=2, shape=.5, efforts=[.5, 1, 3]), [1 - (1 + 2 / .5) ** (-.5 * e) for e in (.5, 1, 3)], 1e-12)

with open(os.path.join(HERE, 'assemblage.json'), 'w') as f:
    json.dump(rows, f, indent=1); f.write('\n')
