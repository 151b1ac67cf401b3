"""Writes timing.json beside itself: python3 make-timing.py. Plain textbook formulas, independent of the product."""
import csv, json, math, os, platform, sys
import numpy as np, scipy
from scipy import optimize, stats
HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, os.path.join(HERE, '..', 'ranges'))
from reference import Recovery

COMPUTED = 'independent computation: make-timing.py, Python %s, numpy %s, scipy %s' % (
    platform.python_version(), np.__version__, scipy.__version__)
SETS = {}
with open(os.path.join(HERE, 'synthetic-sections.csv')) as f:
    for r in csv.DictReader(f): SETS.setdefault(r['set'], {}).setdefault(r['taxon'], []).append(float(r['occurrence_height_m']))
rows = []
def bounded(x):
    """Unbounded becomes null."""
    if isinstance(x, dict): return {k: bounded(v) for k, v in x.items()}
    if isinstance(x, list): return [bounded(v) for v in x]
    return None if isinstance(x, float) and math.isinf(x) else x
def add(case, quantity, inputs, expected, tolerance=1e-9):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=bounded(expected), tolerance=tolerance, source=COMPUTED))

def taxa_of(name, first=True):
    return [(h[0], h[-1], len(h) - 1) if first else (0.0, h[-1], len(h)) for h in map(sorted, SETS[name].values())]
def common(tx):
    M = max(t[1] for t in tx); T = 2 * sum(m * math.log((M - b) / (x - b)) for b, x, m in tx); k = len(tx)
    return dict(M=M, T=T, df=2 * (k - 1), p=float(stats.chi2.sf(T, 2 * (k - 1))))
def given_upper(tx, C):
    M = max(t[1] for t in tx)
    f = lambda th: sum(m * (math.log(M - b) - math.log(th - b)) for b, x, m in tx) - math.log1p(-C)
    hi = M + 1
    while f(hi) > 0: hi = M + (hi - M) * 2
    return optimize.brentq(f, M, hi, xtol=1e-13)
def joint_set(tx, C):
    M = max(t[1] for t in tx); q = stats.chi2.ppf(C, 2 * len(tx))
    f = lambda th: 2 * sum(m * math.log((th - b) / (x - b)) for b, x, m in tx) - q
    if f(M) > 0: return None
    hi = M + 1
    while f(hi) < 0: hi = M + (hi - M) * 2
    return [M, optimize.brentq(f, M, hi, xtol=1e-13)]
def levels(tx, th):
    s = np.array([((x - b) / (th - b)) ** m for b, x, m in tx]); ks = stats.kstest(s, 'uniform', method='exact')
    return dict(levels=s.tolist(), ks=float(ks.statistic), ks_p=float(ks.pvalue))
def lower(tx, C, U=lambda h: h):
    M = max(t[1] for t in tx); q = stats.chi2.ppf(C, 2 * (len(tx) - 1))
    T = lambda D: 2 * sum(m * math.log((U(M - D) - U(b)) / (U(x) - U(b))) for b, x, m in tx if x < M - D)
    return 0.0 if T(0) <= q else optimize.brentq(lambda D: T(D) - q, 0, M - min(t[1] for t in tx), xtol=1e-13)
def box(tx, C, U=lambda h: h, inverse=lambda u: u):
    k = len(tx); c = C ** (1 / k)
    up = [inverse(U(b) + (U(x) - U(b)) * math.exp(-math.log1p(-c) / m)) for b, x, m in tx]; M = [t[1] for t in tx]
    return dict(per_taxon_level=c, uppers=up, lower=max(0.0, max(M) - min(up)), upper=max(0, max(up[i] - M[j] for i in range(k) for j in range(k) if i != j)))

SEGMENTS = [[0, 20, 1, 1], [20, 26, .5, .5], [26, 29.8, 2, 2], [29.8, 30.2, 0, 0], [30.2, 60, 1, 1]]
recovery = Recovery(SEGMENTS)
for s in SETS:
    tx = taxa_of(s)
    add(f'common-end-{s}', 'common-end', dict(set=s), common(tx))
    add(f'common-end-base0-{s}', 'common-end-base0', dict(set=s), common(taxa_of(s, False)))
    for C in (.5, .95):
        add(f'given-{s}-{C}', 'given', dict(set=s, C=C), given_upper(tx, C))
        add(f'joint-{s}-{C}', 'joint', dict(set=s, C=C), joint_set(tx, C))
    for th in (28.5, 29.8, 30.0, 31.0, 33.0):
        if th >= max(t[1] for t in tx): add(f'levels-{s}-{th}', 'levels', dict(set=s, theta=th), levels(tx, th), 1e-8)
    add(f'duration-lower-{s}', 'duration-lower', dict(set=s, C=.95), lower(tx, .95))
    add(f'duration-box-{s}', 'duration-box', dict(set=s, C=.95), box(tx, .95))
    add(f'duration-lower-recovery-{s}', 'duration-lower', dict(set=s, C=.95, segments=SEGMENTS), lower(tx, .95, recovery.U), 1e-8)
    add(f'duration-box-recovery-{s}', 'duration-box', dict(set=s, C=.95, segments=SEGMENTS), box(tx, .95, recovery.U, recovery.inverse), 1e-8)
tx = taxa_of('S1_sudden')
for x in (30.2, 31.0, 32.0):
    g = given_upper(tx, .95); j = joint_set(tx, .95)
    add(f'singleton-{x}', 'singleton', dict(set='S1_sudden', x=x, C=.95),
        dict(T=common(tx)['T'], df=common(tx)['df'], given=[x, g] if x <= g else None, joint=[x, j[1]] if x <= j[1] else None))
tiny = [[0, 10., 4], [0, 8., 3], [0, 5., 1]]
add('tiny', 'common-end-tiny', dict(taxa=tiny), common(tiny), 1e-10)
add('tiny-by-hand', 'tiny-by-hand', dict(taxa=tiny), 2 * (3 * math.log(1.25) + math.log(2)), 1e-12)
for s, i in (('S1_sudden', 0), ('S1_sudden', 2), ('S3_gradual', 1)):
    h = np.array(list(SETS[s].values())[i]); n = len(h); u = (h[1:-1] - h[0]) / (h[-1] - h[0])
    z = (u.mean() - .5) * math.sqrt(12 * (n - 2))
    add(f'centroid-{s}-T{i+1}', 'centroid', dict(set=s, taxon=f'T{i+1}'), dict(z=float(z)))
u = [[(x - h[0]) / (h[-1] - h[0]) for x in h[1:-1]] for h in SETS['S3_gradual'].values()]
zs = [(np.mean(v) - .5) * math.sqrt(12 * len(v)) for v in u]; w = [math.sqrt(len(v)) for v in u]
add('pooled-S3_gradual', 'pooled', dict(set='S3_gradual'), float(np.dot(w, zs) / math.sqrt(np.dot(w, w))))

with open(os.path.join(HERE, 'timing.json'), 'w') as f:
    json.dump(rows, f, indent=1); f.write('\n')
